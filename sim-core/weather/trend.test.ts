import { describe, expect, test } from 'vitest';
import { fieldProblems } from '#sim-core/spec/problems.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import type { WeatherSource } from '#sim-core/spec/weather-source.ts';
import { drawWeather, type WeatherOfRun } from './draw-weather.ts';
import { droughtClock, frequencyAfter } from './trend.ts';

const span = { surveyYear: 2020, years: 40, stepsPerYear: 1 as const, seed: 'sallow', replicate: 0 };
const draw = (droughtIndex: WeatherSource, given: Partial<WeatherOfRun> = {}) => [
  ...drawWeather({ ...span, ...given, droughtIndex }),
];
const renewal: WeatherSource = {
  kind: 'renewal',
  returnInterval: { law: 'exponential', mean: 10 },
  sinceLatest: 4,
  depth: -4,
  length: { law: 'fixed', years: 1 },
};
const sources: WeatherSource[] = [
  -1,
  Array.from({ length: 40 }, (_, i) => (i % 5) - 2),
  { kind: 'series', order: 'from a drawn year', values: [-1, 0, 2].map((value, i) => ({ year: i, value })) },
  { kind: 'palmer-type', standardDeviation: 1, memory: 0.4 },
  renewal,
];

describe('a shift per decade', () => {
  test.each(sources)('adds to every kind of source what has come by the end of each year: %j', (source) => {
    const plain = draw(source);
    const drier = draw(source, { trend: { shiftPerDecade: -0.5 } });
    drier.forEach((x, i) => expect(x).toBeCloseTo(plain[i] - 0.05 * (i + 1), 12));
  });
  test('comes within a year where there are steps in it', () => {
    const drier = draw(0, { stepsPerYear: 4, years: 1, trend: { shiftPerDecade: -1 } });
    [-0.025, -0.05, -0.075, -0.1].forEach((x, i) => expect(drier[i]).toBeCloseTo(x, 12));
  });
  test('is held within the scale', () => {
    expect(draw(-14, { trend: { shiftPerDecade: -5 } }).at(-1)).toBe(-15);
  });
  test('no trend, or one of nothing, changes nothing', () => {
    for (const source of sources)
      expect(draw(source, { trend: { shiftPerDecade: 0, frequencyPerDecade: 1 } })).toEqual(draw(source));
  });
});

describe('droughts that come more often', () => {
  test('the clock undoes τ(t) = (e^(at) − 1)/a, and stands still in the end where droughts get rarer', () => {
    const a = Math.log(1.5) / 10;
    const { yearsAt } = droughtClock({ frequencyPerDecade: 1.5 });
    for (const years of [0.5, 7, 30]) expect(yearsAt((Math.exp(a * years) - 1) / a)).toBeCloseTo(years, 10);
    expect(yearsAt(-3)).toBe(-3);
    expect(droughtClock({ frequencyPerDecade: 0.5 }).yearsAt(10 / Math.LN2 + 0.1)).toBe(Infinity);
    expect(frequencyAfter({ frequencyPerDecade: 1.5 }, 20)).toBeCloseTo(2.25, 12);
  });
  test('an exponential renewal begins droughts at a rate of f^(t/10) / mean', () => {
    // Thin droughts, so that almost every beginning shows: expected number to the end of 40 years is τ(40)/200.
    const futures = 4000;
    const quick: WeatherSource = {
      ...renewal,
      returnInterval: { law: 'exponential', mean: 200 },
      sinceLatest: 30,
      length: { law: 'fixed', years: 1 },
    };
    let begun = 0;
    for (let replicate = 0; replicate < futures; replicate++)
      begun += draw(quick, { replicate, trend: { frequencyPerDecade: 2 } }).filter((x) => x < 0).length;
    const a = Math.LN2 / 10;
    const expected = (Math.exp(a * 40) - 1) / a / 200;
    // A drought of a year is cut short where the next begins within it: a few in a hundred are lost.
    expect(begun / futures / expected).toBeGreaterThan(0.92);
    expect(begun / futures / expected).toBeLessThan(1 + 4 / Math.sqrt(futures * expected));
  });
  test('a spec refuses it for weather that has no droughts of its own, and takes it for one that has', () => {
    const spec = { version: 1, seed: 'a', surveyYear: 2020, years: 10, rates: {}, layers: { cover: 0.1 } };
    const problemsOf = (more: object) => {
      const parsed = runSpecSchema.safeParse({ ...spec, ...more });
      return parsed.success ? [] : fieldProblems(parsed.error).map(({ field }) => field);
    };
    const trend = { frequencyPerDecade: 1.3 };
    expect(problemsOf({ trend, droughtIndex: -1 })).toContain('trend.frequencyPerDecade');
    expect(problemsOf({ trend, droughtIndex: renewal })).not.toContain('trend.frequencyPerDecade');
  });
});

test('a memory of its own a year: lag-1 correlation of 0.6 by year, and 0.6^(1/12) by month', () => {
  const lag = (stepsPerYear: 1 | 12) => {
    const drawn = draw(
      { kind: 'palmer-type', standardDeviation: 2, memory: 0.6 },
      { years: 500, stepsPerYear, replicate: 3 },
    );
    const mean = drawn.reduce((a, b) => a + b, 0) / drawn.length;
    const product = (k: number) =>
      drawn.slice(k).reduce((sum, x, i) => sum + (x - mean) * (drawn[i] - mean), 0);
    return product(stepsPerYear) / product(0);
  };
  // Bartlett: a standard error of about √((1 − ρ²)/n) = 0.036 by year; the same years stand behind the monthly one.
  expect(Math.abs(lag(1) - 0.6)).toBeLessThan(0.12);
  expect(Math.abs(lag(12) - 0.6)).toBeLessThan(0.12);
});
