import { expect, test } from 'vitest';
import { binomialQuantile } from '#sim-core/random/binomial.ts';
import { uniform } from '#sim-core/random/philox.ts';
import { stream } from '#sim-core/random/streams.ts';
import { wilsonInterval } from './proportion.ts';

test.each([
  // Newcombe 1998, Stat. Med. 17:857, prints the first four; R's prop.test without correction gives them all.
  [81, 263, 0.255289, 0.36621],
  [15, 148, 0.062386, 0.160487],
  [0, 20, 0, 0.161125],
  [1, 29, 0.006113, 0.171755],
  [5, 10, 0.236593, 0.763407],
  [0, 10, 0, 0.277533],
  [10, 10, 0.722467, 1],
  [45, 50, 0.786398, 0.956524],
])('%i of %i', (successes, trials, low, high) => {
  const found = wilsonInterval(successes, trials);
  expect(found.estimate).toBe(successes / trials);
  expect(found.low).toBeCloseTo(low, 6);
  expect(found.high).toBeCloseTo(high, 6);
});

test('covers the true share about as often as it says', () => {
  const random = stream('wilson', 'parameters');
  const trials = 4000;
  for (const p of [0.03, 0.3, 0.83]) {
    let covered = 0;
    for (let i = 0; i < trials; i++) {
      const { low, high } = wilsonInterval(binomialQuantile(uniform(random.int32() >>> 0), 60, p), 60, 0.9);
      if (low <= p && p <= high) covered++;
    }
    // Within what the lumps of 60 trials allow.
    expect(covered / trials).toBeGreaterThan(0.86);
    expect(covered / trials).toBeLessThan(0.95);
  }
});

test('counts that cannot be', () => {
  expect(() => wilsonInterval(3, 2)).toThrow('3 of 2; expected');
  expect(() => wilsonInterval(0, 0)).toThrow(RangeError);
  expect(() => wilsonInterval(1.5, 3)).toThrow(RangeError);
  expect(() => wilsonInterval(1, 3, 1)).toThrow('A level of confidence of 1');
});
