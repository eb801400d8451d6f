import { contours } from 'd3-contour';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { Point } from './extent.ts';
import { lineLength } from './points-along.ts';

/** A line along which the ground closes in one year, in the site's CRS. */
export interface YearLine {
  readonly year: number;
  readonly lines: readonly (readonly Point[])[];
  /** where its year may be written: along its longest piece, and how the line runs there, −π/2 to π/2 from east to north */
  readonly label: { readonly x: number; readonly y: number; readonly angle: number } | undefined;
}

export interface YearLinesInput {
  readonly grid: Grid;
  /** years from the survey until a cell closes; Infinity not by the horizon */
  readonly closing: (cell: number) => number;
  /** whether a cell can hold the plant: no line runs along the shore of those that cannot */
  readonly holds?: (cell: number) => boolean;
  readonly surveyYear: number;
  /** years that lines are wanted of, ascending */
  readonly years: readonly number[];
  /** most samples on a side; 400 unless said */
  readonly side?: number;
  /** years after the survey that stand for ground that does not close */
  readonly horizon: number;
}

/** Round steps between the years of two lines. */
const steps = [1, 2, 5, 10, 20, 50, 100, 200];

/** Up to eight years a round number apart, from the first such year after the survey to the horizon. */
export function lineYears(surveyYear: number, years: number): number[] {
  const step = steps.find((s) => years / s <= 8) ?? steps[steps.length - 1];
  const first = (Math.floor(surveyYear / step) + 1) * step;
  const found: number[] = [];
  for (let year = first; year <= surveyYear + years; year += step) found.push(year);
  return found;
}

/**
 * Lines of equal closing year, for drawing: marching squares over samples of the map, at most 400 on a side. Ground that
 * does not close counts as closing a year after the horizon.
 */
export function yearLines(input: YearLinesInput): YearLine[] {
  const { grid, closing, holds = () => true, surveyYear, years, side = 400, horizon } = input;
  const step = Math.max(1, Math.ceil(Math.max(grid.width, grid.height) / side));
  const width = Math.ceil(grid.width / step);
  const height = Math.ceil(grid.height / step);
  const half = (step - 1) / 2;
  const at = (i: number, length: number) => Math.min(length - 1, Math.floor(i * step + half));
  const cellOf = (i: number) =>
    at(Math.floor(i / width), grid.height) * grid.width + at(i % width, grid.width);
  const samples = Array.from(
    { length: width * height },
    (_, i) => -Math.min(horizon + 1, closing(cellOf(i))),
  );
  /** A point of a line stands between the middles of samples: on the shore where one of them cannot hold the plant. */
  const onShore = (x: number, y: number): boolean =>
    [Math.floor(y - 0.5), Math.ceil(y - 0.5)].some((row) =>
      [Math.floor(x - 0.5), Math.ceil(x - 0.5)].some(
        (column) =>
          row >= 0 && row < height && column >= 0 && column < width && !holds(cellOf(row * width + column)),
      ),
    );
  const generator = contours().size([width, height]);
  const place = ([x, y]: number[]): Point => [
    grid.originX + x * step * grid.cellSize,
    grid.originY - y * step * grid.cellSize,
  ];
  return years.map((year) => {
    const { coordinates } = generator.contour(samples, -(year - surveyYear));
    const lines = coordinates
      .flat()
      .flatMap((ring) => piecesInside(ring, width, height, onShore).map((l) => l.map(place)));
    return { year, lines, label: labelOf(lines) };
  });
}

/** The pieces of a ring that run neither along the edge of the map nor along a shore. */
function piecesInside(
  ring: number[][],
  width: number,
  height: number,
  onShore: (x: number, y: number) => boolean,
): number[][][] {
  const pieces: number[][][] = [[]];
  for (const point of ring) {
    const [x, y] = point;
    if (x <= 0 || y <= 0 || x >= width || y >= height || onShore(x, y)) pieces.push([]);
    else pieces[pieces.length - 1].push(point);
  }
  return pieces.filter((piece) => piece.length > 1);
}

function labelOf(lines: Point[][]): YearLine['label'] {
  const longest = lines.reduce<Point[]>((a, b) => (lineLength(b) > lineLength(a) ? b : a), []);
  if (longest.length < 2) return undefined;
  const middle = Math.floor(longest.length / 2);
  const [x, y] = longest[middle];
  const [fromX, fromY] = longest[Math.max(0, middle - 2)];
  const [toX, toY] = longest[Math.min(longest.length - 1, middle + 2)];
  // Read from left to right, whichever way the line was walked.
  const forward = toX >= fromX ? 1 : -1;
  return { x, y, angle: Math.atan2(forward * (toY - fromY), forward * (toX - fromX)) };
}
