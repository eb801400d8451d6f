import type { Grid } from '#sim-core/grid/grid.ts';
import { drawnOnGrid } from '#sim-core/grid/drawn-area.ts';
import type { Mound } from '#sim-core/spec/run-spec.ts';
import type { Feature } from './features.ts';
import { formatArea, formatLength, formatShare } from './formats.ts';

type Placed = Pick<Feature, 'kind' | 'shape' | 'edges'>;

const many: Record<Feature['kind'], string> = {
  refuge: 'surveyed refuges',
  fence: 'surveyed fences',
  allowed: 'allowed areas',
};

/** What the cells of a grid make of surveyed points and areas that people should know, in whole sentences; may be empty. */
export function featureCautions(features: readonly Placed[], grid: Grid): string[] {
  const cell = formatLength(grid.cellSize);
  return (Object.keys(many) as Feature['kind'][]).flatMap((kind) => {
    const of = features.filter((feature) => feature.kind === kind);
    const placed = of.map(({ shape, edges }) => (edges === 'shared' ? { shape, edges } : { shape }));
    const { narrow, differs, drawn, taken } = drawnOnGrid(placed, grid);
    const shared = of.some(({ edges }) => edges === 'shared');
    return [
      ...(narrow > 0
        ? [
            `${narrow} of ${of.length} ${many[kind]} ${narrow === 1 ? 'is' : 'are'} narrower than two cells of ${cell}: ` +
              (shared
                ? 'each strength is spread over the cells that it touches, so the area holds but the outline does not show.'
                : 'the area that they take hangs on how they fall on the cells.'),
          ]
        : []),
      ...(differs
        ? [
            `The ${many[kind]} take ${formatArea(taken)} on cells of ${cell}, ${differenceInWords(taken / drawn)} than the ${formatArea(drawn)} that are drawn.`,
          ]
        : []),
    ];
  });
}

/** What the cells make of one mound that people should know before or after they place it; undefined where they hold it. */
export function moundCaution(
  { x, y, radius }: Pick<Mound, 'radius'> & Partial<Pick<Mound, 'x' | 'y'>>,
  grid: Grid,
): string | undefined {
  const middle = {
    x: grid.originX + (grid.width * grid.cellSize) / 2,
    y: grid.originY - (grid.height * grid.cellSize) / 2,
  };
  const shape = { shape: 'disc' as const, x: x ?? middle.x, y: y ?? middle.y, radius };
  const { narrow, differs, drawn, taken } = drawnOnGrid([{ shape }], grid);
  const cell = formatLength(grid.cellSize);
  const placed = x !== undefined && y !== undefined;
  const found =
    placed && differs
      ? `it takes ${formatArea(taken)} there, ${differenceInWords(taken / drawn)} than its ${formatArea(drawn)}`
      : 'what it takes hangs on how it falls on the cells';
  if (narrow > 0)
    return `A mound ${formatLength(2 * radius)} across is narrower than two cells of ${cell}: ${found}.`;
  return placed && differs ? `On cells of ${cell} ${found}.` : undefined;
}

const differenceInWords = (ratio: number) =>
  `${formatShare(Math.abs(ratio - 1))} ${ratio > 1 ? 'more' : 'less'}`;
