import type { Run, RunSummary } from '#contract/runs.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';

/** Whether two runs lived through the same weather with the same luck, so that their difference is what the works did. */
export function sameOutlook(a: RunSpec, b: RunSpec): boolean {
  const part = ({
    mode,
    seed,
    replicate,
    surveyYear,
    years,
    stepsPerYear,
    droughtIndex,
    trend,
    losses,
    processes,
    rates,
    layers,
  }: RunSpec) =>
    JSON.stringify([
      ...[mode, seed, replicate, surveyYear, years, stepsPerYear],
      ...[droughtIndex, trend, losses, processes, rates, layers],
    ]);
  return part(a) === part(b);
}

/**
 * The run of Wait to set beside a run: the newest finished one that, as far as the list tells, may share its outlook
 * and luck. `sameOutlook` on the whole run says whether it does.
 */
export function waitRunFor(
  run: Pick<Run, 'id' | 'optionId' | 'seed' | 'mode' | 'surveyYear' | 'years'>,
  runs: readonly RunSummary[],
  waitId: string | undefined,
): RunSummary | undefined {
  if (waitId === undefined || run.optionId === waitId) return undefined;
  return runs.find(
    (other) =>
      other.id !== run.id &&
      other.optionId === waitId &&
      other.status === 'finished' &&
      other.seed === run.seed &&
      other.mode === run.mode &&
      other.surveyYear === run.surveyYear &&
      other.years === run.years,
  );
}
