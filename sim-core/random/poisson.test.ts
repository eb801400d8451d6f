import { describe, expect, test } from 'vitest';
import { exp } from '#sim-core/numeric/exp.ts';
import { gammaAbove } from '#sim-core/numeric/gamma.ts';
import { poissonQuantile } from './poisson.ts';
import { stream } from './streams.ts';

/** P(X ≤ k): the regularised upper incomplete gamma function Q(k + 1, mean), Abramowitz & Stegun 1964, 26.4.21. */
const atMost = (k: number, mean: number) => (k < 0 ? 0 : gammaAbove(k + 1, mean));

describe('the Poisson quantile', () => {
  test.each([
    // e^(−1) (1, 2, 5/2, 8/3): the first sums of the series of e, written out.
    [1, [0.36787944, 0.73575888, 0.9196986, 0.98101184]],
    // e^(−½) (1, 3/2, 13/8)
    [0.5, [0.60653066, 0.90979599, 0.98561232]],
  ])('steps where the sums of its probabilities do: mean %d', (mean, sums) => {
    sums.forEach((sum, k) => {
      expect(poissonQuantile(sum - 1e-7, mean)).toBe(k);
      expect(poissonQuantile(sum + 1e-7, mean)).toBe(k + 1);
    });
  });

  test.each([0.003, 0.4, 3, 40, 199, 201, 3000, 250_000])(
    'is the smallest k with P(X ≤ k) ≥ u, by the incomplete gamma function: mean %d',
    (mean) => {
      const random = stream('poisson', 'parameters');
      const rounding = 1e-10;
      for (let i = 0; i < 300; i++) {
        const u = i % 3 === 0 ? random() ** 6 : i % 3 === 1 ? random() : 1 - random() ** 6;
        if (!(u > 0 && u < 1)) continue;
        const k = poissonQuantile(u, mean);
        expect(atMost(k, mean)).toBeGreaterThanOrEqual(u - rounding);
        expect(atMost(k - 1, mean)).toBeLessThan(u + rounding);
      }
    },
  );

  test.each([0.7, 180, 500])('draws with the mean and variance of the law: mean %d', (mean) => {
    const draws = 20_000;
    let sum = 0;
    let squares = 0;
    // A lattice of u: what a long run of draws comes to, without its luck.
    for (let i = 0; i < draws; i++) {
      const k = poissonQuantile((i + 0.5) / draws, mean);
      sum += k;
      squares += (k - mean) ** 2;
    }
    expect(sum / draws / mean).toBeCloseTo(1, 3);
    expect(squares / draws / mean).toBeCloseTo(1, 2);
  });

  test('rises with u and with the mean, also where the method changes', () => {
    for (const u of [1e-9, 0.02, 0.5, 0.98, 1 - 1e-9]) {
      let before = 0;
      for (let mean = 0; mean < 450; mean += 0.37) {
        const k = poissonQuantile(u, mean);
        expect(k).toBeGreaterThanOrEqual(before);
        before = k;
      }
    }
    for (const mean of [0.1, 5, 150, 900]) {
      let before = 0;
      for (let u = 0.0005; u < 1; u += 0.0005) {
        const k = poissonQuantile(u, mean);
        expect(k).toBeGreaterThanOrEqual(before);
        before = k;
      }
    }
  });

  test('ends at either end of u, and is 0 of a mean of 0', () => {
    expect(poissonQuantile(0.999, 0)).toBe(0);
    expect(poissonQuantile(exp(-2) - 1e-12, 2)).toBe(0);
    expect(poissonQuantile(exp(-2) + 1e-12, 2)).toBe(1);
    for (const mean of [1e-9, 1, 100, 1e4, 1e6]) {
      const high = poissonQuantile(1 - 2 ** -33, mean);
      // 6.4 standard deviations of a normal law leave 2^−33; small means have a longer tail.
      expect(high).toBeLessThan(mean + 8 * Math.sqrt(mean) + 20);
      expect(poissonQuantile(2 ** -33, mean)).toBeGreaterThanOrEqual(
        Math.max(0, mean - 8 * Math.sqrt(mean) - 20),
      );
    }
  });
});
