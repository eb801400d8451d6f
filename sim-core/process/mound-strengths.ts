import { cellAt, cellCentre, type Grid } from '#sim-core/grid/grid.ts';
import type { MoundPlace } from '#sim-core/spec/places.ts';
import { boxAround, discShare } from './area-cells.ts';

/** Refuge that a mound makes: strength k/255 of each cell that it reaches. */
export interface MoundStrengths {
  readonly cells: Uint32Array;
  readonly strengths: Uint8Array;
}

/**
 * `strength` where a cell's centre lies within `radius` of the point, fading in proportion to distance to 0 over a
 * further `halo` metres. A mound too small to hold a centre still shelters the cell that it stands in, for the share
 * that its own area is of the cell. Empty where the point lies off the grid.
 */
export function moundStrengths(mound: MoundPlace, grid: Grid): MoundStrengths {
  const { x, y, radius, halo, strength } = mound;
  const home = cellAt(grid, x, y);
  if (!home) return { cells: new Uint32Array(), strengths: new Uint8Array() };
  const reached = new Map<number, number>();
  let holdsCentre = false;
  const { left, right, top, bottom } = boxAround(x, y, radius + halo, grid);
  for (let row = top; row <= bottom; row++)
    for (let column = left; column <= right; column++) {
      const centre = cellCentre(grid, column, row);
      const [dx, dy] = [centre.x - x, centre.y - y];
      const distance = Math.sqrt(dx * dx + dy * dy);
      const share = distance <= radius ? 1 : halo > 0 ? Math.max(0, 1 - (distance - radius) / halo) : 0;
      if (share === 0) continue;
      if (distance <= radius) holdsCentre = true;
      reached.set(row * grid.width + column, Math.round(255 * strength * share));
    }
  if (!holdsCentre) {
    const cell = home.row * grid.width + home.column;
    const alone = Math.round(255 * strength * discShare(radius, grid));
    reached.set(cell, Math.max(alone, reached.get(cell) ?? 0));
  }
  return { cells: Uint32Array.from(reached.keys()), strengths: Uint8Array.from(reached.values()) };
}
