import { cellAt, cellCentre, type Grid } from '#sim-core/grid/grid.ts';
import type { Area, MoundPlace } from '#sim-core/spec/places.ts';
import { boxAround, crossingsAt, outlineRows, ringsOf } from './area-cells.ts';

/** Cells of a place, ascending or not, and the share of each that it takes, above 0 and up to 1. */
export interface CellShares {
  readonly cells: Uint32Array;
  readonly shares: Float32Array;
}

/** Lines a cell on which a polygon is cut exactly, and points a side of a cell at which a disc is asked. */
const fineness = 32;

/**
 * The share of each cell's ground that lies in an area. Its sum is the area on any grid, but for what lies off it. Basic
 * operations alone, so that every engine finds the same.
 */
export function areaShares(area: Area, grid: Grid): CellShares {
  return area.shape === 'disc'
    ? moundShares({ ...area, strength: 1, halo: 0 }, grid)
    : polygonShares(area, grid);
}

/**
 * The mean over each cell's ground of what a mound of full strength shelters: 1 within its radius, fading in proportion
 * to distance to 0 over its halo. Cells that the radius or the outer edge crosses are asked at 32 × 32 points; elsewhere
 * the profile is level, or so nearly straight that its middle is its mean.
 */
export function moundShares({ x, y, radius, halo }: MoundPlace, grid: Grid): CellShares {
  const { cellSize } = grid;
  const halfDiagonal = cellSize * Math.SQRT1_2;
  const profile = (px: number, py: number) => {
    const distance = Math.sqrt((px - x) * (px - x) + (py - y) * (py - y));
    if (distance <= radius) return 1;
    return distance < radius + halo ? 1 - (distance - radius) / halo : 0;
  };
  const mean = (middle: { x: number; y: number }) => {
    let sum = 0;
    for (let i = 0; i < fineness; i++)
      for (let j = 0; j < fineness; j++)
        sum += profile(
          middle.x + ((i + 0.5) / fineness - 0.5) * cellSize,
          middle.y + ((j + 0.5) / fineness - 0.5) * cellSize,
        );
    return sum / (fineness * fineness);
  };
  const crossed = (distance: number, edge: number) => Math.abs(distance - edge) < halfDiagonal;
  const cells: number[] = [];
  const shares: number[] = [];
  const { left, right, top, bottom } = boxAround(x, y, radius + halo + cellSize / 2, grid);
  for (let row = top; row <= bottom; row++)
    for (let column = left; column <= right; column++) {
      const middle = cellCentre(grid, column, row);
      const [dx, dy] = [middle.x - x, middle.y - y];
      const distance = Math.sqrt(dx * dx + dy * dy);
      const cut = crossed(distance, radius) || crossed(distance, radius + halo);
      const share = cut ? mean(middle) : profile(middle.x, middle.y);
      if (share === 0) continue;
      cells.push(row * grid.width + column);
      shares.push(share);
    }
  // A mound between the points that are asked still shelters the cell that it stands in.
  const home = cells.length === 0 ? cellAt(grid, x, y) : undefined;
  if (home) {
    cells.push(home.row * grid.width + home.column);
    shares.push(Math.min(1, (Math.PI * radius * radius) / (cellSize * cellSize)));
  }
  return { cells: Uint32Array.from(cells), shares: Float32Array.from(shares) };
}

/** Even-odd rule on 32 lines a row of cells, each cut exactly where it crosses the outline. */
function polygonShares(area: Extract<Area, { shape: 'polygon' }>, grid: Grid): CellShares {
  const { cellSize, originX, originY, width } = grid;
  const rings = ringsOf(area);
  const { top, bottom } = outlineRows(rings, grid);
  const cells: number[] = [];
  const shares: number[] = [];
  const taken = new Float64Array(width);
  for (let row = top; row <= bottom; row++) {
    let [west, east] = [width, -1];
    for (let line = 0; line < fineness; line++) {
      const crossings = crossingsAt(rings, originY - (row + (line + 0.5) / fineness) * cellSize);
      for (let pair = 0; pair + 1 < crossings.length; pair += 2) {
        const from = Math.max(0, (crossings[pair] - originX) / cellSize);
        const to = Math.min(width, (crossings[pair + 1] - originX) / cellSize);
        const last = Math.min(width - 1, Math.floor(to));
        for (let column = Math.floor(from); column <= last && from < to; column++)
          taken[column] += Math.min(to, column + 1) - Math.max(from, column);
        if (from < to) [west, east] = [Math.min(west, Math.floor(from)), Math.max(east, last)];
      }
    }
    for (let column = west; column <= east; column++) {
      if (taken[column] > 0) {
        cells.push(row * width + column);
        shares.push(Math.min(1, taken[column] / fineness));
      }
      taken[column] = 0;
    }
  }
  return { cells: Uint32Array.from(cells), shares: Float32Array.from(shares) };
}
