import { describe, expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import { autocorrelation, fitRecursion, recursionOf } from './fit-recursion.ts';
import { drawPalmerRecursion } from './palmer-recursion.ts';

const record = (values: readonly number[], first = 1900) =>
  values.map((index, i) => ({ year: first + i, index }));

test('agrees with scipy 1.17 (linregress of each year on the year before, chi2.sf of the Ljung–Box sum)', () => {
  // r = stats.linregress(x[:-1], x[1:]); e = residuals; noise = sqrt(e@e/(n-2)); Q over 4 lags; p = stats.chi2.sf(Q, 3)
  const x = [
    ...[-0.5, 0.3, 1.2, 0.4, -1.1, -2.6, -3.2, -1.4, 0.2, 0.9, 1.7, 0.8, -0.3],
    ...[-0.9, -2.2, -2.9, -1.2, 0.1, 1.1, 2.0, 1.3, 0.2, -0.8, -1.9, -2.4],
  ];
  const fit = fitRecursion(record(x))!;
  expect(fit.memory).toBeCloseTo(0.7515316995205115, 12);
  expect(fit.mean).toBeCloseTo(-0.6852854462610561, 12);
  expect(fit.noise).toBeCloseTo(1.0818642559581368, 12);
  expect(fit.leftOver[0]).toBeCloseTo(0.5912476216043878, 12);
  expect(fit.leftOverChance / 1.8974894345735993e-6).toBeCloseTo(1, 9);
  expect(fit.pairs).toBe(24);
});

describe('recovers the recursion that made a record', () => {
  const made = { mean: -0.6, standardDeviation: 1.8, memory: 0.55 };
  const draw = (years: number, replicate: number) =>
    record([
      ...drawPalmerRecursion(
        made,
        years,
        1,
        (
          (words) => () =>
            ((words.int32() >>> 0) + 0.5) / 2 ** 32
        )(stream('recovery', `weather/${replicate}`)),
      ),
    ]);
  test('from 500 years, within four standard errors of theory', () => {
    const fit = fitRecursion(draw(500, 1))!;
    expect(Math.abs(fit.memory - made.memory)).toBeLessThan(4 * Math.sqrt((1 - 0.55 ** 2) / 500));
    const noise = made.standardDeviation * Math.sqrt(1 - 0.55 ** 2);
    expect(Math.abs(fit.noise / noise - 1)).toBeLessThan(4 / Math.sqrt(1000));
    // Standard error of the mean of an AR(1): sd √((1 + φ)/(1 − φ)/n)
    expect(Math.abs(fit.mean - made.mean)).toBeLessThan(4 * 1.8 * Math.sqrt(1.55 / 0.45 / 500));
  });
  test('the interval holds the truth in about 95 of 100 records, the corrected memory without bias', () => {
    const fits = Array.from({ length: 400 }, (_, i) => fitRecursion(draw(60, i))!);
    const held = fits.filter(({ memoryInterval: [low, high] }) => low <= 0.55 && 0.55 <= high).length;
    expect(held / 400).toBeGreaterThan(0.89);
    expect(held / 400).toBeLessThanOrEqual(0.99);
    const mean = (of: (fit: (typeof fits)[number]) => number) => fits.reduce((s, f) => s + of(f), 0) / 400;
    // Four standard errors of a mean of 400 is 0.022; the plain estimate is low by about (1 + 3φ)/n = 0.045.
    expect(Math.abs(mean((f) => f.memoryUnbiased) - 0.55)).toBeLessThan(0.025);
    expect(mean((f) => f.memory)).toBeLessThan(0.53);
  });
  test('leftovers of a true recursion speak against it in about 5 of 100 records, of a cycle in all', () => {
    const refused = Array.from({ length: 300 }, (_, i) => fitRecursion(draw(100, i))!).filter(
      ({ leftOverChance }) => leftOverChance < 0.05,
    ).length;
    expect(refused / 300).toBeGreaterThan(0.01);
    expect(refused / 300).toBeLessThan(0.11);
    const cycle = record(Array.from({ length: 100 }, (_, i) => Math.sin(i) + 0.01 * (i % 3)));
    expect(fitRecursion(cycle)!.leftOverChance).toBeLessThan(1e-6);
  });
});

test('a gap breaks no pair but its own', () => {
  const x = Array.from({ length: 30 }, (_, i) => Math.sin(i * 1.7) + 0.1 * i);
  const gapped = record(x).filter(({ year }) => year !== 1910);
  expect(fitRecursion(gapped)!.pairs).toBe(27);
});

test('says nothing of too few years, of a record that never changes, or of one that runs away', () => {
  expect(fitRecursion(record([1, 2, 1, 2, 1]))).toBeUndefined();
  expect(fitRecursion(record(new Array<number>(40).fill(1)))).toBeUndefined();
  expect(fitRecursion(record(Array.from({ length: 20 }, (_, i) => i * i)))).toBeUndefined();
});

test('the weather of a fit keeps its long-run spread, and a memory below 0 is none', () => {
  const fit = fitRecursion(
    record(Array.from({ length: 40 }, (_, i) => (i % 2 === 0 ? 1 : -1) + Math.sin(i))),
  )!;
  expect(fit.memory).toBeLessThan(0);
  expect(recursionOf(fit, false).memory).toBe(0);
  expect(recursionOf(fit, false).standardDeviation).toBeCloseTo(fit.noise, 2);
});

test('autocorrelation by hand', () => {
  // mean 2; deviations −1, 0, 1: lag 1 is (0 + 0)/2, lag 2 is −1/2
  expect(autocorrelation([1, 2, 3], 2)).toEqual([0, -0.5]);
});
