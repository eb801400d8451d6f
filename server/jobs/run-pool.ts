import { availableParallelism } from 'node:os';
import { MessageChannel } from 'node:worker_threads';
import { Piscina } from 'piscina';
import type { Keep } from '#sim-core/ensemble/replicate.ts';
import { createRunner, WorkerDied, type Attempt, type Runner } from '#sim-core/ensemble/runner.ts';
import { groundLayers, type Ground } from '#sim-core/grid/ground.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import type { RunAnswer, RunTask, RunWorkerData } from './run-worker.ts';
import { workerFile, type WorkerFile } from './worker-file.ts';

/** A runner on this machine's cores. */
export interface RunPool extends Runner {
  /** Ends its threads. */
  close(): Promise<void>;
}

export interface RunPoolInput {
  readonly grid: Grid;
  /** copied once, into memory that all workers share */
  readonly ground: Ground;
  /** as many as there are cores, unless said */
  readonly workers?: number;
  readonly worker?: WorkerFile;
}

/** Threads that run specifications on one ground. A worker is started when there is a run for it. */
export function createRunPool(input: RunPoolInput): RunPool {
  const { grid, workers = availableParallelism(), worker = workerFile('run-worker') } = input;
  const workerData: RunWorkerData = { grid, ground: sharedGround(input.ground) };
  // A worker waits for its next run while this thread is busy with the last one; starting one anew takes longer.
  const pool = new Piscina({
    ...worker,
    workerData,
    minThreads: 0,
    maxThreads: workers,
    idleTimeout: 30_000,
  });
  /** runs that no worker has taken up yet */
  const waiting = new Set<(why: unknown) => void>();
  // A worker that fails to start tells the pool alone, and the runs that it was started for would wait for ever.
  pool.on('error', (error) => waiting.forEach((reject) => reject(error)));

  function begin(spec: RunSpec, keep: Keep, onStep: (done: number) => void): Attempt {
    const { port1, port2 } = new MessageChannel();
    const stop = new AbortController();
    let reject!: (why: unknown) => void;
    const notStarted = new Promise<never>((_, no) => (reject = no));
    waiting.add(reject);
    port1.on('message', (done: number) => {
      waiting.delete(reject);
      onStep(done);
    });
    const task: RunTask = { spec, keep, port: port2 };
    const answer = pool.run(task, { signal: stop.signal, transferList: [port2] }) as Promise<RunAnswer>;
    const outcome = Promise.race([answer, notStarted])
      .catch((error: unknown) => {
        stop.abort();
        throw new WorkerDied(
          `The run’s worker stopped: ${error instanceof Error ? error.message : String(error)}`,
        );
      })
      .finally(() => {
        waiting.delete(reject);
        port1.close();
      })
      .then((said) => {
        if ('outcome' in said) return said.outcome;
        throw 'refused' in said ? new RunProblem(said.refused) : said.failed;
      });
    return {
      outcome,
      cancel: () => {
        stop.abort();
      },
    };
  }

  return {
    ...createRunner({ workers, begin, now: () => performance.now() }),
    close: () => pool.destroy(),
  };
}

/** A copy in memory that threads share. */
function sharedGround(ground: Ground): Ground {
  const bytes = (from: Uint8Array) => {
    const to = new Uint8Array(new SharedArrayBuffer(from.byteLength));
    to.set(from);
    return to;
  };
  const { cover } = ground;
  const shared: Record<string, Uint8Array | Float32Array> = {};
  for (const layer of groundLayers) if (layer !== 'cover') shared[layer] = bytes(ground[layer]);
  shared.cover = new Float32Array(
    bytes(new Uint8Array(cover.buffer, cover.byteOffset, cover.byteLength)).buffer,
  );
  return shared as unknown as Ground;
}
