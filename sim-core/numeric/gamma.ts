import { exp } from './exp.ts';
import { log } from './log.ts';
import { normalQuantile } from './normal.ts';

const halfLogTwoPi = 0.9189385332046727;
/** Terms of Stirling's series from x ≥ 10 on: the first one left out is below 1e−17. */
const stirling = [1 / 12, -1 / 360, 1 / 1260, -1 / 1680, 1 / 1188, -691 / 360360, 1 / 156, -3617 / 122400];

/**
 * ln Γ(x) for x > 0, by Stirling's series (Abramowitz & Stegun 1964, 6.1.41) after stepping x up to 10 with
 * Γ(x + 1) = x Γ(x).
 */
export function logGamma(x: number): number {
  let product = 1;
  let z = x;
  for (; z < 10; z++) product *= z;
  const inverseSquare = 1 / (z * z);
  const series = stirling.reduceRight((sum, c) => sum * inverseSquare + c, 0) / z;
  return (z - 0.5) * log(z) - z + halfLogTwoPi + series - log(product);
}

/**
 * Share of the gamma law of the given shape and scale 1 that lies above x: the regularised upper incomplete gamma
 * function Q(shape, x). By its series below shape + 1 and by the continued fraction above (Abramowitz & Stegun 1964,
 * 6.5.29 and 6.5.31; the fraction as Lentz 1976, Applied Optics 15:668, evaluates it), so that neither tail is the
 * difference of two numbers near 1.
 *
 * @param shape above 0
 * @param x 0 or more
 */
export const gammaAbove = (shape: number, x: number): number =>
  x < shape + 1 ? 1 - lowerSeries(shape, x) : upperFraction(shape, x);

/** Share below x: 1 − `gammaAbove`, without losing the lower tail's digits. */
export const gammaBelow = (shape: number, x: number): number =>
  x < shape + 1 ? lowerSeries(shape, x) : 1 - upperFraction(shape, x);

/** x^shape e^(−x) / Γ(shape) */
const front = (shape: number, x: number) => exp(shape * log(x) - x - logGamma(shape));

const mostTerms = 100_000;
const enough = 1e-16;

function lowerSeries(shape: number, x: number): number {
  if (!(x > 0)) return 0;
  let term = 1 / shape;
  let sum = term;
  for (let n = 1; n < mostTerms && term > sum * enough; n++) {
    term *= x / (shape + n);
    sum += term;
  }
  return Math.min(1, sum * front(shape, x));
}

function upperFraction(shape: number, x: number): number {
  if (x === Infinity) return 0;
  const tiny = 1e-300;
  let b = x + 1 - shape;
  let c = 1 / tiny;
  let d = 1 / b;
  let value = d;
  for (let n = 1; n < mostTerms; n++) {
    const a = -n * (n - shape);
    b += 2;
    d = 1 / (a * d + b || tiny);
    c = b + a / c || tiny;
    const change = c * d;
    value *= change;
    if (Math.abs(change - 1) < enough * 4) break;
  }
  return Math.min(1, value * front(shape, x));
}

/**
 * x that the share `above` of the gamma law of the given shape and scale 1 exceeds: the inverse of `gammaAbove`. From
 * the cube of a normal quantile (Wilson & Hilferty 1931, PNAS 17:684–688) or the law's foot, x^shape / Γ(shape + 1), a
 * bracket is doubled out and then halved, so it always ends. Falls as `above` rises.
 *
 * @param above strictly between 0 and 1
 */
export function gammaQuantileAbove(shape: number, above: number): number {
  const spread = 1 / (9 * shape);
  const cube = 1 - spread - normalQuantile(above) * Math.sqrt(spread);
  const foot = exp((log(1 - above) + logGamma(shape + 1)) / shape);
  const guess = cube > 0.1 ? shape * cube * cube * cube : foot;
  if (!(guess > 0)) return 0;
  // Shares of the nearer tail are compared, so that both tails keep their digits.
  const tooLow = (x: number) =>
    above < 0.5 ? gammaAbove(shape, x) > above : gammaBelow(shape, x) < 1 - above;
  let low = guess;
  let high = guess;
  while (low > 0 && !tooLow(low)) low /= 2;
  while (tooLow(high)) high *= 2;
  for (let i = 0; i < 60 && high - low > high * 1e-16; i++) {
    const middle = low + (high - low) / 2;
    if (tooLow(middle)) low = middle;
    else high = middle;
  }
  return low + (high - low) / 2;
}
