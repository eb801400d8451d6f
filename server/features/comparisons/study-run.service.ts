import { replicateSpec, type ComparisonPlan } from '#contract/comparisons.ts';
import { mostStudyRuns } from '#contract/studies.ts';
import { studyKeys } from '#sim-core/matters/study-run.ts';
import { allParameters, anyRateNames, processOf } from '#sim-core/spec/all-parameters.ts';
import { studyRunSchema, type StudyRun } from '#sim-core/spec/study-run.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { fieldProblem, ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { requireEnsemble, type EnsembleParams } from './ensemble.service.ts';
import { countStudyRuns, insertStudyRuns, storedStudyRuns, studyRunsOf } from './study-run.repository.ts';

/**
 * Stores runs of a study. They change nothing of the comparison itself, so they may come after its decision too. Those
 * that are stored already with the same digest are passed over. Returns how many there then are.
 *
 * @throws ProblemError at `runs.N.…`; `digest-mismatch` where a stored one came to another digest; `conflict` when there
 * are too many
 */
export function putStudyRuns(
  services: Services,
  params: EnsembleParams,
  runs: readonly StudyRun[],
): Promise<{ done: number }> {
  return services.write(async (manager) => {
    const { plan, address } = await requireEnsemble(manager, params);
    const base = replicateSpec(plan, address.option, address.outlook, 0);
    runs.forEach((run, i) => refuseRun(run, `runs.${i}`, plan, base.processes));
    const keyOf = studyKeys(base);
    const byKey = new Map(runs.map((run) => [keyOf(run.replicate, run.rates), run]));
    const stored = await storedStudyRuns(manager, address, [...byKey.keys()]);
    for (const { key, digest } of stored) {
      const found = byKey.get(key)!;
      if (found.digest !== digest)
        throw new ProblemError(
          'digest-mismatch',
          `A run of the study came to ${found.digest.slice(0, 12)}…; stored is ${digest.slice(0, 12)}…. The same run must come to the same digest: load the page again, so that all tabs use the same engine.`,
        );
      byKey.delete(key);
    }
    const before = await countStudyRuns(manager, address);
    if (before + byKey.size > mostStudyRuns)
      throw new ProblemError(
        'conflict',
        `Found ${before} study runs of this option; up to ${mostStudyRuns} are kept. Study it in a comparison of its own.`,
      );
    await insertStudyRuns(
      manager,
      [...byKey].map(([key, run], i) => ({
        ...address,
        key,
        place: before + i,
        digest: run.digest,
        run: JSON.stringify(run),
      })),
    );
    return { done: before + byKey.size };
  });
}

function refuseRun(
  run: StudyRun,
  at: string,
  { common: { surveyYear, years } }: ComparisonPlan,
  processes: ComparisonPlan['common']['processes'],
): void {
  for (const name of ['coveredArea', 'closedShare'] as const)
    if (run[name].length !== years + 1)
      throw fieldProblem(`${at}.${name}`, `Found ${run[name].length} values; expected ${years + 1}`);
  const { recoveredYear: year } = run;
  if (year !== null && !(year >= surveyYear && year <= surveyYear + years))
    throw fieldProblem(
      `${at}.recoveredYear`,
      `Found ${year}; expected ${surveyYear} to ${surveyYear + years}`,
    );
  for (const name of anyRateNames) {
    const value = run.rates[name];
    if (value === undefined) continue;
    const { label, min, max } = allParameters[name];
    const part = processOf(name);
    if (part && !processes[part])
      throw fieldProblem(`${at}.rates.${name}`, `Belongs to ${part}, which are off in this comparison`);
    if (!(value >= min && value <= max))
      throw fieldProblem(
        `${at}.rates.${name}`,
        `Found ${value}; ${label} must lie between ${min} and ${max}`,
      );
  }
}

export async function getStudyRuns(
  manager: Manager,
  params: EnsembleParams,
  page: { offset: number; limit: number },
): Promise<{ runs: { key: string; run: StudyRun }[]; total: number }> {
  const { address } = await requireEnsemble(manager, params);
  const [rows, total] = await studyRunsOf(manager, address, page);
  return { runs: rows.map(({ key, run }) => ({ key, run: readJson(studyRunSchema, run) })), total };
}
