import { describe, expect, test } from 'vitest';
import { chanceOfLonger, meanWait, meanWithin, remainingWait, waitExceededWith } from './waiting-law.ts';
import type { WaitingLaw } from '#sim-core/spec/weather-source.ts';

const weibull = (shape: number, scale: number): WaitingLaw => ({ law: 'weibull', shape, scale });
const gamma = (shape: number, scale: number): WaitingLaw => ({ law: 'gamma', shape, scale });
const exponential = (mean: number): WaitingLaw => ({ law: 'exponential', mean });

/** Mean square less squared mean, by the midpoint rule over the quantile function. */
function deviation(wait: WaitingLaw): number {
  const parts = 200_000;
  let sum = 0;
  for (let i = 0; i < parts; i++) sum += (waitExceededWith(wait, (i + 0.5) / parts) - meanWait(wait)) ** 2;
  return Math.sqrt(sum / parts);
}

describe('Weibull law, mean bΓ(1 + 1/c)', () => {
  test.each([
    [2, 10, 8.86226925, 4.63251375, 8.32554611],
    [0.5, 10, 20, 44.72135955, 4.80453014],
    [3, 10, 8.92979512, 3.24550281, undefined],
    [1.5, 20, 18.05490586, 12.25871584, undefined],
  ])('shape %f, scale %f', (shape, scale, mean, sd, median) => {
    const wait = weibull(shape, scale);
    expect(meanWait(wait)).toBeCloseTo(mean, 8);
    // The heavy tail of shape 0.5 is where the midpoint rule is weak.
    expect(deviation(wait) / sd).toBeCloseTo(1, shape < 1 ? 2 : 3);
    if (median) expect(waitExceededWith(wait, 0.5)).toBeCloseTo(median, 8);
  });
  test('exceeds 5 with chance 0.77880078', () => {
    expect(chanceOfLonger(weibull(2, 10), 5)).toBeCloseTo(0.77880078, 8);
  });
});

test.each([
  [2, 5, 8.39173495, 0.73575888, 0.40600585],
  [4, 2.5, 9.18015187, 0.85712346, 0.43347012],
  [0.5, 20, 4.54936423, 0.47950012, undefined],
])(
  'gamma law, shape %f, scale %f: median and chances of more than 5 and 10',
  (k, scale, median, five, ten) => {
    const wait = gamma(k, scale);
    expect(meanWait(wait)).toBe(10);
    expect(waitExceededWith(wait, 0.5)).toBeCloseTo(median, 7);
    expect(chanceOfLonger(wait, 5)).toBeCloseTo(five, 8);
    if (ten) expect(chanceOfLonger(wait, 10)).toBeCloseTo(ten, 8);
  },
);

test('the chance of at least one within n years of a return period T, 1 − e^(−n/T)', () => {
  // Chow, Maidment & Mays 1988, Applied Hydrology.
  for (const [period, years, chance] of [
    [10, 10, 0.6321205588],
    [100, 30, 0.2591817793],
    [5, 5, 0.6321205588],
    [20, 10, 0.3934693403],
  ])
    expect(1 - chanceOfLonger(exponential(period), years)).toBeCloseTo(chance, 10);
});

test('chances and waits are each other’s inverse', () => {
  for (const wait of [exponential(7), weibull(0.7, 9), weibull(5, 3), gamma(0.3, 40), gamma(9, 1.5)])
    for (const chance of [1e-9, 0.02, 0.5, 0.77, 0.999])
      expect(chanceOfLonger(wait, waitExceededWith(wait, chance)) / chance).toBeCloseTo(1, 9);
});

test('what is still to wait after waiting: the same law without memory, sooner where the law ages', () => {
  expect(remainingWait(exponential(8), 30, 0.3)).toBeCloseTo(waitExceededWith(exponential(8), 0.3), 10);
  expect(remainingWait(weibull(3, 10), 0, 0.4)).toBeCloseTo(waitExceededWith(weibull(3, 10), 0.4), 10);
  expect(remainingWait(weibull(3, 10), 12, 0.4)).toBeLessThan(remainingWait(weibull(3, 10), 4, 0.4));
  expect(remainingWait(gamma(0.4, 10), 12, 0.4)).toBeGreaterThan(remainingWait(gamma(0.4, 10), 4, 0.4));
  expect(remainingWait({ law: 'fixed', years: 10 }, 4, 0.1)).toBe(6);
  expect(remainingWait({ law: 'fixed', years: 10 }, 40, 0.1)).toBe(0);
  expect(remainingWait(weibull(30, 1), 100, 0.5)).toBe(0);
});

test.each([
  { law: 'fixed', years: 2.5 },
  { law: 'exponential', mean: 3 },
  { law: 'weibull', shape: 0.6, scale: 3 },
  { law: 'weibull', shape: 9, scale: 3 },
  { law: 'gamma', shape: 0.7, scale: 2 },
  { law: 'gamma', shape: 12, scale: 0.3 },
] as const)('the mean within some years is the area under the chance of longer: $law', (law) => {
  for (const years of [0.7, 3, 20]) {
    const parts = 20_000;
    let area = 0;
    for (let i = 0; i < parts; i++) area += chanceOfLonger(law, ((i + 0.5) * years) / parts);
    expect(meanWithin(law, years)).toBeCloseTo((area * years) / parts, 3);
  }
  expect(meanWithin(law, 0)).toBe(0);
});
