import { workerData, type MessagePort } from 'node:worker_threads';
import { move, transferableSymbol, valueSymbol } from 'piscina';
import { buffersOf, runReplicate, type Keep, type ReplicateOutcome } from '#sim-core/ensemble/replicate.ts';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';

/** What every worker of a pool stands on, in memory that all share. */
export interface RunWorkerData {
  readonly grid: Grid;
  readonly ground: Ground;
}

export interface RunTask {
  readonly spec: RunSpec;
  readonly keep: Keep;
  /** told how many steps are done: 0 at the start, then now and then */
  readonly port: MessagePort;
}

/** An error of the engine as plain data: a thrown one would read as the worker's. */
export type RunAnswer =
  { outcome: ReplicateOutcome } | { refused: readonly FieldProblem[] } | { failed: unknown };

const sayEvery = 100;
const { grid, ground } = workerData as RunWorkerData;

/** The shell around a run: one message in, one out, its maps handed over. */
export default function work({ spec, keep, port }: RunTask): unknown {
  port.postMessage(0);
  let saidAt = performance.now();
  const onStep = (done: number) => {
    const now = performance.now();
    if (now - saidAt < sayEvery) return;
    saidAt = now;
    port.postMessage(done);
  };
  try {
    const outcome = runReplicate({ spec, grid, ground }, keep, onStep);
    return handed({ outcome }, outcome);
  } catch (error) {
    const answer: RunAnswer = error instanceof RunProblem ? { refused: error.problems } : { failed: error };
    return answer;
  }
}

/** `answer` with the maps in it transferred, not copied. */
function handed(answer: RunAnswer, outcome: ReplicateOutcome): unknown {
  return move({ [transferableSymbol]: buffersOf(outcome), [valueSymbol]: answer });
}
