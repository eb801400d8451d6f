import { describe, expect, test } from 'vitest';
import { moments, sumOf } from './sums.ts';

/** Correct digits of a figure (NIST StRD's log relative error). */
const digits = (found: number, certified: number) =>
  found === certified ? 16 : -Math.log10(Math.abs(found - certified) / Math.abs(certified));
const alternating = (first: number, a: number, b: number) => [
  first,
  ...Array.from({ length: 1000 }, (_, i) => (i % 2 ? b : a)),
];

describe('NIST Statistical Reference Datasets, univariate summary, itl.nist.gov/div898/strd', () => {
  // The last column is what the data, once rounded to doubles, leave of the certified digits.
  test.each([
    ['NumAcc1', [10000001, 10000003, 10000002], 10000002, 1, 15],
    ['NumAcc2', alternating(1.2, 1.1, 1.3), 1.2, 0.1, 13],
    ['NumAcc3', alternating(1000000.2, 1000000.1, 1000000.3), 1000000.2, 0.1, 9],
    ['NumAcc4', alternating(10000000.2, 10000000.1, 10000000.3), 10000000.2, 0.1, 8],
  ])('%s', (_, values, mean, deviation, left) => {
    const found = moments(values);
    expect(found.count).toBe(values.length);
    expect(digits(found.mean, mean)).toBeGreaterThan(14.5);
    expect(digits(found.standardDeviation, deviation)).toBeGreaterThan(left);
    expect(digits(sumOf(values) / values.length, mean)).toBeGreaterThan(15);
  });

  test('is a test that the difference of two sums fails', () => {
    const values = alternating(10000000.2, 10000000.1, 10000000.3);
    let sum = 0;
    let squares = 0;
    for (const x of values) {
      sum += x;
      squares += x * x;
    }
    const variance = (squares - (sum * sum) / values.length) / (values.length - 1);
    expect(variance > 0 ? digits(Math.sqrt(variance), 0.1) : 0).toBeLessThan(2);
  });
});

test('a sum keeps what is small beside what is large', () => {
  expect(sumOf([1, 1e100, 1, -1e100])).toBe(2);
  expect(sumOf(new Float64Array(1_000_000).fill(0.1))).toBe(100_000);
  expect(sumOf([])).toBe(0);
});

test('too few values have no spread', () => {
  expect(moments().mean).toBeNaN();
  expect(moments([3]).mean).toBe(3);
  expect(moments([3]).variance).toBeNaN();
});
