import { proxy, releaseProxy, wrap, type Remote } from 'comlink';
import type { Keep, ReplicateOutcome } from '#sim-core/ensemble/replicate.ts';
import { createRunner, WorkerDied, type Attempt, type Runner } from '#sim-core/ensemble/runner.ts';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import type { ReplicateWorkerFace } from './replicate-worker.ts';
import type { RunInput } from './run-loop.ts';

/** A runner on the browser's workers. */
export interface ReplicatePool extends Runner {
  /** Ends its workers. */
  close(): void;
}

export interface ReplicatePoolParts {
  readonly createWorker?: () => Worker;
  /** as many as there are cores, unless said */
  readonly workers?: number;
}

interface Hand {
  readonly worker: Worker;
  readonly remote: Remote<ReplicateWorkerFace>;
  /** comes when the worker stands on its ground */
  readonly ready: Promise<void>;
  /** never comes; rejects when the worker dies */
  readonly death: Promise<never>;
  end(): void;
}

const startWorker = () =>
  new Worker(new URL('./replicate-worker.ts', import.meta.url), { type: 'module', name: 'replicates' });

/**
 * Workers that run replicates on one ground, one at a time each. A worker is started when there is a replicate for it;
 * one that dies is replaced by the next.
 *
 * @param input whose layers every worker builds the ground from
 */
export function createReplicatePool(input: RunInput, parts: ReplicatePoolParts = {}): ReplicatePool {
  const { createWorker = startWorker, workers = navigator.hardwareConcurrency || 2 } = parts;
  const idle: Hand[] = [];
  const all = new Set<Hand>();

  function hire(): Hand {
    const worker = createWorker();
    const remote = wrap<ReplicateWorkerFace>(worker);
    let fail!: (why: Error) => void;
    const death = new Promise<never>((_, reject) => (fail = reject));
    death.catch(() => undefined);
    const died = (event: Event) => {
      const { message } = event as Partial<ErrorEvent>;
      fail(new WorkerDied(`A worker stopped: ${message || 'it could not be loaded or read'}`));
    };
    worker.addEventListener('error', died);
    worker.addEventListener('messageerror', died);
    const hand: Hand = {
      worker,
      remote,
      ready: remote.prepare(input),
      death,
      end: () => {
        if (!all.delete(hand)) return;
        worker.removeEventListener('error', died);
        worker.removeEventListener('messageerror', died);
        remote[releaseProxy]();
        worker.terminate();
        fail(new WorkerDied('The worker was ended'));
      },
    };
    all.add(hand);
    return hand;
  }

  async function work(hand: Hand, spec: RunSpec, keep: Keep, onStep: (done: number) => void) {
    await Promise.race([hand.ready, hand.death]);
    const said = await Promise.race([hand.remote.run(spec, keep, proxy(onStep)), hand.death]);
    if ('refused' in said) throw new RunProblem(said.refused);
    return said.outcome satisfies ReplicateOutcome;
  }

  function begin(spec: RunSpec, keep: Keep, onStep: (done: number) => void): Attempt {
    const hand = idle.pop() ?? hire();
    const outcome = work(hand, spec, keep, onStep).then(
      (made) => {
        if (all.has(hand)) idle.push(hand);
        return made;
      },
      (error: unknown) => {
        if (error instanceof RunProblem && all.has(hand)) idle.push(hand);
        else hand.end();
        throw error;
      },
    );
    return {
      outcome,
      cancel: () => {
        hand.end();
      },
    };
  }

  return {
    ...createRunner({ workers, begin, now: () => performance.now() }),
    close: () => {
      idle.length = 0;
      for (const hand of [...all]) hand.end();
    },
  };
}
