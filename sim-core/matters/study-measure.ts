import type { StudyRun } from '#sim-core/spec/study-run.ts';

/** What a study asks of each run. */
export type StudyMeasure =
  { readonly kind: 'recovery' } | { readonly kind: 'covered' | 'closed'; readonly year: number };

type Measured = Pick<StudyRun, 'recoveredYear' | 'coveredArea'> & Partial<Pick<StudyRun, 'closedShare'>>;

/**
 * What a run comes to: years from the survey to recovery, cut at the horizon where it does not come; covered area at the
 * end of a year, m²; or share of the ground closed by then. NaN where the run does not tell it.
 */
export function measureOf(
  run: Measured,
  measure: StudyMeasure,
  { surveyYear, years }: { surveyYear: number; years: number },
): number {
  if (measure.kind === 'recovery')
    return run.recoveredYear === null ? years : Math.min(years, run.recoveredYear - surveyYear);
  const series = measure.kind === 'covered' ? run.coveredArea : run.closedShare;
  return series?.[measure.year - surveyYear] ?? NaN;
}
