import seedrandom from 'seedrandom';
import { describe, expect, test } from 'vitest';
import { normalQuantile } from '#sim-core/numeric/normal.ts';
import { fieldProblems } from '#sim-core/spec/problems.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import type { SeriesValue, WeatherSource } from '#sim-core/spec/weather-source.ts';
import { drawWeather, type WeatherOfRun } from './draw-weather.ts';

const span = { surveyYear: 2020, years: 4, stepsPerYear: 1 as const, seed: 'sallow', replicate: 0 };
const draw = (droughtIndex: WeatherSource, given: Partial<WeatherOfRun> = {}) =>
  drawWeather({ ...span, ...given, droughtIndex });
const record = (first: number, values: number[]): SeriesValue[] =>
  values.map((value, i) => ({ year: first + i, value }));
const renewal: WeatherSource = {
  kind: 'renewal',
  returnInterval: { law: 'gamma', shape: 2, scale: 4 },
  sinceLatest: 3,
  depth: -4,
  depthSpread: 0.5,
  length: { law: 'weibull', shape: 2, scale: 1.5 },
};
const recursion: WeatherSource = { kind: 'palmer-type', standardDeviation: 2 };

describe('each source', () => {
  test('a list holds for years or steps', () => {
    const values = [-1, 0, 1, 2];
    expect([...draw(values)]).toEqual(values);
    expect([...draw(values, { stepsPerYear: 2 })]).toEqual([-1, -1, 0, 0, 1, 1, 2, 2]);
    expect([...draw(-2)]).toEqual([-2, -2, -2, -2]);
  });
  test('a dated series is read where the run is, by year or as means of months', () => {
    const values = record(2019, [9, 1, -1, -2, -3, -4, 9]).reverse();
    expect([...draw({ kind: 'series', order: 'dated', values })]).toEqual([-1, -2, -3, -4]);
    const months = Array.from({ length: 24 }, (_, m) => ({
      year: 2021 + Math.floor(m / 12),
      month: (m % 12) + 1,
      value: m % 12,
    }));
    const by = (stepsPerYear: 1 | 2 | 4 | 12) => [
      ...draw({ kind: 'series', order: 'dated', values: months }, { years: 2, stepsPerYear }),
    ];
    expect(by(1)).toEqual([5.5, 5.5]);
    expect(by(4)).toEqual([1, 4, 7, 10, 1, 4, 7, 10]);
    expect(by(12).slice(0, 13)).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 0]);
  });
  test('a series from a drawn year goes round the record, from every year in turn of luck', () => {
    const values = record(1990, [0, 1, 2, 3, 4]);
    const firsts = new Set<number>();
    for (let replicate = 0; replicate < 60; replicate++) {
      const drawn = draw({ kind: 'series', order: 'from a drawn year', values }, { replicate });
      drawn.forEach((x, i) => expect(x).toBe((drawn[0] + i) % 5));
      firsts.add(drawn[0]);
    }
    expect([...firsts].sort()).toEqual([0, 1, 2, 3, 4]);
  });
  test.each([renewal, recursion])('$kind: a longer horizon begins with the same years', (source) => {
    const long = draw(source, { years: 200 });
    expect([...draw(source, { years: 60 })]).toEqual([...long.slice(0, 60)]);
  });
  test.each([renewal, recursion])('$kind: follows from seed and replicate alone', (source) => {
    const drawn = (given: Partial<WeatherOfRun>) => [...draw(source, { years: 60, ...given })];
    expect(drawn({})).toEqual(drawn({ surveyYear: 1999 }));
    expect(drawn({})).not.toEqual(drawn({ replicate: 1 }));
    expect(drawn({})).not.toEqual(drawn({ seed: 'reach' }));
  });
  test('takes its luck from the stream weather/<replicate>, one word a draw', () => {
    const words = seedrandom('sallow/weather/5');
    const normal = () => normalQuantile(((words.int32() >>> 0) + 0.5) / 2 ** 32);
    const memory = 0.897 ** 12;
    const start = 2 * normal();
    const first = memory * start + 2 * Math.sqrt(1 - memory ** 2) * normal();
    expect(draw(recursion, { replicate: 5 })[0]).toBeCloseTo(first, 12);
  });
  test('what lies beyond the scale is held at its end', () => {
    const wild = draw({ kind: 'palmer-type', standardDeviation: 10 }, { years: 500 });
    expect([Math.min(...wild), Math.max(...wild)]).toEqual([-15, 15]);
  });
});

describe('a RunSpec refuses what cannot serve it, and names the field', () => {
  const { surveyYear, years, seed } = span;
  const fields = (droughtIndex: unknown) => {
    const parsed = runSpecSchema.safeParse({
      version: 1,
      seed,
      surveyYear,
      years,
      rates: {},
      layers: { cover: 0.5 },
      droughtIndex,
    });
    return parsed.success ? [] : fieldProblems(parsed.error).map((p) => `${p.field}: ${p.message}`);
  };
  const series = (values: SeriesValue[], order: 'dated' | 'from a drawn year' = 'dated') =>
    fields({ kind: 'series', order, values });
  test('what is right', () => {
    for (const source of [0, [1, 2, 3, 4], renewal, recursion]) expect(fields(source)).toEqual([]);
    expect(series(record(2021, [1, 2, 3, 4]))).toEqual([]);
  });
  test('lists', () => {
    expect(fields([1, 2])).toEqual(['droughtIndex: Found 2 values; expected one for each of 4 years']);
    expect(fields([0, 0, 99, 0])).toEqual([expect.stringMatching(/^droughtIndex\.2: .*15/)]);
    expect(fields(-99)).toEqual([expect.stringMatching(/^droughtIndex: .*-15/)]);
    expect(fields('dry')).toEqual([expect.stringMatching(/^droughtIndex: /)]);
  });
  test('series', () => {
    expect(series([])).toEqual([expect.stringMatching(/^droughtIndex\.values: /)]);
    expect(series(record(2018, [0, 0, 0, 0]))).toEqual([
      'droughtIndex.values: The record, 2018 to 2021, has no value for 2022, 2023, 2024; the run needs 2021 to 2024. ' +
        'Add them, shorten the horizon, or read the record on from a drawn year',
    ]);
    const gap = [...record(1990, [1, 2]), ...record(1993, [1])];
    expect(series(gap, 'from a drawn year')).toEqual([
      'droughtIndex.values: The record has gaps: no value for 1992. Add them, or cut the record to the part without gaps',
    ]);
    expect(series([...record(2021, [1]), { year: 2021, value: 2 }])[0]).toMatch(
      /^droughtIndex\.values\.1: 2021 stands/,
    );
    expect(series([{ year: 2021, month: 13, value: 0 }])[0]).toMatch(/^droughtIndex\.values\.0\.month: .*12/);
    expect(series([{ year: 2021, month: 3, value: 0 }])[0]).toMatch(/no value for 2021-01, 2021-02, 2021-04/);
    expect(series([{ year: 2021, month: 3, value: 0 }, ...record(2022, [0])])[0]).toMatch(/some have none/);
    expect(series([{ year: 2021.5, value: 0 }])[0]).toMatch(/^droughtIndex\.values\.0\.year/);
    expect(series([{ year: 2021, value: NaN }])[0]).toMatch(/^droughtIndex\.values\.0\.value/);
  });
  test('generators', () => {
    expect(fields({ ...recursion, standardDeviation: -1, start: 99 })).toEqual([
      expect.stringMatching(/^droughtIndex\.standardDeviation: /),
      expect.stringMatching(/^droughtIndex\.start: /),
    ]);
    expect(fields({ ...renewal, returnInterval: { law: 'exponential', mean: 0 }, sinceLatest: -1 })).toEqual(
      expect.arrayContaining([
        expect.stringMatching(/^droughtIndex\.returnInterval\.mean: /),
        expect.stringMatching(/^droughtIndex\.sinceLatest: /),
      ]),
    );
    expect(fields({ ...renewal, depth: 1, length: { law: 'gamma', shape: 0.05, scale: 0.1 } })).toEqual([
      expect.stringMatching(/^droughtIndex\.length: Comes to a mean of 0\.005/),
      'droughtIndex.depth: Found 1; a drought is no milder than the 0 between droughts',
    ]);
    expect(fields({ kind: 'storms' })).toEqual([expect.stringMatching(/^droughtIndex\.kind: /)]);
  });
});
