import { expect, test } from 'vitest';
import { scaledBesselI } from './bessel.ts';

test('I_0(1) and I_1(1) against their published decimals', () => {
  // OEIS A197036 and A096789, digits from memory; mpmath 1.3 gives the same.
  expect(scaledBesselI(1, 1)[0] * Math.E).toBeCloseTo(1.2660658777520084, 13);
  expect(scaledBesselI(1, 1)[1] * Math.E).toBeCloseTo(0.5651591039924851, 13);
});

test('e^(−t) I_n(t) against mpmath 1.3, exp(-t)*besseli(n, t) at 25 digits', () => {
  const published: [t: number, values: [n: number, value: number][]][] = [
    [
      0.01,
      [
        [0, 0.990074585149707],
        [1, 0.00495031104711828],
        [2, 1.23757260523779e-5],
        [5, 2.578265518135873e-14],
        [10, 2.664373176116595e-30],
      ],
    ],
    [
      5,
      [
        [0, 0.183540812609328],
        [5, 0.0145403181252348],
        [10, 3.086009654986542e-5],
      ],
    ],
    [
      100,
      [
        [0, 0.0399443792990967],
        [2, 0.0391494962385941],
        [10, 0.0241766827182588],
      ],
    ],
  ];
  for (const [t, values] of published) {
    const found = scaledBesselI(t, 10);
    for (const [n, value] of values) expect(found[n] / value).toBeCloseTo(1, 13);
  }
});

test('sums to 1 with variance t, also where t is extreme', () => {
  for (const t of [1e-6, 0.3, 40, 2500]) {
    const half = scaledBesselI(t, 700);
    let sum = half[0];
    let variance = 0;
    for (let n = 1; n < half.length; n++) {
      sum += 2 * half[n];
      variance += 2 * n * n * half[n];
    }
    expect(sum).toBeCloseTo(1, 12);
    expect(variance / t).toBeCloseTo(1, 10);
  }
});
