import { expect, test } from 'vitest';
import { betaBelow, betaQuantile } from './beta.ts';

// SciPy 1.17.1: scipy.special.betainc(a, b, x) and scipy.stats.beta.ppf(p, a, b).
test('shares below', () => {
  for (const [a, b, x, share] of [
    [0.1, 0.1, 0.01, 0.3203082503756264],
    [0.5, 2, 0.3, 0.7394254526319747],
    [2, 2, 0.5, 0.5],
    [2, 5, 0.1, 0.11426500000000002],
    [5, 1, 0.9, 0.5904900000000001],
    [30, 70, 0.25, 0.1358149042834277],
    [500, 800, 0.4, 0.8726412764646694],
    [1, 1, 0.37, 0.37],
  ])
    expect(betaBelow(a, b, x) / share).toBeCloseTo(1, 11);
  expect([betaBelow(2, 3, 0), betaBelow(2, 3, 1)]).toEqual([0, 1]);
});

test('quantiles', () => {
  for (const [a, b, p, x] of [
    [0.1, 0.1, 0.3, 0.005214870253734283],
    [0.5, 2, 0.05, 0.0011119352249856379],
    [2, 2, 0.5, 0.5],
    [2, 5, 0.975, 0.6412345789976748],
    [5, 1, 0.01, 0.39810717055349726],
    [30, 70, 0.5, 0.2986619743086956],
    [500, 800, 0.999, 0.42674971479644086],
  ])
    expect(betaQuantile(a, b, p)).toBeCloseTo(x, 12);
});
