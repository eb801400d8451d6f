import { cellAt, type Grid } from '#sim-core/grid/grid.ts';
import type { Clumps } from '#sim-core/spec/run-spec.ts';
import { setClumps, type WorksMap } from './works-map.ts';

/** Clumps set in cells, ascending; where several points lie in one cell, theirs together. */
export interface PlantedClumps {
  readonly cells: Uint32Array;
  readonly clumps: Float64Array;
  /** points that no cell can take, by their index: off the grid, or where the plant cannot grow */
  readonly offGrid: number[];
  readonly cannotGrow: number[];
}

/** @param capacity K of each cell, where it is known: without it, only points off the grid are found */
export function plantedClumps({ points, each }: Clumps, grid: Grid, capacity?: Uint8Array): PlantedClumps {
  const found = new Map<number, number>();
  const offGrid: number[] = [];
  const cannotGrow: number[] = [];
  points.forEach(([x, y], i) => {
    const at = cellAt(grid, x, y);
    if (!at) return void offGrid.push(i);
    const cell = at.row * grid.width + at.column;
    if (capacity?.[cell] === 0) return void cannotGrow.push(i);
    found.set(cell, (found.get(cell) ?? 0) + each);
  });
  const cells = Uint32Array.from(found.keys()).sort();
  return { cells, clumps: Float64Array.from(cells, (cell) => found.get(cell) ?? 0), offGrid, cannotGrow };
}

/** How far from its cell a clump that finds no free site there may be set, in cells. */
const spillRadius = 3;
/** The cells around one, nearest first; of equals the northern one, then the western one. */
const rings: readonly { readonly dx: number; readonly dy: number }[] = Array.from(
  { length: (2 * spillRadius + 1) ** 2 },
  (_, i) => ({
    dx: (i % (2 * spillRadius + 1)) - spillRadius,
    dy: Math.floor(i / (2 * spillRadius + 1)) - spillRadius,
  }),
)
  .filter(({ dx, dy }) => dx * dx + dy * dy > 0 && dx * dx + dy * dy <= spillRadius * spillRadius)
  .sort((a, b) => a.dx * a.dx + a.dy * a.dy - (b.dx * b.dx + b.dy * b.dy) || a.dy - b.dy || a.dx - b.dx);

/** Below this a clump is the rounding of another. */
const noClump = 1e-6;

/**
 * Sets clumps where they are planted, then what found no free site there in the nearest cells that have some, each
 * cell's in the order of the cells; what does not fit within `spillRadius` either is lost.
 */
export function setPlantedClumps({ cells, clumps }: PlantedClumps, grid: Grid, map: WorksMap): void {
  const left = clumps.map((wanted, i) => wanted - settle(cells[i], wanted, map));
  cells.forEach((cell, i) => {
    const column = cell % grid.width;
    for (let ring = 0; ring < rings.length && left[i] > noClump; ring++) {
      const { dx, dy } = rings[ring];
      const near = cell + dy * grid.width + dx;
      const within = column + dx >= 0 && column + dx < grid.width && near >= 0;
      if (within && near < map.capacity.length) left[i] -= settle(near, left[i], map);
    }
  });
}

/**
 * Sets as many clumps as a cell has room for, and says how many. In mean-field a clump is the cover that it would be in
 * counts mode: 1/(ν Δx²), or all of the cell's capacity where that is less.
 */
function settle(cell: number, wanted: number, map: WorksMap): number {
  const { kernel, capacity, sites } = map;
  const k = capacity[cell];
  if (k === 0) return 0;
  if (kernel.clumps) {
    const set = Math.min(sites[k] - kernel.clumps[cell], wanted);
    if (set > 0) setClumps(map, cell, kernel.clumps[cell] + set);
    return set;
  }
  const K = Math.fround(k / 255);
  const clump = Math.min(K, 1 / map.clumpsOnFullCell);
  const set = Math.min((K - kernel.cover[cell]) / clump, wanted);
  kernel.cover[cell] = Math.min(K, kernel.cover[cell] + set * clump);
  return set;
}
