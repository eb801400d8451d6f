import type { Grid } from './grid.ts';
import { areaCells } from '#sim-core/process/area-cells.ts';
import { areaShares } from '#sim-core/process/area-shares.ts';
import type { Edges } from '#sim-core/spec/layer-source.ts';
import type { Area } from '#sim-core/spec/run-spec.ts';
import { areaExtent } from '#sim-core/plan/extent.ts';

/** How far the area on the cells may be from the drawn one before people are told. */
const fairShare = 0.1;
/** Cells that a place must be wide for its shape to show. */
const fairWidth = 2;

/** What becomes of drawn places on a grid. Areas in m², without those that reach beyond the grid. */
export interface DrawnOnGrid {
  /** places that lie wholly on the grid */
  readonly places: number;
  readonly drawn: number;
  readonly taken: number;
  /** places narrower than two cells */
  readonly narrow: number;
  /** whether `taken` differs from `drawn` by more than a tenth */
  readonly differs: boolean;
}

/**
 * How true places stay on the cells of a grid.
 * @param edges `shared` where cells on an edge take the share of their ground that lies within; else all or nothing, by
 * their centre
 */
export function drawnOnGrid(places: readonly { shape: Area; edges?: Edges }[], grid: Grid): DrawnOnGrid {
  const cell = grid.cellSize ** 2;
  let [whole, drawn, taken, narrow] = [0, 0, 0, 0];
  for (const { shape, edges } of places) {
    if (widthOf(shape) < fairWidth * grid.cellSize * (1 - 1e-9)) narrow++;
    if (!liesOn(shape, grid)) continue;
    whole++;
    drawn += areaExtent(shape).area;
    taken += cell * (edges === 'shared' ? sumOf(areaShares(shape, grid).shares) : byCentre(shape, grid));
  }
  return { places: whole, drawn, taken, narrow, differs: Math.abs(taken - drawn) > fairShare * drawn };
}

const sumOf = (shares: Float32Array) => shares.reduce((sum, share) => sum + share, 0);

function byCentre(shape: Area, grid: Grid): number {
  const { cells, share } = areaCells(shape, grid);
  return cells.length * share;
}

/** Width of a disc; of a polygon, that of the rectangle that has its area and its outline, m. */
function widthOf(shape: Area): number {
  if (shape.shape === 'disc') return 2 * shape.radius;
  const { area, outline } = areaExtent(shape);
  const half = outline / 2;
  return (half - Math.sqrt(Math.max(0, half * half - 4 * area))) / 2;
}

function liesOn(shape: Area, { originX, originY, width, height, cellSize }: Grid): boolean {
  const [east, south] = [originX + width * cellSize, originY - height * cellSize];
  const on = (west: number, right: number, low: number, high: number) =>
    west >= originX && right <= east && low >= south && high <= originY;
  if (shape.shape === 'polygon') return shape.ring.every(([x, y]) => on(x, x, y, y));
  const { x, y, radius } = shape;
  return on(x - radius, x + radius, y - radius, y + radius);
}
