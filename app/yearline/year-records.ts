import type { SeriesRow } from '#sim-core/spec/run-result.ts';

/** What the yearline shows of one year of a run. */
export interface YearRecord {
  readonly year: number;
  /** index of the year's driest step; null at the survey */
  readonly droughtIndex: number | null;
  /** ΣC / ΣC* at the end of the year */
  readonly coverShare: number;
  /** area that closed in this year, m² */
  readonly closingArea: number;
  /** area that had closed at some time by the end of this year, m²; it never falls */
  readonly closedArea: number;
  /** covered area at the end of the year, m² */
  readonly coveredArea: number;
}

/**
 * One record a year, ascending, from a run's series: stocks as they stand at the year's end, flows summed over its
 * steps, the drought index of its driest step (that is the one that kills).
 */
export function yearRecords(rows: readonly SeriesRow[]): YearRecord[] {
  const records = new Map<number, YearRecord>();
  for (const row of rows) {
    // A step that ends within the year belongs to the year it runs in; rounding keeps 2027 + 12/12 in 2028.
    const year = Math.ceil(Math.round(row.time * 1000) / 1000);
    const before = records.get(year);
    const indices = [before?.droughtIndex, row.droughtIndex].filter((x) => typeof x === 'number');
    records.set(year, {
      year,
      droughtIndex: indices.length ? Math.min(...indices) : null,
      coverShare: row.recoveredShare,
      closingArea: (before?.closingArea ?? 0) + row.closingArea,
      closedArea: row.closedArea,
      coveredArea: row.coveredArea,
    });
  }
  return [...records.values()];
}
