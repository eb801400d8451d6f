import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';

/** P(X ≤ k) for k = 0 … n in exact whole numbers over 2^(bits·n), p = part / 2^bits. */
function exactCumulative(n: number, part: bigint, bits: bigint) {
  const whole = 1n << bits;
  let choose = 1n;
  let sum = 0n;
  return Array.from({ length: n + 1 }, (_, i) => {
    const k = BigInt(i);
    sum += choose * part ** k * (whole - part) ** (BigInt(n) - k);
    choose = (choose * (BigInt(n) - k)) / (k + 1n);
    return sum;
  });
}

type BinomialQuantile = (u: number, n: number, p: number) => number;

/** The law of the binomial quantile, for any that is written. */
export function describeBinomialQuantile(name: string, binomialQuantile: BinomialQuantile): void {
  describe(`the binomial quantile ${name}`, () => {
    test('is the smallest k with P(X ≤ k) ≥ u, against exact whole-number probabilities', () => {
      const random = stream('binomial', 'parameters');
      for (const n of [1, 2, 3, 4, 7, 16, 20, 61]) {
        for (const part of [1n, 77n, 512n, 700n, 1023n]) {
          const cumulative = exactCumulative(n, part, 10n);
          for (let i = 0; i < 200; i++) {
            const word = random.int32() >>> 0;
            // u = (2 word + 1) / 2^33 against sum / 2^(10 n)
            const expected = cumulative.findIndex(
              (sum) => sum << 33n >= BigInt(2 * word + 1) << (10n * BigInt(n)),
            );
            expect(binomialQuantile((word + 0.5) / 2 ** 32, n, Number(part) / 1024)).toBe(expected);
          }
        }
      }
    });

    test('agrees with scipy.stats.binom.ppf (SciPy 1.17.1) up to n = 100,000', () => {
      for (const [n, p, u, k] of [
        [16, 0.3, 0.5, 5],
        [16, 0.3, 1e-9, 0],
        [16, 0.3, 0.999999999, 16],
        [100, 0.97, 0.01, 92],
        [1000, 0.5, 0.25, 489],
        [1000, 0.5, 0.999, 549],
        [100000, 0.01, 0.5, 1000],
        [100000, 0.37, 0.123456, 36823],
        [100000, 0.37, 1e-9, 36086],
        [100000, 0.999, 0.9, 99913],
        [100000, 0.5, 0.999999999, 50948],
        [5000, 0.06, 0.3, 291],
      ])
        expect(binomialQuantile(u, n, p)).toBe(k);
    });

    test('meets its ends', () => {
      expect(binomialQuantile(0.5, 0, 0.3)).toBe(0);
      expect(binomialQuantile(0.999999, 9, 0)).toBe(0);
      expect(binomialQuantile(0.000001, 9, 1)).toBe(9);
      expect(binomialQuantile(0.000001, 9, 1.0000001)).toBe(9);
      expect(binomialQuantile(1 - 2 ** -33, 5, 1e-30)).toBe(0);
    });

    test('rises with u, with p and with n', () => {
      const u = fc.double({ min: 2 ** -33, max: 1 - 2 ** -33, noNaN: true });
      const p = fc.double({ min: 0, max: 1, noNaN: true });
      const n = fc.oneof(fc.integer({ min: 0, max: 20 }), fc.integer({ min: 0, max: 5000 }));
      fc.assert(
        fc.property(u, u, p, p, n, n, (u1, u2, p1, p2, n1, n2) => {
          const q = (a: number, b: number, c: number) => binomialQuantile(a, b, c);
          expect(q(Math.max(u1, u2), n1, p1)).toBeGreaterThanOrEqual(q(Math.min(u1, u2), n1, p1));
          expect(q(u1, n1, Math.max(p1, p2))).toBeGreaterThanOrEqual(q(u1, n1, Math.min(p1, p2)));
          expect(q(u1, Math.max(n1, n2), p1)).toBeGreaterThanOrEqual(q(u1, Math.min(n1, n2), p1));
        }),
        { numRuns: 2000, seed: 7 },
      );
    });

    test.each([
      [4, 0.13],
      [16, 0.8],
      [1000, 0.4],
    ])('draws of Binomial(%i, %f) have its distribution', (n, p) => {
      const random = stream('draws', 'parameters');
      const draws = 20_000;
      let sum = 0;
      let squares = 0;
      for (let i = 0; i < draws; i++) {
        const x = binomialQuantile(((random.int32() >>> 0) + 0.5) / 2 ** 32, n, p);
        sum += x;
        squares += x * x;
      }
      const mean = sum / draws;
      const variance = squares / draws - mean * mean;
      // Five standard errors, with the normal kurtosis for the variance's.
      expect(Math.abs(mean - n * p)).toBeLessThan(5 * Math.sqrt((n * p * (1 - p)) / draws));
      expect(Math.abs(variance / (n * p * (1 - p)) - 1)).toBeLessThan(5 * Math.sqrt(3 / draws));
    });
  });
}
