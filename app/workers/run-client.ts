import { proxy, releaseProxy, transfer, wrap } from 'comlink';
import { groundBuffers, type RunInput, type RunListener, type RunOutcome } from './run-loop.ts';
import type { PageListener, RunWorkerFace } from './run-worker.ts';

/** The run was cancelled by its caller. */
export class RunCancelled extends Error {
  override name = 'RunCancelled';
}
/** The worker died, or what it sent could not be read. */
export class RunWorkerDied extends Error {
  override name = 'RunWorkerDied';
}

export interface RunHandle {
  /**
   * Comes when the run reaches its horizon.
   * @throws RunCancelled, RunWorkerDied, what the engine threw (name, message and stack as they were), or what
   * `onYear` rejected with
   */
  readonly result: Promise<RunOutcome>;
  /** Stops after the year that is being worked on. */
  pause(): void;
  resume(): void;
  /** One more year, then stands still. */
  step(): void;
  /** Ends the worker at once; years already handed over stay with whoever has them. */
  cancel(): void;
}

export interface RunClientOptions {
  readonly createWorker?: () => Worker;
  /** where the browser has none (plain http), a worker that dies without an event goes unnoticed */
  readonly locks?: LockManager | undefined;
}

const startWorker = () =>
  new Worker(new URL('./run-worker.ts', import.meta.url), { type: 'module', name: 'run' });

/**
 * Starts a run in a worker of its own.
 *
 * The arrays of a ready `input.ground` are handed over: they are empty afterwards, so give copies of what is still
 * needed.
 * At most four years are on their way at any time: a year is acknowledged when `listener.onYear` (or its promise)
 * returns, so a slow saver slows the run instead of filling memory.
 */
export function startRun(input: RunInput, listener: RunListener, options: RunClientOptions = {}): RunHandle {
  const { createWorker = startWorker, locks = globalThis.navigator?.locks } = options;
  const worker = createWorker();
  const remote = wrap<RunWorkerFace>(worker);
  const watch = new AbortController();
  // Both come in secure contexts alone.
  const lock = locks && `run-${crypto.randomUUID()}`;
  let over = false;
  let refusal: { reason: unknown } | undefined;
  let fail!: (reason: unknown) => void;
  const failed = new Promise<never>((_, reject) => (fail = reject));

  const died = (event: Event) => {
    const { error, message } = event as Partial<{ error: unknown; message: string }>;
    const reason = error instanceof Error ? `${error.name}: ${error.message}` : message;
    fail(new RunWorkerDied(`The run’s worker stopped: ${reason || 'it could not be loaded or read'}`));
  };
  worker.addEventListener('error', died);
  worker.addEventListener('messageerror', died);

  const end = () => {
    if (over) return;
    over = true;
    watch.abort();
    worker.removeEventListener('error', died);
    worker.removeEventListener('messageerror', died);
    remote[releaseProxy]();
    worker.terminate();
  };

  async function work(): Promise<RunOutcome> {
    const heard: PageListener = {
      onYear: async (event) => {
        if (over) return;
        try {
          await listener.onYear(event);
        } catch (reason) {
          refusal = { reason };
          throw reason;
        }
      },
      onProgress: (progress) => {
        if (over) return;
        // The worker holds the lock before it says anything.
        if (progress.stepsDone === 0) watchOver();
        listener.onProgress?.(progress);
      },
      onStandstill: () => {
        if (!over) listener.onStandstill?.();
      },
    };
    try {
      return await remote.run(transfer(input, groundBuffers(input.ground)), proxy(heard), lock);
    } catch (reason) {
      // The listener's own error, with its class and fields, rather than the copy that crossed twice.
      throw refusal ? refusal.reason : reason;
    }
  }

  function watchOver() {
    if (!locks || !lock) return;
    locks
      .request(lock, { signal: watch.signal }, () => {
        fail(new RunWorkerDied('The run’s worker stopped without a word, most likely for lack of memory'));
      })
      .catch(() => undefined); // aborted: the run is over
  }

  const tell = (call: () => Promise<unknown>) => {
    if (!over) call().catch(fail);
  };
  return {
    result: Promise.race([work(), failed]).finally(end),
    pause: () => {
      tell(() => remote.pause());
    },
    resume: () => {
      tell(() => remote.resume());
    },
    step: () => {
      tell(() => remote.step());
    },
    cancel: () => {
      fail(new RunCancelled('The run was cancelled'));
      end();
    },
  };
}
