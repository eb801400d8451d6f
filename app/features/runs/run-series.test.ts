// @vitest-environment node
import { describe, expect, it } from 'vitest';
import type { SeriesRow } from '#sim-core/spec/run-result.ts';
import { driestByYear, lossesIn } from './run-series.ts';

describe('driestByYear', () => {
  it('takes the driest step of each year', () => {
    const run = { surveyYear: 2026, seed: 'sallow', replicate: 0 };
    const driest = (years: number, stepsPerYear: 1 | 2 | 4, droughtIndex: number | number[]) =>
      driestByYear({ ...run, years, stepsPerYear, droughtIndex });
    expect(driest(2, 2, [0, -3, 1, 2])).toEqual([-3, 1]);
    expect(driest(2, 4, [-1, -2])).toEqual([-1, -2]);
    expect(driest(3, 1, -0.5)).toEqual([-0.5, -0.5, -0.5]);
  });
});

describe('lossesIn', () => {
  const row = (time: number, droughtIndex: number | null, lost: number) =>
    ({
      time,
      droughtIndex,
      lostToDrought: lost,
      lostToBackground: 1,
      lostToGrazing: lost / 2,
      lostToEvents: 0,
    }) as SeriesRow;
  const rows = [row(2026, null, 99), row(2026.5, 0, 2), row(2027, 0, 3), row(2027.5, 0, 4)];
  it('sums the steps of a year, and has nothing to say of the survey', () => {
    expect(lossesIn(rows, 2027)).toEqual({ drought: 5, background: 2, grazing: 2.5, events: 0 });
    expect(lossesIn(rows, 2028)).toEqual({ drought: 4, background: 1, grazing: 2, events: 0 });
    expect(lossesIn(rows, 2026)).toBeUndefined();
  });
});
