import { describe, expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import { pairedDifference } from './paired-difference.ts';

const zeros = (values: readonly number[]) => values.map(() => 0);

describe('the mean of pairs and its interval', () => {
  /** Extra hours of sleep, one drug less the other, of ten patients (Cushny & Peebles 1905; Student 1908, Biometrika 6:1–25). */
  const sleep = [1.2, 2.4, 1.3, 1.3, 0, 1, 1.8, 0.8, 4.6, 1.4];
  /** Skewed and whole, as years to recovery are. */
  const skewed = [3, 0, 5, 0, 0, 2, 0, 7, 0, 0, 1, 0, 12, 0, 0, 4, 0, 0, 0, 1];

  // scipy.stats.bootstrap((x,), numpy.mean, n_resamples=2_000_000, method='BCa'), SciPy 1.17.1; standard errors by hand.
  test.each([
    ['sleep', sleep, 1.58, 0.388958724, 1.05, 2.63],
    ['skewed', skewed, 1.75, 0.7029074956, 0.75, 3.7],
  ] as const)('%s', (_, values, mean, error, low, high) => {
    const found = pairedDifference(values, zeros(values), 'a seed');
    expect(found.estimate).toBeCloseTo(mean, 12);
    expect(found.standardError).toBeCloseTo(error, 9);
    // 4,000 resamples place an end of the interval to about a fiftieth of its width.
    expect(Math.abs(found.low - low)).toBeLessThan((high - low) / 25);
    expect(Math.abs(found.high - high)).toBeLessThan((high - low) / 25);
  });

  test('turned round, it is turned round, and the seed decides it', () => {
    const there = pairedDifference(sleep, zeros(sleep), 'a seed');
    expect(pairedDifference(sleep, zeros(sleep), 'a seed')).toEqual(there);
    expect(pairedDifference(sleep, zeros(sleep), 'another').low).not.toBe(there.low);
    expect(pairedDifference(zeros(sleep), sleep, 'a seed').estimate).toBe(-there.estimate);
  });

  test('holds the truth about as often as it says', () => {
    const random = stream('coverage', 'parameters');
    let held = 0;
    const trials = 150;
    for (let trial = 0; trial < trials; trial++) {
      const first = Array.from({ length: 30 }, () => -Math.log(random.double()));
      const { low, high } = pairedDifference(first, zeros(first), `trial ${trial}`, 0.9);
      if (low <= 1 && high >= 1) held++;
    }
    // 0.9 within four standard errors below; skewed samples of 30 come a little short.
    expect(held / trials).toBeGreaterThan(0.8);
    expect(held / trials).toBeLessThan(0.98);
  });
});

test('says how much sharper shared luck is', () => {
  // Both share a large part; what differs varies a tenth as much: a hundred times the replicates, twice over for two.
  const shared = [0, 10, 20, 30, 40, 50];
  const first = shared.map((value, i) => value + (i % 2 ? 1 : -1) + 3);
  const { estimate, standardError, unpairedError, sharperBy } = pairedDifference(first, shared, 'a seed');
  expect(estimate).toBeCloseTo(3, 12);
  expect(standardError).toBeCloseTo(Math.sqrt(6 / 5 / 6), 12);
  expect(unpairedError).toBeGreaterThan(10);
  expect(sharperBy).toBeCloseTo((unpairedError / standardError) ** 2, 9);
});

test('differences that do not vary have no width, and too few are refused', () => {
  expect(pairedDifference([5, 6, 7], [4, 5, 6], 's')).toMatchObject({
    estimate: 1,
    low: 1,
    high: 1,
    sharperBy: Infinity,
  });
  expect(pairedDifference([5, 5], [4, 4], 's').sharperBy).toBe(1);
  expect(() => pairedDifference([1], [2], 's')).toThrow(/at least two pairs/);
  expect(() => pairedDifference([1, 2, 3], [2, 1], 's')).toThrow(RangeError);
});
