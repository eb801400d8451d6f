import seedrandom from 'seedrandom';
import { describe, expect, test } from 'vitest';
import { normalQuantile } from '#sim-core/numeric/normal.ts';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import { drawWeather, weatherProblems, type WeatherSource } from './draw-weather.ts';
import type { SeriesValue } from './series.ts';

const span = { surveyYear: 2020, years: 4, stepsPerYear: 1 as const, seed: 'sallow', replicate: 0 };
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
    expect([...drawWeather({ kind: 'list', values }, span)]).toEqual(values);
    expect([...drawWeather({ kind: 'list', values }, { ...span, stepsPerYear: 2 })]).toEqual([
      -1, -1, 0, 0, 1, 1, 2, 2,
    ]);
    expect([...drawWeather({ kind: 'list', values: -2 }, span)]).toEqual([-2, -2, -2, -2]);
  });
  test('a dated series is read where the run is, by year or as means of months', () => {
    const values = record(2019, [9, 1, -1, -2, -3, -4, 9]).reverse();
    expect([...drawWeather({ kind: 'series', order: 'dated', values }, span)]).toEqual([-1, -2, -3, -4]);
    const months = Array.from({ length: 24 }, (_, m) => ({
      year: 2021 + Math.floor(m / 12),
      month: (m % 12) + 1,
      value: m % 12,
    }));
    const draw = (stepsPerYear: 1 | 2 | 4 | 12) => [
      ...drawWeather({ kind: 'series', order: 'dated', values: months }, { ...span, years: 2, stepsPerYear }),
    ];
    expect(draw(1)).toEqual([5.5, 5.5]);
    expect(draw(4)).toEqual([1, 4, 7, 10, 1, 4, 7, 10]);
    expect(draw(12).slice(0, 13)).toEqual([0, 1, 2, 3, 4, 5, 6, 7, 8, 9, 10, 11, 0]);
  });
  test('a series from a drawn year goes round the record, from every year in turn of luck', () => {
    const values = record(1990, [0, 1, 2, 3, 4]);
    const firsts = new Set<number>();
    for (let replicate = 0; replicate < 60; replicate++) {
      const drawn = drawWeather(
        { kind: 'series', order: 'from a drawn year', values },
        { ...span, replicate },
      );
      drawn.forEach((x, i) => expect(x).toBe((drawn[0] + i) % 5));
      firsts.add(drawn[0]);
    }
    expect([...firsts].sort()).toEqual([0, 1, 2, 3, 4]);
  });
  test.each([renewal, recursion])('$kind: a longer horizon begins with the same years', (source) => {
    const long = drawWeather(source, { ...span, years: 200 });
    expect([...drawWeather(source, { ...span, years: 60 })]).toEqual([...long.slice(0, 60)]);
  });
  test.each([renewal, recursion])('$kind: follows from seed and replicate alone', (source) => {
    const draw = (given: Partial<typeof span>) => [...drawWeather(source, { ...span, years: 60, ...given })];
    expect(draw({})).toEqual(draw({ surveyYear: 1999 }));
    expect(draw({})).not.toEqual(draw({ replicate: 1 }));
    expect(draw({})).not.toEqual(draw({ seed: 'reach' }));
  });
  test('takes its luck from the stream weather/<replicate>, one word a draw', () => {
    const words = seedrandom('sallow/weather/5');
    const normal = () => normalQuantile(((words.int32() >>> 0) + 0.5) / 2 ** 32);
    const memory = 0.897 ** 12;
    const start = 2 * normal();
    const first = memory * start + 2 * Math.sqrt(1 - memory ** 2) * normal();
    expect(drawWeather(recursion, { ...span, replicate: 5 })[0]).toBeCloseTo(first, 12);
  });
  test('what lies beyond the scale is held at its end', () => {
    const wild = drawWeather({ kind: 'palmer-type', standardDeviation: 10 }, { ...span, years: 500 });
    expect([Math.min(...wild), Math.max(...wild)]).toEqual([-15, 15]);
  });
});

describe('what is wrong is named', () => {
  const fields = (source: WeatherSource) =>
    weatherProblems(source, span).map((p) => `${p.field}: ${p.message}`);
  const series = (values: SeriesValue[], order: 'dated' | 'from a drawn year' = 'dated') =>
    fields({ kind: 'series', order, values });
  test('lists', () => {
    expect(fields({ kind: 'list', values: [1, 2] })).toEqual([
      'weather.values: Found 2 values; expected one for each of 4 years',
    ]);
    expect(fields({ kind: 'list', values: [0, 0, 99, 0] })).toEqual([
      'weather.values.2: Found 99; expected -15 to 15',
    ]);
  });
  test('series', () => {
    expect(series([])).toEqual(['weather.values: Found no values; expected one for each year or each month']);
    expect(series(record(2018, [0, 0, 0, 0]))).toEqual([
      'weather.values: The record, 2018 to 2021, has no value for 2022, 2023, 2024; the run needs 2021 to 2024. ' +
        'Add them, shorten the horizon, or read the record on from a drawn year',
    ]);
    const gap = [...record(1990, [1, 2]), ...record(1993, [1])];
    expect(series(gap, 'from a drawn year')).toEqual([
      'weather.values: The record has gaps: no value for 1992. Add them, or cut the record to the part without gaps',
    ]);
    expect(series([...record(2021, [1]), { year: 2021, value: 2 }])[0]).toMatch(
      /^weather.values.1: 2021 stands/,
    );
    expect(series([{ year: 2021, month: 13, value: 0 }])[0]).toMatch(/^weather.values.0: Found month 13/);
    expect(series([{ year: 2021, month: 3, value: 0 }])[0]).toMatch(/no value for 2021-01, 2021-02, 2021-04/);
    expect(series([{ year: 2021, month: 3, value: 0 }, ...record(2022, [0])])[0]).toMatch(/some have none/);
    expect(series([{ year: 2021.5, value: 0 }])[0]).toMatch(/^weather.values.0: Found 2021.5/);
    expect(series([{ year: 2021, value: NaN }])[0]).toMatch(/^weather.values.0: Found NaN/);
  });
  test('generators, and a draw from them is refused', () => {
    expect(fields({ ...recursion, standardDeviation: -1, start: 99 })).toEqual([
      'weather.standardDeviation: Found -1; expected 0 to 10',
      'weather.start: Found 99; expected -15 to 15',
    ]);
    const bad: WeatherSource = {
      ...renewal,
      returnInterval: { law: 'exponential', mean: 0 },
      sinceLatest: -1,
      depth: 1,
      length: { law: 'gamma', shape: 0.05, scale: 0.1 },
    };
    expect(fields(bad)).toEqual([
      'weather.returnInterval.mean: Found 0; expected 0.01 to 10000',
      'weather.sinceLatest: Found -1; expected 0 to 10000',
      'weather.depth: Found 1; expected -15 to 0',
      expect.stringMatching(/^weather.length: Comes to a mean of 0.005/),
    ]);
    expect(() => drawWeather(bad, span)).toThrow(RunProblem);
  });
});
