import { philox4x32, uniform } from './philox.ts';
import type { PhiloxKey } from './streams.ts';

/** Last word of the counter: which process draws. Never renumber one; a result depends on it. */
export const processes = { shoots: 0, events: 1, survey: 2, fragments: 3, flights: 4 } as const;

/** The two draws of a cell, each strictly between 0 and 1. */
export interface CellDraws {
  /** for what stands */
  standing: number;
  /** for what is free */
  free: number;
}

/**
 * The luck of single cells, in any order: counter = (cell >> 1, step, replicate, process); words 0, 1 serve the even
 * cell and 2, 3 the odd one.
 */
export function cellLuck(
  key: PhiloxKey,
  step: number,
  replicate: number,
  process: number,
): (cell: number) => CellDraws {
  const words = new Uint32Array(4);
  return (cell) => {
    philox4x32(words, cell >>> 1, step, replicate, process, key.k0, key.k1);
    const first = (cell & 1) * 2;
    return { standing: uniform(words[first]), free: uniform(words[first + 1]) };
  };
}
