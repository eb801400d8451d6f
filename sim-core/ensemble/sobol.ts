import { sumOf } from '#sim-core/numeric/sums.ts';
import { stream } from '#sim-core/random/streams.ts';
import { wholeBelow } from '#sim-core/random/whole.ts';
import { drawLatinHypercube } from './latin-hypercube.ts';
import type { Interval } from './proportion.ts';
import { quantiles } from './quantile.ts';

/** The points to run: rows × (factors + 2) of them, each of shares strictly between 0 and 1. */
export interface SobolDesign {
  readonly a: readonly Float64Array[];
  readonly b: readonly Float64Array[];
  /** by factor: the rows of `a` with that factor's column from `b` */
  readonly mixed: readonly (readonly Float64Array[])[];
}

/** What each point of a design came to. */
export interface SobolOutputs {
  readonly a: ArrayLike<number>;
  readonly b: ArrayLike<number>;
  readonly mixed: readonly ArrayLike<number>[];
}

/**
 * Two samples A and B, the columns of one Latin hypercube, and A with each column of B in turn (Saltelli et al. 2010,
 * Comput. Phys. Commun. 181:259–270).
 */
export function sobolDesign(seed: string, factors: number, rows: number): SobolDesign {
  const both = drawLatinHypercube(stream(seed, 'indices'), rows, 2 * factors);
  return mixColumns(
    both.map((point) => point.slice(0, factors)),
    both.map((point) => point.slice(factors)),
    factors,
  );
}

/** The design of two samples of the same size. */
export const mixColumns = (
  a: readonly Float64Array[],
  b: readonly Float64Array[],
  factors: number,
): SobolDesign => ({
  a,
  b,
  mixed: Array.from({ length: factors }, (_, factor) =>
    a.map((point, row) => {
      const mixed = point.slice();
      mixed[factor] = b[row][factor];
      return mixed;
    }),
  ),
});

/** Shares of the output's variance. */
export interface FactorIndices {
  /** S: what the factor explains alone. An estimate can fall outside 0..1 by chance */
  readonly first: Interval;
  /** S_T: what it explains alone and with others */
  readonly total: Interval;
}

export interface SobolIndices {
  readonly mean: number;
  readonly variance: number;
  /** by factor; NaN where the output never changes */
  readonly factors: FactorIndices[];
}

/**
 * First-order and total indices: S = Σ f_B (f_AB − f_A) / (n V) (Saltelli et al. 2010, table 2, row b) on outputs less
 * their mean, which steadies it, and S_T = Σ (f_A − f_AB)² / (2 n V) (Jansen 1999, Comput. Phys. Commun. 117:35–43), V
 * over A and B together. Intervals by drawing the rows again with return (Archer, Saltelli & Sobol' 1997, J. Stat.
 * Comput. Simul. 58:99–120), as percentiles.
 *
 * @param resamples of the intervals
 * @throws RangeError where the samples differ in size, are fewer than 2, or an output is no finite number
 */
export function sobolIndices(
  outputs: SobolOutputs,
  seed: string,
  { level = 0.95, resamples = 1000 }: { level?: number; resamples?: number } = {},
): SobolIndices {
  const rows = outputs.a.length;
  refuseUneven(outputs, rows);
  const centre = (sumOf(outputs.a) + sumOf(outputs.b)) / (2 * rows);
  const terms = termsByRow(outputs, centre);
  const factors = outputs.mixed.length;
  const whole = estimate(terms, factors, rows, (draw) => draw);
  const random = stream(seed, 'bootstrap');
  const drawn = Array.from({ length: resamples }, () =>
    estimate(terms, factors, rows, () => wholeBelow(rows, random)),
  );
  const interval = (of: (e: Estimate) => number): Interval => {
    const [low, high] = quantiles(drawn.map(of), [(1 - level) / 2, (1 + level) / 2]);
    return { estimate: of(whole), low, high };
  };
  return {
    mean: centre,
    variance: whole.variance,
    factors: outputs.mixed.map((_, factor) => ({
      first: interval((e) => e.first[factor]),
      total: interval((e) => e.total[factor]),
    })),
  };
}

interface Estimate {
  readonly variance: number;
  readonly first: Float64Array;
  readonly total: Float64Array;
}

/** Terms of a row: two of the output as a whole, then three a factor. */
const commonTerms = 2;
const factorTerms = 3;

/**
 * What each row adds to the sums that the estimates are made of, row by row: the mean of a and b and of their squares;
 * for each factor b (ab − a), ab − a and (ab − a)² / 2. Outputs count from `centre`, so that no sum drowns the spread.
 */
function termsByRow({ a, b, mixed }: SobolOutputs, centre: number): Float64Array {
  const width = commonTerms + factorTerms * mixed.length;
  const terms = new Float64Array(a.length * width);
  for (let row = 0; row < a.length; row++) {
    const [ofA, ofB] = [a[row] - centre, b[row] - centre];
    let at = row * width;
    terms[at++] = (ofA + ofB) / 2;
    terms[at++] = (ofA * ofA + ofB * ofB) / 2;
    for (const ab of mixed) {
      const change = ab[row] - a[row];
      terms[at++] = ofB * change;
      terms[at++] = change;
      terms[at++] = (change * change) / 2;
    }
  }
  return terms;
}

/** @param rowOf row that each of `rows` draws takes */
function estimate(
  terms: Float64Array,
  factors: number,
  rows: number,
  rowOf: (draw: number) => number,
): Estimate {
  const width = commonTerms + factorTerms * factors;
  const means = new Float64Array(width);
  for (let draw = 0; draw < rows; draw++) {
    const from = rowOf(draw) * width;
    for (let t = 0; t < width; t++) means[t] += terms[from + t];
  }
  for (let t = 0; t < width; t++) means[t] /= rows;
  // The rows drawn have a mean of their own, from which b counts.
  const [mean, square] = means;
  const variance = square - mean * mean;
  const of = (factor: number, term: number) => means[commonTerms + factorTerms * factor + term];
  return {
    variance,
    first: Float64Array.from({ length: factors }, (_, f) => (of(f, 0) - mean * of(f, 1)) / variance),
    total: Float64Array.from({ length: factors }, (_, f) => of(f, 2) / variance),
  };
}

function refuseUneven({ a, b, mixed }: SobolOutputs, rows: number): void {
  if (rows < 2)
    throw new RangeError(`Found ${rows} rows; indices need at least 2, and hundreds to be of use`);
  for (const [name, values] of [
    ['b', b],
    ...mixed.map((m, i) => [`mixed ${i}`, m] as const),
    ['a', a],
  ] as const) {
    if (values.length !== rows)
      throw new RangeError(`Found ${values.length} outputs of ${name}; expected ${rows}, as of a`);
    for (let i = 0; i < rows; i++)
      if (!Number.isFinite(values[i]))
        throw new RangeError(`Output ${i} of ${name} is ${values[i]}; expected a number`);
  }
}
