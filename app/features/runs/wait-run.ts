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

/** Most runs of Wait that are fetched to find the one that shares weather and luck. */
const mostCandidates = 6;

/**
 * The runs of Wait that may be set beside a run: the newest finished ones that, as far as the list tells, may share its
 * outlook, future and luck. `sameOutlook` on the whole run says which one does.
 */
export function waitRunsFor(
  run: Pick<Run, 'id' | 'optionId' | 'seed' | 'mode' | 'surveyYear' | 'years'>,
  runs: readonly RunSummary[],
  waitId: string | undefined,
): RunSummary[] {
  if (waitId === undefined || run.optionId === waitId) return [];
  return runs
    .filter(
      (other) =>
        other.id !== run.id &&
        other.optionId === waitId &&
        other.status === 'finished' &&
        other.seed === run.seed &&
        other.mode === run.mode &&
        other.surveyYear === run.surveyYear &&
        other.years === run.years,
    )
    .slice(0, mostCandidates);
}
