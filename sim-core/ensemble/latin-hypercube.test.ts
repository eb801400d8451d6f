import { expect, test } from 'vitest';
import { moments } from '#sim-core/numeric/sums.ts';
import { latinHypercube } from './latin-hypercube.ts';

test.each([1, 7, 200])('each margin of %i points has one in every part', (n) => {
  const points = latinHypercube('a', n, 4);
  expect(points).toHaveLength(n);
  for (let m = 0; m < 4; m++) {
    const parts = points.map((p) => Math.floor(p[m] * n)).sort((a, b) => a - b);
    expect(parts).toEqual(Array.from({ length: n }, (_, i) => i));
    expect(points.every((p) => p[m] > 0 && p[m] < 1)).toBe(true);
  }
});

test('the variance of the mean of x1 + x2 over ten points is 2/(12 n³), a hundredth of plain sampling’s', () => {
  // McKay, Beckman & Conover 1979, Technometrics 21:239; Stein 1987, Technometrics 29:143.
  const means = moments();
  for (let seed = 0; seed < 4000; seed++) {
    const points = latinHypercube(`mean ${seed}`, 10, 2);
    means.add(points.reduce((sum, p) => sum + p[0] + p[1], 0) / 10);
  }
  // Four standard errors of a variance from 4,000 near-normal means.
  expect(Math.abs(means.variance / (2 / 12_000) - 1)).toBeLessThan(4 * Math.sqrt(2 / 4000));
  expect(Math.abs(means.mean - 1)).toBeLessThan(4 * Math.sqrt(2 / 12_000 / 4000));
});

test('margins are not tied to each other', () => {
  const points = latinHypercube('tied', 2000, 2);
  const both = points.reduce((sum, p) => sum + (p[0] - 0.5) * (p[1] - 0.5), 0) / 2000;
  // Correlation of independent margins: standard error 1/√n.
  expect(Math.abs(12 * both)).toBeLessThan(4 / Math.sqrt(2000));
});

test('follows from the seed; a margin more leaves the others as they were', () => {
  expect(latinHypercube('a', 20, 3)).toEqual(latinHypercube('a', 20, 3));
  expect(latinHypercube('b', 20, 3)).not.toEqual(latinHypercube('a', 20, 3));
  expect(latinHypercube('a', 20, 4).map((p) => p.slice(0, 3))).toEqual(latinHypercube('a', 20, 3));
});
