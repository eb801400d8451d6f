import { exp } from './exp.ts';
import { logGamma } from './gamma.ts';
import { log } from './log.ts';

const mostTerms = 10_000;
const enough = 1e-16;
const tiny = 1e-300;

/**
 * Share of the beta law on 0..1 that lies below x: the regularised incomplete beta function I_x(a, b), by its continued
 * fraction (Abramowitz & Stegun 1964, 26.5.8; evaluated as Lentz 1976, Applied Optics 15:668, does) on the side of the
 * mean where that converges fast.
 *
 * @param a,b both above 0
 * @param x 0..1
 */
export function betaBelow(a: number, b: number, x: number): number {
  if (!(x > 0)) return 0;
  if (x >= 1) return 1;
  return x < (a + 1) / (a + b + 2) ? lowerPart(a, b, x) : 1 - lowerPart(b, a, 1 - x);
}

/** x^a (1 − x)^b / (a B(a, b)) times the fraction. */
function lowerPart(a: number, b: number, x: number): number {
  const front = exp(logGamma(a + b) - logGamma(a) - logGamma(b) + a * log(x) + b * log(1 - x)) / a;
  let c = 1;
  let d = 1 / (1 - ((a + b) * x) / (a + 1) || tiny);
  let value = d;
  for (let m = 1; m < mostTerms; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m));
    d = 1 / (1 + even * d || tiny);
    c = 1 + even / c || tiny;
    value *= c * d;
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1));
    d = 1 / (1 + odd * d || tiny);
    c = 1 + odd / c || tiny;
    const change = c * d;
    value *= change;
    if (Math.abs(change - 1) < enough * 4) break;
  }
  return Math.min(1, front * value);
}

/**
 * x below which the share p of the beta law on 0..1 lies: the inverse of `betaBelow`, by halving, so to within 1e-16 of
 * the whole of 0..1. Rises with p.
 *
 * @param p 0..1
 */
export function betaQuantile(a: number, b: number, p: number): number {
  let low = 0;
  let high = 1;
  for (let i = 0; i < 60 && high - low > 1e-16; i++) {
    const middle = (low + high) / 2;
    if (betaBelow(a, b, middle) < p) low = middle;
    else high = middle;
  }
  return (low + high) / 2;
}
