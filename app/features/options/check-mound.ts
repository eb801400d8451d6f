import { cellAt, cellIndex, type Grid } from '#sim-core/grid/grid.ts';
import { formatNumber } from '#app/lib/formats.ts';

/**
 * Why a mound cannot stand at a place, in words, or undefined where it can.
 *
 * @param capacity capacity of the ground in 8 bits, row-major, once it is known
 * @param x easting, m
 * @param y northing, m
 */
export function moundProblem(
  grid: Grid,
  capacity: Uint8Array | undefined,
  x: number,
  y: number,
): string | undefined {
  const { originX, originY, width, height, cellSize } = grid;
  const cell = cellAt(grid, x, y);
  if (!cell) {
    const east = `${formatNumber(originX)} to ${formatNumber(originX + width * cellSize)}`;
    const north = `${formatNumber(originY - height * cellSize)} to ${formatNumber(originY)}`;
    return `That is off the site: eastings run from ${east} m, northings from ${north} m.`;
  }
  if (capacity?.[cellIndex(grid, cell.column, cell.row)] === 0)
    return 'The plant cannot grow there (capacity 0), so a mound would shelter nothing. Place it on ground that can hold the plant.';
  return undefined;
}
