import { createRun, type RunInput } from '#sim-core/run/create-run.ts';
import type { RunResult } from '#sim-core/spec/run-result.ts';

/** What is kept of a run beside its result. */
export interface Keep {
  readonly closing: boolean;
  /** years whose cover is kept, the survey's included */
  readonly coverYears: readonly number[];
}

/** What a run of an ensemble came to. */
export interface ReplicateOutcome {
  readonly result: RunResult;
  /** Int16, row-major: 0 still open, −32768 cannot hold the plant */
  readonly closing: Int16Array | undefined;
  /** C of the kept years, Float32, row-major */
  readonly covers: ReadonlyMap<number, Float32Array>;
}

/**
 * Runs a specification to its horizon.
 *
 * @param onStep told after each step how many are done
 * @throws RunProblem naming each field that makes the run impossible
 */
export function runReplicate(input: RunInput, keep: Keep, onStep?: (done: number) => void): ReplicateOutcome {
  const run = createRun(input);
  const wanted = new Set(keep.coverYears);
  const covers = new Map<number, Float32Array>();
  for (let year: { year: number } | undefined = run.survey; year; year = run.nextYear(onStep))
    if (wanted.has(year.year)) covers.set(year.year, run.cover());
  return { result: run.result(), closing: keep.closing ? run.closing() : undefined, covers };
}
