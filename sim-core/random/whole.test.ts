import { expect, test } from 'vitest';
import { stream } from './streams.ts';
import { shuffledOrder, wholeBelow } from './whole.ts';

/** Σ (found − expected)² / expected */
const chiSquared = (counts: Iterable<number>, expected: number) =>
  [...counts].reduce((sum, n) => sum + (n - expected) ** 2 / expected, 0);

test('whole numbers are even, also where the words do not divide', () => {
  const random = stream('whole', 'parameters');
  const counts = new Uint32Array(10);
  for (let i = 0; i < 100_000; i++) counts[wholeBelow(10, random)]++;
  // χ² with 9 degrees of freedom exceeds 27.877165 with chance 0.001 (NIST/SEMATECH e-Handbook).
  expect(chiSquared(counts, 10_000)).toBeLessThan(27.877165);
  // 3 · 2^30 leaves a quarter of the words over; without the redraw, the lower third would come up half the time.
  let low = 0;
  for (let i = 0; i < 30_000; i++) if (wholeBelow(3 * 2 ** 30, random) < 2 ** 30) low++;
  expect(Math.abs(low / 30_000 - 1 / 3)).toBeLessThan(4 * Math.sqrt(2 / 9 / 30_000));
});

test('every order of three comes up as often', () => {
  const random = stream('orders', 'parameters');
  const counts = new Map<string, number>();
  for (let i = 0; i < 60_000; i++) {
    const order = shuffledOrder(3, random).join('');
    counts.set(order, (counts.get(order) ?? 0) + 1);
  }
  expect(counts.size).toBe(6);
  // χ² with 5 degrees of freedom exceeds 20.515 with chance 0.001.
  expect(chiSquared(counts.values(), 10_000)).toBeLessThan(20.515);
  expect([...shuffledOrder(100, random)].sort((a, b) => a - b)).toEqual(
    Array.from({ length: 100 }, (_, i) => i),
  );
});
