import { cellCentre, type Grid } from '#sim-core/grid/grid.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import { occupiedFrom } from '#sim-core/measure/cover-measures.ts';

export interface CandidateInput {
  readonly grid: Grid;
  readonly ground: Pick<Ground, 'capacity' | 'vigour' | 'cover'>;
  /** not 0 where works are allowed; everywhere unless said */
  readonly allowed?: Uint8Array;
}

/** A place where a foothold may be put: the middle of a cell, in the site's CRS. */
export interface Candidate {
  readonly x: number;
  readonly y: number;
  readonly column: number;
  readonly row: number;
}

/** Places that are weighed, one in each square block of cells that has one. */
export interface Candidates {
  readonly places: readonly Candidate[];
  /** cells on a side of a block, and blocks in a row */
  readonly side: number;
  readonly columns: number;
  /** number of the place in each block, −1 of none */
  readonly inBlock: Int32Array;
}

/** Fewest and most places that are weighed where nobody says how many. */
const [fewest, most] = [400, 2500];

/**
 * How many places are worth weighing: one on each third of the way that growth makes, within 400 to 2500. What one
 * weighing costs grows as that way's square, so the whole costs about the same on any map of a size.
 *
 * @param reach cells that growth goes in the time at hand
 */
export function candidateNumber(cells: number, reach: number): number {
  const side = Math.max(1, reach / 3);
  return Math.min(most, Math.max(fewest, Math.ceil(cells / (side * side))));
}

/** Whether a foothold may be put in a cell: works are allowed, the plant grows, and nothing stands yet. */
export function mayHold({ ground, allowed }: CandidateInput): (cell: number) => boolean {
  const { capacity, vigour, cover } = ground;
  return (cell) =>
    capacity[cell] > 0 &&
    vigour[cell] > 0 &&
    cover[cell] < occupiedFrom &&
    (allowed === undefined || allowed[cell] !== 0);
}

/**
 * Places worth weighing, thinned to one in each square block of cells: the one nearest to the block's middle that may
 * hold a foothold. Blocks are as small as keeps the places within `number`.
 */
export function candidatePlaces(input: CandidateInput, number: number): Candidates {
  const { width, height } = input.grid;
  const may = mayHold(input);
  let free = 0;
  for (let cell = 0; cell < width * height; cell++) if (may(cell)) free++;
  // Blocks of scattered ground are seldom full: start where they would be, and widen until they are few enough.
  for (let side = Math.max(1, Math.floor(Math.sqrt(free / number))); ; side++) {
    const found = oneInEachBlock(side);
    if (found.places.length <= number) return found;
  }

  function oneInEachBlock(side: number): Candidates {
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
    const places: Candidate[] = [];
    const inBlock = best.map((cell) => {
      if (cell < 0) return -1;
      const [column, row] = [cell % width, Math.floor(cell / width)];
      return places.push({ column, row, ...cellCentre(input.grid, column, row) }) - 1;
    });
    return { places, side, columns, inBlock };
  }
}
