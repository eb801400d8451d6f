import { normalCdf } from '#sim-core/numeric/normal-cdf.ts';
import { normalQuantile } from '#sim-core/numeric/normal.ts';
import { normalBound, type Interval } from '#sim-core/ensemble/proportion.ts';
import { quantileOf } from '#sim-core/ensemble/quantile.ts';
import { sumOf } from '#sim-core/numeric/sums.ts';
import { stream } from '#sim-core/random/streams.ts';
import { wholeBelow } from '#sim-core/random/whole.ts';

/** How much more one option comes to than another under the same luck. */
export interface PairedDifference extends Interval {
  readonly pairs: number;
  /** standard error of the mean difference of pairs */
  readonly standardError: number;
  /** what it would be had each option had luck of its own */
  readonly unpairedError: number;
  /** how many times as many replicates luck of its own would need for the same error; Infinity of differences that do not vary */
  readonly sharperBy: number;
}

/** of whole pairs, behind each interval */
export const resamples = 4000;

/**
 * Mean of first − second over replicates that share their luck, with the bias-corrected and accelerated bootstrap
 * interval (Efron 1987, JASA 82:171–185) from 4,000 resamples of whole pairs.
 *
 * @param first by replicate, e.g. years to recovery cut at the horizon
 * @param second of the same replicates, in the same order
 * @param seed text from which the resamples follow
 * @throws RangeError of fewer than two pairs or of unlike lengths
 */
export function pairedDifference(
  first: ArrayLike<number>,
  second: ArrayLike<number>,
  seed: string,
  level = 0.95,
): PairedDifference {
  const n = first.length;
  if (n < 2 || second.length !== n)
    throw new RangeError(
      `Found ${n} and ${second.length} values; expected as many of each, and at least two pairs`,
    );
  const differences = Float64Array.from(first, (value, i) => value - second[i]);
  const estimate = meanDifference(first, second);
  const standardError = Math.sqrt(varianceOf(differences) / n);
  const unpairedError = Math.sqrt((varianceOf(first) + varianceOf(second)) / n);
  return {
    estimate,
    ...bootstrapOfMean(differences, estimate, seed, level),
    pairs: n,
    standardError,
    unpairedError,
    sharperBy: standardError > 0 ? (unpairedError / standardError) ** 2 : unpairedError > 0 ? Infinity : 1,
  };
}

/** Mean of first − second by replicate: the one figure behind every “so much sooner”. */
export function meanDifference(first: ArrayLike<number>, second: ArrayLike<number>): number {
  return sumOf(Float64Array.from(first, (value, i) => value - second[i])) / first.length;
}

/** Unbiased variance. */
function varianceOf(values: ArrayLike<number>): number {
  const mean = sumOf(values) / values.length;
  return sumOf(Float64Array.from(values, (value) => (value - mean) ** 2)) / (values.length - 1);
}

function bootstrapOfMean(values: Float64Array, mean: number, seed: string, level: number) {
  const n = values.length;
  const spread = Math.max(...values) - Math.min(...values);
  if (spread === 0) return { low: mean, high: mean };
  const random = stream(seed, 'bootstrap');
  const means = Float64Array.from({ length: resamples }, () => {
    let sum = 0;
    for (let i = 0; i < n; i++) sum += values[wholeBelow(n, random)];
    return sum / n;
  }).sort();
  // Means that equal the estimate count half: where values are whole there are many.
  const hair = spread * 1e-12;
  const below =
    means.reduce((sum, m) => sum + (m < mean - hair ? 1 : m <= mean + hair ? 0.5 : 0), 0) / resamples;
  const bias = normalQuantile(Math.min(1 - 0.5 / resamples, Math.max(0.5 / resamples, below)));
  const acceleration = accelerationOfMean(values, mean);
  const z = normalBound(level);
  const endAt = (bound: number) => {
    const shifted = bias + bound;
    const share = normalCdf(bias + shifted / (1 - acceleration * shifted));
    return quantileOf(resamples, share, (k) => means[k]);
  };
  return { low: endAt(-z), high: endAt(z) };
}

/** Σ(m̄ − mᵢ)³ / (6 (Σ(m̄ − mᵢ)²)^(3/2)) over the means that leave one out, which for a mean are its deviations over n − 1. */
function accelerationOfMean(values: Float64Array, mean: number): number {
  const squares = sumOf(values.map((value) => (value - mean) ** 2));
  const cubes = sumOf(values.map((value) => (value - mean) ** 3));
  return cubes / (6 * squares ** 1.5);
}
