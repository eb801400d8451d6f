import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { coverFan } from './cover-fan.ts';
import {
  kaplanMeier,
  medianInterval,
  medianTime,
  restrictedMean,
  type CurvePoint,
  type TimeCount,
} from './kaplan-meier.ts';
import { beforeDrought, firstToCome, type BeforeDrought } from './next-drought.ts';
import type { Interval } from './proportion.ts';

export interface EnsembleInput {
  readonly surveyYear: number;
  readonly years: number;
  /** largest area that can be covered, m²: ΣK × cell area */
  readonly mostArea: number;
}

/** What an ensemble comes to. Times are years since the survey. */
export interface EnsembleSummary {
  readonly replicates: number;
  /** share still open over time; runs that do not recover by the horizon are censored there, never dropped */
  readonly recovery: CurvePoint[];
  /** undefined where more than half are open at the horizon */
  readonly medianTime: number | undefined;
  readonly medianInterval: { readonly low: number | undefined; readonly high: number | undefined };
  /** mean time to recovery, cut at the horizon */
  readonly restrictedMean: (Interval & { readonly standardError: number }) | undefined;
  readonly beforeDrought: BeforeDrought;
  /** covered area, m², at the survey and at the end of each year: the 5, 25, 50, 75 and 95 % quantiles; none of nothing */
  readonly fan: Float64Array[];
}

/**
 * The statistics of one option's replicates, taken in one by one in any order. Memory follows the horizon, not the number
 * of replicates.
 */
export interface EnsembleTally {
  add(record: Pick<ReplicateRecord, 'coveredArea' | 'recoveredYear' | 'droughtYear'>): void;
  /** @param level of every interval and band, 0.95 unless said */
  summary(level?: number): EnsembleSummary;
}

export function ensembleTally(input: EnsembleInput): EnsembleTally {
  const { surveyYear, years, mostArea } = input;
  const fan = coverFan(years + 1, mostArea);
  /** replicates by years from the survey to recovery */
  const recovered = new Uint32Array(years + 1);
  const first = { recovery: 0, drought: 0, neither: 0 };
  let open = 0;

  return {
    add({ coveredArea, recoveredYear, droughtYear }) {
      if (recoveredYear !== null && !(recoveredYear >= surveyYear && recoveredYear <= surveyYear + years))
        throw new RangeError(
          `Recovered in ${recoveredYear}; expected a year from ${surveyYear} to ${surveyYear + years}`,
        );
      fan.add(coveredArea);
      if (recoveredYear === null) open++;
      else recovered[recoveredYear - surveyYear]++;
      first[firstToCome(recoveredYear, droughtYear)]++;
    },
    summary(level = 0.95) {
      const counts: TimeCount[] = Array.from(recovered, (events, time) => ({
        time,
        events,
        censored: time === years ? open : 0,
      }));
      const replicates = fan.count;
      const recovery = replicates > 0 ? kaplanMeier(counts, { level }) : [];
      return {
        replicates,
        recovery,
        medianTime: medianTime(recovery),
        medianInterval: medianInterval(recovery),
        restrictedMean: replicates > 0 ? restrictedMean(recovery, years, level) : undefined,
        beforeDrought: beforeDrought(first, level),
        fan: replicates > 0 ? fan.quantiles() : [],
      };
    },
  };
}
