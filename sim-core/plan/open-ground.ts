import { cellAt, type Grid } from '#sim-core/grid/grid.ts';
import { occupiedFrom } from '#sim-core/measure/cover-measures.ts';
import type { Point } from './extent.ts';
import { ringRows } from './ring-rows.ts';

export interface OpenGroundInput {
  readonly grid: Grid;
  /** the polygon that points are laid in; the whole grid unless said */
  readonly ring?: readonly Point[];
  /** k/255; points stand where it is above 0 */
  readonly capacity: Uint8Array;
  /** not 0 where works are allowed; everywhere unless said */
  readonly allowed?: Uint8Array;
  /** share of each cell that stands at the survey */
  readonly cover?: Float32Array;
  /** whether to leave out cells on which plants stand */
  readonly bareOnly?: boolean;
}

/** Ground of a polygon on which points may stand. */
export interface OpenGround {
  /** m² */
  readonly area: number;
  /** west, south, east, north of what may hold points, m */
  readonly box: readonly [west: number, south: number, east: number, north: number];
  isOpen(x: number, y: number): boolean;
  /** A place anywhere on it, each as likely; undefined where there is none. */
  anywhere(random: () => number): Point | undefined;
  /** A place in each of its cells, the cells in any order; none where the cell's place falls outside the polygon. */
  everyCell(random: () => number): Generator<Point>;
}

/** How a cell lies: outside or closed, wholly inside, or cut by the polygon's outline. */
const [closed, inside, cut] = [0, 1, 2];
/** Places on a side by which a cut cell's share is told. */
const probes = 8;

/** Ground inside a polygon where works are allowed, the plant can grow and, if so wished, nothing stands yet. */
export function openGround(input: OpenGroundInput): OpenGround {
  const { grid, ring, capacity, allowed, cover, bareOnly = false } = input;
  const { cellSize, originX, originY, width, height } = grid;
  const toColumn = (x: number) => (x - originX) / cellSize;
  const toRow = (y: number) => (originY - y) / cellSize;
  const xs = ring?.map(([x]) => toColumn(x)) ?? [0, width];
  const ys = ring?.map(([, y]) => toRow(y)) ?? [0, height];
  const least = (values: number[]) => values.reduce((a, b) => Math.min(a, b));
  const most = (values: number[]) => values.reduce((a, b) => Math.max(a, b));
  const left = Math.max(0, Math.floor(least(xs)));
  const top = Math.max(0, Math.floor(least(ys)));
  const columns = Math.max(0, Math.min(width, Math.ceil(most(xs))) - left);
  const rows = Math.max(0, Math.min(height, Math.ceil(most(ys))) - top);

  const outline = ringRows(
    xs.map((x, i): Point => [x, ys[i]]),
    top,
    rows,
  );
  const lies = new Uint8Array(columns * rows);
  if (ring) {
    markInside();
    markCut();
  } else lies.fill(inside);
  const cells: number[] = [];
  let whole = 0;
  let area = 0;
  for (let row = 0; row < rows; row++) {
    const cutHere: number[] = [];
    for (let column = 0; column < columns; column++) {
      const i = row * columns + column;
      if (lies[i] === closed) continue;
      const cell = (top + row) * width + left + column;
      const may =
        capacity[cell] > 0 &&
        (allowed === undefined || allowed[cell] !== 0) &&
        !(bareOnly && cover !== undefined && cover[cell] >= occupiedFrom);
      if (!may) lies[i] = closed;
      else {
        cells.push(i);
        if (lies[i] === inside) whole++;
        else cutHere.push(column);
      }
    }
    if (cutHere.length > 0) area += shareInside(row, cutHere) * cellSize * cellSize;
  }
  area += whole * cellSize * cellSize;

  /** Along the middle line of each row, between each pair of crossings. */
  function markInside(): void {
    for (let row = 0; row < rows; row++) {
      const crossings = outline.crossings(top + row + 0.5);
      for (let pair = 0; pair + 1 < crossings.length; pair += 2) {
        const from = Math.max(0, Math.ceil(crossings[pair] - 0.5) - left);
        const to = Math.min(columns, Math.ceil(crossings[pair + 1] - 0.5) - left);
        if (to > from) lies.fill(inside, row * columns + from, row * columns + to);
      }
    }
  }
  /** Every cell that the outline passes through, and its neighbours beside it, which it may touch. */
  function markCut(): void {
    for (let i = 0, j = xs.length - 1; i < xs.length; j = i++) {
      const steps = Math.max(1, Math.ceil(2 * Math.hypot(xs[i] - xs[j], ys[i] - ys[j])));
      for (let step = 0; step <= steps; step++) {
        const x = Math.floor(xs[j] + ((xs[i] - xs[j]) * step) / steps) - left;
        const y = Math.floor(ys[j] + ((ys[i] - ys[j]) * step) / steps) - top;
        for (let row = Math.max(0, y - 1); row <= Math.min(rows - 1, y + 1); row++)
          for (let column = Math.max(0, x - 1); column <= Math.min(columns - 1, x + 1); column++)
            lies[row * columns + column] = cut;
      }
    }
  }
  /** North-western corner of a cell of the box. */
  function corner(i: number): Point {
    return [
      originX + (left + (i % columns)) * cellSize,
      originY - (top + Math.floor(i / columns)) * cellSize,
    ];
  }
  /** How much of cut cells in a row lies inside, in cells, by rows of probes. */
  function shareInside(row: number, cut: readonly number[]): number {
    let hits = 0;
    for (let p = 0; p < probes; p++) {
      const crossings = outline.crossings(top + row + (p + 0.5) / probes);
      let passed = 0;
      for (const column of cut)
        for (let q = 0; q < probes; q++) {
          while (crossings[passed] <= left + column + (q + 0.5) / probes) passed++;
          if (passed % 2 === 1) hits++;
        }
    }
    return hits / (probes * probes);
  }
  function isOpen(x: number, y: number): boolean {
    const at = cellAt(grid, x, y);
    if (!at) return false;
    const [column, row] = [at.column - left, at.row - top];
    if (column < 0 || row < 0 || column >= columns || row >= rows) return false;
    const how = lies[row * columns + column];
    return how === inside || (how === cut && outline.isInside(toColumn(x), toRow(y)));
  }
  function placeIn(i: number, random: () => number): Point | undefined {
    const [west, north] = corner(i);
    const x = west + random() * cellSize;
    const y = north - random() * cellSize;
    return isOpen(x, y) ? [x, y] : undefined;
  }

  return {
    area,
    box: [
      originX + left * cellSize,
      originY - (top + rows) * cellSize,
      originX + (left + columns) * cellSize,
      originY - top * cellSize,
    ],
    isOpen,
    anywhere(random) {
      if (area === 0) return undefined;
      for (;;) {
        const place = placeIn(cells[Math.floor(random() * cells.length)], random);
        if (place) return place;
      }
    },
    *everyCell(random) {
      const order = Uint32Array.from(cells);
      for (let last = order.length - 1; last >= 0; last--) {
        const pick = Math.floor(random() * (last + 1));
        const cell = order[pick];
        order[pick] = order[last];
        const place = placeIn(cell, random);
        if (place) yield place;
      }
    },
  };
}
