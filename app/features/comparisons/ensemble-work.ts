import { mostOutlooks, replicateSpec, type Comparison, type ComparisonPlan } from '#contract/comparisons.ts';
import type { KnownRecords } from '#sim-core/compare/known-records.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';

/** One replicate that is to be run. */
export interface Task {
  readonly option: number;
  readonly outlook: number;
  readonly replicate: number;
}

/** Key of an ensemble among those of its comparison. */
export const ensembleKey = (option: number, outlook: number): string =>
  String(option * mostOutlooks + outlook);

/**
 * What is left to run, so that pairs are complete as early as may be: replicate by replicate, all options of one before
 * the next. A replicate whose record is known but which the maps lack is run again.
 *
 * @param inMaps numbers of the replicates that the maps of an ensemble hold
 */
export function tasksLeft(
  plan: ComparisonPlan,
  known: KnownRecords,
  inMaps: (option: number, outlook: number) => ReadonlySet<number>,
): Task[] {
  const tasks: Task[] = [];
  for (let replicate = 0; replicate < plan.replicates; replicate++)
    plan.outlooks.forEach((_, outlook) => {
      plan.options.forEach((__, option) => {
        if (!known[option][outlook].has(replicate) || !inMaps(option, outlook).has(replicate))
          tasks.push({ option, outlook, replicate });
      });
    });
  return tasks;
}

/** The run of a task. */
export const specOf = ({ plan }: Pick<Comparison, 'plan'>, task: Task): RunSpec =>
  replicateSpec(plan, task.option, task.outlook, task.replicate);
