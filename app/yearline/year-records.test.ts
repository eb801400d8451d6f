// @vitest-environment node
import { describe, expect, it } from 'vitest';
import type { SeriesRow } from '#sim-core/spec/run-result.ts';
import { yearRecords } from './year-records.ts';

const row = (
  time: number,
  droughtIndex: number | null,
  closingArea: number,
  recoveredShare: number,
): SeriesRow => ({
  time,
  droughtIndex,
  closingArea,
  recoveredShare,
  coveredArea: recoveredShare * 100,
  occupiedArea: 0,
  closedArea: 10 * recoveredShare,
  edgeLength: 0,
  patches: 0,
  largestPatchArea: 0,
  lostToDrought: 0,
  lostToBackground: 0,
  lostToGrazing: 0,
  lostToEvents: 0,
});

describe('yearRecords', () => {
  it('sums what happens in a year and keeps what stands at its end', () => {
    const records = yearRecords([
      row(2026, null, 50, 0.2),
      row(2026.5, -1, 3, 0.25),
      row(2027, -2.5, 4, 0.3),
      row(2027.5, 1, 5, 0.4),
    ]);
    expect(records).toEqual([
      { year: 2026, droughtIndex: null, coverShare: 0.2, closingArea: 50, closedArea: 2, coveredArea: 20 },
      { year: 2027, droughtIndex: -2.5, coverShare: 0.3, closingArea: 7, closedArea: 3, coveredArea: 30 },
      { year: 2028, droughtIndex: 1, coverShare: 0.4, closingArea: 5, closedArea: 4, coveredArea: 40 },
    ]);
  });

  it('keeps twelve steps in their year in spite of rounding', () => {
    const steps = Array.from({ length: 12 }, (_, i) => row(2026 + (i + 1) / 12, 0, 1, 0.5));
    const third = Array.from({ length: 12 }, (_, i) => row(2027 + (i + 1) * (1 / 12), 0, 1, 0.5));
    expect(yearRecords([...steps, ...third]).map((r) => [r.year, r.closingArea])).toEqual([
      [2027, 12],
      [2028, 12],
    ]);
  });
});
