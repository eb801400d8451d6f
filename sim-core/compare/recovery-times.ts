import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';

/** The years that a comparison spans. */
export interface ComparedYears {
  readonly common: { readonly surveyYear: number; readonly years: number };
}

/** Years from the survey to recovery of these replicates, in their order, cut at the horizon where it does not come. */
export const recoveryTimes = (
  { common: { surveyYear, years } }: ComparedYears,
  records: ReadonlyMap<number, ReplicateRecord>,
  replicates: readonly number[],
): Float64Array =>
  Float64Array.from(replicates, (replicate) => {
    const year = records.get(replicate)?.recoveredYear ?? null;
    return year === null ? years : Math.min(years, year - surveyYear);
  });
