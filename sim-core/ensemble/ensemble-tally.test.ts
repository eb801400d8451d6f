import { describe, expect, test } from 'vitest';
import { createRun } from '#sim-core/run/create-run.ts';
import { replicateRecordSchema, type ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import type { RunResult } from '#sim-core/spec/run-result.ts';
import { gridOf, groundOf, specOf } from '#sim-core/testing/setups.ts';
import { ensembleTally } from './ensemble-tally.ts';
import { quantiles } from './quantile.ts';
import { recordReplicate } from './replicate-record.ts';

const [width, height, years, surveyYear] = [16, 12, 12, 2020];
const threshold = -2.3;

/** Replicates of a small real ensemble: droughts that come back, counts of clumps, quarterly steps or yearly ones. */
function replicates(
  count: number,
  stepsPerYear: 1 | 4 = 1,
): { result: RunResult; record: ReplicateRecord }[] {
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
    return { result: run.result(), record: recordReplicate(run.result(), spec, threshold) };
  });
}

const input = { surveyYear, years, mostArea: width * height };

describe('a real ensemble', () => {
  const drawn = replicates(40);
  const tally = ensembleTally(input);
  drawn.forEach(({ record }) => tally.add(record));
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
  test('does not depend on the order', () => {
    const back = ensembleTally(input);
    drawn.toReversed().forEach(({ record }) => back.add(record));
    expect(back.summary()).toEqual(summary);
  });
});

test('a record holds what its result says, from quarterly steps too', () => {
  const [{ result, record }] = replicates(1, 4);
  expect(record.coveredArea).toHaveLength(years + 1);
  expect(record.coveredArea[3]).toBe(result.series[12].coveredArea);
  const second = result.series.slice(5, 9);
  expect(record.droughtIndex[1]).toBe(Math.min(...second.map((row) => row.droughtIndex!)));
  const sum = (of: 'lostToDrought' | 'lostToEvents') =>
    result.series.reduce((total, row) => total + row[of], 0);
  expect(record.lost.drought).toBeCloseTo(sum('lostToDrought'), 9);
  expect(record.lost.drought).toBeGreaterThan(0);
  expect(record).toMatchObject({ replicate: 0, digest: result.digest, recoveredYear: result.recoveredYear });
  const dry = result.series.find((row) => row.droughtIndex !== null && row.droughtIndex <= threshold);
  expect(record.droughtYear).toBe(dry ? Math.ceil(dry.time) : null);
  expect(replicateRecordSchema.parse(record)).toEqual(record);
});

test('nothing gives nothing; what does not fit is refused', () => {
  const tally = ensembleTally(input);
  expect(tally.summary()).toMatchObject({ replicates: 0, recovery: [], restrictedMean: undefined, fan: [] });
  const [{ record }] = replicates(1);
  expect(() => tally.add({ ...record, recoveredYear: 2050 })).toThrow('Recovered in 2050');
  expect(() => ensembleTally({ ...input, years: 5 }).add({ ...record, recoveredYear: null })).toThrow(
    'Found 13 values; expected one at each of 6 times',
  );
  expect(tally.summary().replicates).toBe(0);
});
