import { expose, transfer, type ProxyMarked, type Remote } from 'comlink';
import { buffersOf, runReplicate, type Keep } from '#sim-core/ensemble/replicate.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import { groundOf } from './run-ground.ts';
import type { RunInput } from './run-loop.ts';

let stand: { readonly grid: Grid; readonly ground: Ground } | undefined;
const sayEvery = 200;

const face = {
  /** Builds the ground that all replicates of this worker stand on. */
  prepare: async (input: RunInput) => {
    stand = { grid: input.grid, ground: await groundOf(input) };
  },
  /** @param onStep told now and then how many steps are done */
  run: (spec: RunSpec, keep: Keep, onStep: Remote<((done: number) => void) & ProxyMarked>) => {
    if (!stand) throw new Error('A replicate came before its ground.');
    let saidAt = performance.now();
    try {
      const outcome = runReplicate({ spec, ...stand }, keep, (done) => {
        const now = performance.now();
        if (now - saidAt < sayEvery) return;
        saidAt = now;
        void onStep(done);
      });
      return transfer({ outcome }, buffersOf(outcome));
    } catch (error) {
      // As plain data: the class of a thrown error does not cross.
      if (error instanceof RunProblem) return { refused: error.problems };
      throw error;
    }
  },
};
export type ReplicateWorkerFace = typeof face;

expose(face);
