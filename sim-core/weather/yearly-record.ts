import type { DroughtRecord } from '#sim-core/spec/drought-record.ts';
import { driest, wettest } from '#sim-core/spec/limits.ts';

/** Index of a year on the Palmer scale. */
export interface YearIndex {
  readonly year: number;
  readonly index: number;
}

/** A record by year, as the fits and the weather read it. */
export interface YearlyRecord {
  /** ascending, without the years of `gaps` */
  readonly years: readonly YearIndex[];
  /** years between the first and the last that lack a value, or a month of the season */
  readonly gaps: readonly number[];
  /** years whose index was cut to the scale, −15 to 15 */
  readonly cut: readonly number[];
}

/** What a record's factor turns a value into. */
export const mapped = (value: number, factor: number): number => value * factor;

/**
 * The record by year: each year's value, or the mean over the months of its season, times the factor. A season that runs
 * over the turn of the year (October to March) belongs to the year in which it ends.
 */
export function yearlyRecord({
  values,
  factor,
  season,
}: Pick<DroughtRecord, 'values' | 'factor' | 'season'>): YearlyRecord {
  const monthly = values.some(({ month }) => month !== undefined);
  const wanted = monthly ? seasonLength(season) : 1;
  const held = new Map<number, number[]>();
  for (const { year, month, value } of values) {
    const belongs = month === undefined ? year : seasonYear(year, month, season);
    if (belongs === undefined) continue;
    held.set(belongs, [...(held.get(belongs) ?? []), value]);
  }
  const known = [...held].filter(([, some]) => some.length === wanted).sort(([a], [b]) => a - b);
  const cut: number[] = [];
  const years = known.map(([year, some]) => {
    const index = mapped(some.reduce((sum, x) => sum + x, 0) / some.length, factor);
    if (index < driest || index > wettest) cut.push(year);
    return { year, index: Math.min(wettest, Math.max(driest, index)) };
  });
  const gaps: number[] = [];
  for (let i = 1; i < years.length; i++)
    for (let year = years[i - 1].year + 1; year < years[i].year; year++) gaps.push(year);
  return { years, gaps, cut };
}

/** Months of a season. */
export const seasonLength = ({ from, to }: DroughtRecord['season']): number => ((to - from + 12) % 12) + 1;

/** The year to which a month belongs; undefined where it is not of the season. */
function seasonYear(year: number, month: number, { from, to }: DroughtRecord['season']): number | undefined {
  if (from <= to) return month >= from && month <= to ? year : undefined;
  if (month >= from) return year + 1;
  return month <= to ? year : undefined;
}
