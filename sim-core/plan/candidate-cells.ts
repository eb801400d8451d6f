import { cellCentre, type Grid } from '#sim-core/grid/grid.ts';
import { occupiedFrom } from '#sim-core/measure/cover-measures.ts';

export interface CandidateInput {
  readonly grid: Grid;
  readonly ground: {
    readonly capacity: Uint8Array;
    readonly vigour: Uint8Array;
    readonly cover: Float32Array;
  };
  readonly allowed?: Uint8Array;
  /** most places; 400 unless said */
  readonly candidates?: number;
}

/** A place where a foothold may be put: the middle of a cell, in the site's CRS. */
export interface Candidate {
  readonly x: number;
  readonly y: number;
  readonly cell: number;
}

/**
 * Places worth weighing: cells where works are allowed, the plant grows and nothing stands yet, thinned to one in each
 * square block of cells, the one nearest to the block's middle. Blocks are as small as keeps the places within the
 * number asked for.
 */
export function candidateCells(input: CandidateInput): Candidate[] {
  const { grid, ground, allowed, candidates = 400 } = input;
  const { capacity, vigour, cover } = ground;
  const { width, height } = grid;
  const may = (cell: number) =>
    capacity[cell] > 0 &&
    vigour[cell] > 0 &&
    cover[cell] < occupiedFrom &&
    (allowed === undefined || allowed[cell] !== 0);
  let free = 0;
  for (let cell = 0; cell < width * height; cell++) if (may(cell)) free++;
  // Blocks of scattered ground are seldom full: start where they would be, and widen until they are few enough.
  for (let side = Math.max(1, Math.floor(Math.sqrt(free / candidates))); ; side++) {
    const found = oneInEachBlock(side);
    if (found.length <= candidates) return found;
  }

  function oneInEachBlock(side: number): Candidate[] {
    const columns = Math.ceil(width / side);
    const best = new Int32Array(columns * Math.ceil(height / side)).fill(-1);
    const distance = new Float64Array(best.length).fill(Infinity);
    for (let row = 0; row < height; row++)
      for (let column = 0; column < width; column++) {
        const cell = row * width + column;
        if (!may(cell)) continue;
        const block = Math.floor(row / side) * columns + Math.floor(column / side);
        const [dx, dy] = [(column % side) - (side - 1) / 2, (row % side) - (side - 1) / 2];
        const away = dx * dx + dy * dy;
        if (away < distance[block]) [best[block], distance[block]] = [cell, away];
      }
    return Array.from(best)
      .filter((cell) => cell >= 0)
      .map((cell) => ({ cell, ...cellCentre(grid, cell % width, Math.floor(cell / width)) }));
  }
}
