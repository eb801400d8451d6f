import type { RunResult } from '#sim-core/spec/run-result.ts';
import { closingMaps, type ClosingMaps } from './closing-maps.ts';
import { coverFan } from './cover-fan.ts';
import {
  kaplanMeier,
  medianInterval,
  medianTime,
  restrictedMean,
  type CurvePoint,
  type TimeCount,
} from './kaplan-meier.ts';
import { beforeDrought, firstToCome, nextDroughtYear, type BeforeDrought } from './next-drought.ts';
import type { Interval } from './proportion.ts';

export interface EnsembleInput {
  readonly surveyYear: number;
  readonly years: number;
  /** largest area that can be covered, m²: ΣK × cell area */
  readonly mostArea: number;
  /** index at or below which a year counts as the next drought */
  readonly droughtThreshold: number;
  /** cells of the map; maps are kept where this is given */
  readonly cells?: number;
  /** years that the maps keep; all from the survey on unless said */
  readonly mapYears?: readonly number[];
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
 * The statistics of one option's replicates, taken in one by one in any order. Memory follows the horizon and the map,
 * not the number of replicates.
 */
export interface EnsembleTally {
  /** @param closing the run's closing years; needed where maps are kept */
  add(result: Pick<RunResult, 'series' | 'recoveredYear'>, closing?: Int16Array): void;
  /** @param level of every interval and band, 0.95 unless said */
  summary(level?: number): EnsembleSummary;
  readonly maps: ClosingMaps | undefined;
}

export function ensembleTally(input: EnsembleInput): EnsembleTally {
  const { surveyYear, years, mostArea, droughtThreshold, cells } = input;
  const everyYear = Array.from({ length: years + 1 }, (_, i) => surveyYear + i);
  const fan = coverFan(years + 1, mostArea);
  const maps = cells === undefined ? undefined : closingMaps(cells, input.mapYears ?? everyYear);
  /** replicates by years from the survey to recovery */
  const recovered = new Uint32Array(years + 1);
  const first = { recovery: 0, drought: 0, neither: 0 };
  let open = 0;

  return {
    maps,
    add({ series, recoveredYear }, closing) {
      const ends = series.filter((row) => Number.isInteger(row.time));
      if (ends.length !== years + 1 || ends[0].time !== surveyYear)
        throw new RangeError(
          `The series runs from ${series[0]?.time} over ${ends.length} years' ends; expected ${surveyYear} to ${surveyYear + years}`,
        );
      if (maps && closing?.length !== cells)
        throw new RangeError(`Found ${closing?.length ?? 'no'} closing years; the maps need ${cells}`);
      if (recoveredYear !== null && !(recoveredYear >= surveyYear && recoveredYear <= surveyYear + years))
        throw new RangeError(
          `Recovered in ${recoveredYear}; expected a year from ${surveyYear} to ${surveyYear + years}`,
        );
      fan.add(ends.map((row) => row.coveredArea));
      if (maps && closing) maps.add(closing);
      if (recoveredYear === null) open++;
      else recovered[recoveredYear - surveyYear]++;
      first[firstToCome(recoveredYear, nextDroughtYear(series, droughtThreshold))]++;
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
