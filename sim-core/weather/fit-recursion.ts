import { gammaAbove } from '#sim-core/numeric/gamma.ts';
import { moments } from '#sim-core/numeric/sums.ts';
import type { PalmerRecursion } from '#sim-core/spec/weather-source.ts';
import type { YearIndex } from './yearly-record.ts';

/** Pairs of years, one after the other, that a fit takes at least. */
export const fewestPairs = 8;
const longestLag = 10;

/** A recursion fitted to a record by year, and how well it fits. */
export interface RecursionFit {
  /** long-run mean */
  readonly mean: number;
  /** φ: share of the index that a year hands on to the next */
  readonly memory: number;
  /** its 95 % interval, φ ± 1.96 √((1 − φ²)/n) */
  readonly memoryInterval: readonly [low: number, high: number];
  /** φ less its bias for a short record, φ + (1 + 3φ)/n */
  readonly memoryUnbiased: number;
  /** spread of what is new in a year, divisor n − 2 */
  readonly noise: number;
  /** long-run standard deviation that follows, noise / √(1 − φ²) */
  readonly standardDeviation: number;
  /** pairs of years that it rests on */
  readonly pairs: number;
  /** autocorrelation of the record and of what the recursion leaves over, from lag 1 on */
  readonly autocorrelation: readonly number[];
  readonly leftOver: readonly number[];
  /** chance of leftovers so correlated if the recursion held (Ljung–Box); small speaks against it */
  readonly leftOverChance: number;
}

/**
 * Fits X_t = m + φ (X_{t−1} − m) + noise by conditional least squares: regression of each year on the year before, over
 * pairs of years that follow each other, so that gaps break no pair that is not theirs. φ has a bias of about −(1 + 3φ)/n
 * (Kendall 1954, Biometrika 41:403; Marriott & Pope 1954) and a standard error of √((1 − φ²)/n) (Bartlett 1946).
 * Leftovers are tested by Q = n(n + 2) Σ r_k²/(n − k) (Ljung & Box 1978, Biometrika 65:297), χ² with one degree less.
 *
 * @param years ascending
 * @returns undefined of fewer than `fewestPairs` pairs, of a record that never changes, or where φ comes to 1 or more
 */
export function fitRecursion(years: readonly YearIndex[]): RecursionFit | undefined {
  const pairs = years.flatMap((now, i) => {
    const before = years[i - 1];
    return before && before.year === now.year - 1 ? [{ before: before.index, now: now.index }] : [];
  });
  const n = pairs.length;
  if (n < fewestPairs) return undefined;
  const meanBefore = moments(pairs.map(({ before }) => before)).mean;
  const meanNow = moments(pairs.map(({ now }) => now)).mean;
  let product = 0;
  let square = 0;
  for (const { before, now } of pairs) {
    product += (before - meanBefore) * (now - meanNow);
    square += (before - meanBefore) ** 2;
  }
  if (square < 1e-12) return undefined;
  const memory = product / square;
  if (Math.abs(memory) >= 1) return undefined;
  const intercept = meanNow - memory * meanBefore;
  const residuals = pairs.map(({ before, now }) => now - intercept - memory * before);
  const noise = Math.sqrt(residuals.reduce((sum, e) => sum + e * e, 0) / (n - 2));
  const spread = 1.96 * Math.sqrt((1 - memory * memory) / n);
  const lags = Math.min(longestLag, Math.max(2, Math.floor(n / 5)));
  const leftOver = autocorrelation(residuals, lags);
  const statistic = n * (n + 2) * leftOver.reduce((sum, r, k) => sum + (r * r) / (n - k - 1), 0);
  return {
    mean: intercept / (1 - memory),
    memory,
    memoryInterval: [Math.max(-1, memory - spread), Math.min(1, memory + spread)],
    memoryUnbiased: Math.min(0.999, memory + (1 + 3 * memory) / n),
    noise,
    standardDeviation: noise / Math.sqrt(1 - memory * memory),
    pairs: n,
    autocorrelation: autocorrelation(
      years.map(({ index }) => index),
      lags,
    ),
    leftOver,
    leftOverChance: gammaAbove((lags - 1) / 2, statistic / 2),
  };
}

/** Autocorrelation at lags 1 … `lags`, around the mean, divisor that of lag 0. */
export function autocorrelation(values: readonly number[], lags: number): number[] {
  const { mean } = moments(values);
  const at = (k: number) => {
    let sum = 0;
    for (let i = k; i < values.length; i++) sum += (values[i] - mean) * (values[i - k] - mean);
    return sum;
  };
  const whole = at(0);
  return Array.from({ length: lags }, (_, k) => (whole > 0 ? at(k + 1) / whole : 0));
}

/**
 * The weather of a fit, rounded to what a form shows. A memory below 0 cannot be drawn and is taken as none.
 *
 * @param unbiased takes the memory without the bias of a short record
 */
export function recursionOf(fit: RecursionFit, unbiased: boolean): PalmerRecursion {
  const memory = Math.min(0.999, Math.max(0, unbiased ? fit.memoryUnbiased : fit.memory));
  const round = (x: number) => Math.round(x * 1000) / 1000;
  const standardDeviation = Math.min(10, fit.noise / Math.sqrt(1 - memory * memory));
  return { mean: round(fit.mean), standardDeviation: round(standardDeviation), memory: round(memory) };
}
