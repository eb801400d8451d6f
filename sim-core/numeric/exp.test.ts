import { describe, expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import { cosh, coshMinusOne, exp, oneMinusExp } from './exp.ts';
import { log } from './log.ts';

/** Distance between two doubles in units of the last place of the second. */
function ulps(found: number, expected: number): number {
  if (found === expected) return 0;
  const view = new DataView(new ArrayBuffer(8));
  const ordinal = (x: number) => {
    view.setFloat64(0, x);
    return view.getBigInt64(0);
  };
  return Math.abs(Number(ordinal(found) - ordinal(expected)));
}

describe('exp', () => {
  test('is within 1 ulp of Math.exp from −745 to 709', () => {
    const random = stream('exp', 'parameters');
    let worst = 0;
    for (let i = 0; i < 200_000; i++) {
      const x = i % 2 ? -745 + random() * (745 + 709) : (random() - 0.5) * 4;
      worst = Math.max(worst, ulps(exp(x), Math.exp(x)));
    }
    expect(worst).toBeLessThanOrEqual(1);
  });

  test('holds at the ends of its range', () => {
    expect(exp(0)).toBe(1);
    expect(exp(-Infinity)).toBe(0);
    expect(exp(Infinity)).toBe(Infinity);
    expect(exp(710)).toBe(Infinity);
    expect(exp(-746)).toBe(0);
    expect(exp(709.7)).toBeCloseTo(Math.exp(709.7), -295);
    expect(exp(-745.1)).toBe(5e-324);
    expect(exp(NaN)).toBeNaN();
  });
});

describe('log', () => {
  test('is within 1 ulp of Math.log over all magnitudes', () => {
    const random = stream('log', 'parameters');
    let worst = 0;
    for (let i = 0; i < 200_000; i++) {
      const x = i % 2 ? 10 ** (-320 + random() * 628) : 0.5 + random();
      worst = Math.max(worst, ulps(log(x), Math.log(x)));
    }
    expect(worst).toBeLessThanOrEqual(1);
  });

  test('holds at the ends of its range', () => {
    expect(log(1)).toBe(0);
    expect(log(0)).toBe(-Infinity);
    expect(log(Infinity)).toBe(Infinity);
    expect(log(-1)).toBeNaN();
  });
});

test('1 − e^(−x) keeps its digits near 0', () => {
  for (const x of [0, 1e-300, 1e-20, 3e-9, 9.9e-5, 1.1e-4, 0.5, 40])
    expect(oneMinusExp(x)).toBeCloseTo(-Math.expm1(-x), 15);
  expect(oneMinusExp(1e-20) / 1e-20).toBeCloseTo(1, 14);
  expect(oneMinusExp(9.99e-5) / -Math.expm1(-9.99e-5)).toBeCloseTo(1, 14);
});

test('cosh x − 1 keeps its digits near 0', () => {
  for (const x of [1e-9, 1e-3, 0.3, 0.499, 0.501, 3, 20])
    expect(coshMinusOne(x) / (2 * Math.sinh(x / 2) ** 2)).toBeCloseTo(1, 13);
  expect(coshMinusOne(0)).toBe(0);
  expect(cosh(-3) / Math.cosh(3)).toBeCloseTo(1, 14);
});
