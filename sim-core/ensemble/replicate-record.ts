import { ratesOfRun, type RatesInput } from '#sim-core/belief/rates-of-run.ts';
import { lostYear } from '#sim-core/measure/recovery.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import type { RunResult, SeriesRow } from '#sim-core/spec/run-result.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import { nextDroughtYear } from './next-drought.ts';

/**
 * What is kept of a replicate's result.
 *
 * @param droughtThreshold index at or below which a year counts as the next drought
 */
export function recordReplicate(
  { series, recoveredYear, digest }: Pick<RunResult, 'series' | 'recoveredYear' | 'digest'>,
  spec: Pick<RunSpec, 'surveyYear' | 'years' | 'stepsPerYear' | 'target'> & RatesInput,
  droughtThreshold: number,
): ReplicateRecord {
  const { replicate, years, stepsPerYear, target } = spec;
  const steps = series.slice(1);
  const total = (of: (row: SeriesRow) => number) => steps.reduce((sum, row) => sum + of(row), 0);
  return {
    replicate,
    digest,
    recoveredYear,
    lostYear: lostYear(series, target),
    droughtYear: nextDroughtYear(series, droughtThreshold),
    coveredArea: Array.from({ length: years + 1 }, (_, i) => series[i * stepsPerYear].coveredArea),
    droughtIndex: Array.from({ length: years }, (_, i) =>
      Math.min(...steps.slice(i * stepsPerYear, (i + 1) * stepsPerYear).map((row) => row.droughtIndex ?? 0)),
    ),
    lost: {
      drought: total((row) => row.lostToDrought),
      background: total((row) => row.lostToBackground),
      grazing: total((row) => row.lostToGrazing),
      events: total((row) => row.lostToEvents),
    },
    drawn: ratesOfRun(spec).drawn,
  };
}
