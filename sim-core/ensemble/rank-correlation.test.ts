import { expect, test } from 'vitest';
import { rankCorrelation, ranks } from './rank-correlation.ts';

test('ranks share ties (scipy.stats.rankdata, SciPy 1.17.1)', () => {
  expect([...ranks([1, 2, 2, 3, 3, 3, 4, 9])]).toEqual([1, 2.5, 2.5, 5, 5, 5, 7, 8]);
  expect([...ranks([9, 4, 2, 2])]).toEqual([4, 3, 1.5, 1.5]);
});

test('rank correlation (scipy.stats.spearmanr, SciPy 1.17.1)', () => {
  // Without ties also 1 − 6 Σd² / (n (n² − 1)) = 1 − 6 · 194 / 990.
  const x = [106, 86, 100, 101, 99, 103, 97, 113, 112, 110];
  const y = [7, 0, 27, 50, 28, 29, 20, 12, 6, 17];
  expect(rankCorrelation(x, y)).toBeCloseTo(1 - (6 * 194) / 990, 12);
  expect(rankCorrelation([1, 2, 2, 3, 3, 3, 4, 9], [2, 1, 3, 3, 5, 5, 4, 8])).toBeCloseTo(
    0.8138058888328231,
    12,
  );
});

test('sees order alone', () => {
  const x = [3, -1, 8, 2, 5];
  expect(rankCorrelation(x, x.map(Math.exp))).toBeCloseTo(1, 14);
  expect(
    rankCorrelation(
      x,
      x.map((v) => -v),
    ),
  ).toBeCloseTo(-1, 14);
  expect(rankCorrelation(x, [1, 1, 1, 1, 1])).toBeNaN();
  expect(() => rankCorrelation(x, [1])).toThrow('Found 5 and 1 values');
  expect(() => rankCorrelation([1, NaN], [1, 2])).toThrow('Pair 1 holds no number');
});
