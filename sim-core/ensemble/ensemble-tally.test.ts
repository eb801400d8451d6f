import { describe, expect, test } from 'vitest';
import { createRun } from '#sim-core/run/create-run.ts';
import type { RunResult } from '#sim-core/spec/run-result.ts';
import { gridOf, groundOf, specOf } from '#sim-core/testing/setups.ts';
import { ensembleTally } from './ensemble-tally.ts';
import { quantiles } from './quantile.ts';

const [width, height, years, surveyYear] = [16, 12, 12, 2020];

/** Replicates of a small real ensemble: droughts that come back, counts of clumps, quarterly steps or yearly ones. */
function replicates(count: number, stepsPerYear: 1 | 4 = 1): { result: RunResult; closing: Int16Array }[] {
  const cover = new Float32Array(width * height);
  for (let y = 0; y < height; y++) for (let x = 0; x < 11; x++) cover[y * width + x] = 0.8;
  const source = {
    kind: 'renewal',
    returnInterval: { law: 'exponential', mean: 14 },
    sinceLatest: 1,
    depth: -4,
    length: { law: 'fixed', years: 1 },
  } as const;
  return Array.from({ length: count }, (_, replicate) => {
    const spec = specOf({
      seed: 'tally',
      replicate,
      years,
      stepsPerYear,
      rates: { lateralSpread: 1 },
      droughtIndex: source,
    });
    const run = createRun({ spec, grid: gridOf(width, height), ground: groundOf(width * height, { cover }) });
    while (run.nextYear());
    return { result: run.result(), closing: run.closing() };
  });
}

const input = { surveyYear, years, mostArea: width * height, droughtThreshold: -2.3, cells: width * height };

describe('a real ensemble', () => {
  const drawn = replicates(40);
  const tally = ensembleTally(input);
  drawn.forEach(({ result, closing }) => tally.add(result, closing));
  const summary = tally.summary();
  const times = drawn.map(({ result }) => result.recoveredYear ?? Infinity);

  test('has both kinds of future, or the rest shows nothing', () => {
    expect(times.filter((t) => t < Infinity).length).toBeGreaterThan(3);
    expect(times.filter((t) => t === Infinity).length).toBeGreaterThan(3);
    expect(summary.beforeDrought.drought).toBeGreaterThan(3);
    expect(summary.beforeDrought.recovery).toBeGreaterThan(3);
  });
  test('drops none: the curve ends at the share still open, and its first point has all at risk', () => {
    expect(summary.replicates).toBe(40);
    expect(summary.recovery[0].atRisk).toBe(40);
    expect(summary.recovery.at(-1)?.open).toBeCloseTo(times.filter((t) => t === Infinity).length / 40, 12);
    expect(summary.restrictedMean?.estimate).toBeCloseTo(
      times.reduce((sum, t) => sum + Math.min(t - surveyYear, years), 0) / 40,
      10,
    );
    const { recovery, drought, neither, share } = summary.beforeDrought;
    expect(recovery + drought + neither).toBe(40);
    expect(share?.estimate).toBe(recovery / 40);
  });
  test('fans out cover at each year’s end', () => {
    expect(summary.fan.map((q) => q.length)).toEqual(new Array(5).fill(years + 1));
    const middle = quantiles(
      drawn.map(({ result }) => result.series[7].coveredArea),
      [0.5],
    );
    expect(Math.abs(summary.fan[2][7] - middle[0])).toBeLessThan(0.05);
  });
  test('maps closing: where cover stood it is certain, and chances rise with the years', () => {
    const survey = tally.maps?.chanceBy(surveyYear);
    const end = tally.maps?.chanceBy(surveyYear + years);
    expect(survey?.[0]).toBe(1);
    expect(survey?.[width - 1]).toBe(0);
    expect(end?.every((chance, i) => chance >= (survey?.[i] ?? 2))).toBe(true);
    expect(tally.maps?.medianYear()[0]).toBe(surveyYear);
  });
  test('does not depend on the order', () => {
    const back = ensembleTally(input);
    drawn.toReversed().forEach(({ result, closing }) => back.add(result, closing));
    expect(back.summary()).toEqual(summary);
    expect(back.maps?.medianYear()).toEqual(tally.maps?.medianYear());
  });
});

test('takes a year’s end from quarterly steps', () => {
  const [{ result }] = replicates(1, 4);
  const tally = ensembleTally({ ...input, cells: undefined });
  tally.add(result);
  const { fan } = tally.summary();
  expect(Math.abs(fan[2][3] - result.series[12].coveredArea)).toBeLessThan(0.05);
});

test('nothing gives nothing; what does not fit is refused', () => {
  const tally = ensembleTally(input);
  expect(tally.summary()).toMatchObject({ replicates: 0, recovery: [], restrictedMean: undefined, fan: [] });
  const [{ result }] = replicates(1);
  expect(() => tally.add(result)).toThrow('Found no closing years; the maps need 192');
  expect(() => tally.add(result, new Int16Array(5))).toThrow('Found 5 closing years');
  expect(() => tally.add({ ...result, recoveredYear: 2050 }, new Int16Array(192))).toThrow(
    'Recovered in 2050',
  );
  expect(() => ensembleTally({ ...input, years: 5 }).add(result)).toThrow(
    "The series runs from 2020 over 13 years' ends; expected 2020 to 2025",
  );
  expect(tally.summary().replicates).toBe(0);
});
