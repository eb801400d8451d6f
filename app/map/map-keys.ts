import type { Grid } from '#sim-core/grid/grid.ts';
import type { MapView } from './map-view.ts';

/** A cell of the grid. */
export interface MapCell {
  readonly column: number;
  readonly row: number;
}

const arrows: Record<string, readonly [number, number]> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
};
/** How far an arrow moves the crosshair on the screen, CSS px. */
const stride = 24;

/** Columns and rows that an arrow key moves by, or undefined for another key: one cell, or `far` of them. */
export function arrowMove(key: string, far: number): readonly [number, number] | undefined {
  if (!Object.hasOwn(arrows, key)) return undefined;
  const [right, down] = arrows[key];
  return [right * far, down * far];
}

/** Cells that the crosshair moves at once: about 24 px of the screen, or one with `fine`. */
export const crosshairStride = (view: MapView, fine: boolean): number =>
  fine ? 1 : Math.max(1, Math.round(stride / view.scale));

/** A cell moved and kept inside the grid. */
export const movedCell = (grid: Grid, cell: MapCell, [right, down]: readonly [number, number]): MapCell => ({
  column: Math.min(grid.width - 1, Math.max(0, cell.column + right)),
  row: Math.min(grid.height - 1, Math.max(0, cell.row + down)),
});
