import type seedrandom from 'seedrandom';
import { uniform } from '#sim-core/random/philox.ts';
import { stream } from '#sim-core/random/streams.ts';
import { shuffledOrder } from '#sim-core/random/whole.ts';

/**
 * Points in the unit cube of which each margin has exactly one in every n-th part of 0..1 (McKay, Beckman & Conover
 * 1979, Technometrics 21:239–245): the draws of all that is uncertain, shared by all options.
 *
 * @param points n; @param margins one for each uncertain parameter, drawn in turn, so adding one at the end leaves the
 * others' values as they were
 * @returns n points of `margins` shares strictly between 0 and 1
 */
export const latinHypercube = (seed: string, points: number, margins: number): Float64Array[] =>
  drawLatinHypercube(stream(seed, 'parameters'), points, margins);

/** The same from any stream. */
export function drawLatinHypercube(random: seedrandom.PRNG, points: number, margins: number): Float64Array[] {
  const drawn = Array.from({ length: points }, () => new Float64Array(margins));
  for (let m = 0; m < margins; m++) {
    const parts = shuffledOrder(points, random);
    for (let i = 0; i < points; i++) drawn[i][m] = (parts[i] + uniform(random.int32() >>> 0)) / points;
  }
  return drawn;
}
