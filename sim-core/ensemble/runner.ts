import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import type { Keep, ReplicateOutcome } from './replicate.ts';

/** How far a list of runs is. */
export interface RunnerProgress {
  readonly runsDone: number;
  readonly runs: number;
  readonly stepsDone: number;
  readonly steps: number;
  /** by the pace so far; undefined until anything is done */
  readonly secondsLeft: number | undefined;
}

/** Who hears of the runs. Calls come one at a time; what a call throws, or rejects with, ends all runs. */
export interface RunnerListener {
  /** Until this returns, or its promise does, the outcome counts as held. */
  onResult(outcome: ReplicateOutcome, index: number): void | Promise<void>;
  /** A run that cannot be: the engine refused it (RunProblem), or its worker died as often as it was tried. */
  onFailure(error: unknown, index: number): void | Promise<void>;
  onProgress?(progress: RunnerProgress): void;
}

export interface RunnerOptions {
  readonly keep: Keep;
  /** hand over by place in the list, not as they come; early ones are held */
  readonly inOrder?: boolean;
}

export interface RunnerJob {
  /**
   * Comes when every run has been handed over or has failed.
   * @throws RunsCancelled, or what the listener threw
   */
  readonly finished: Promise<void>;
  /** Ends all runs at once; nothing is handed over afterwards. */
  cancel(): void;
}

/**
 * Maps independent runs over one ground to their outcomes, wherever it computes them. Outcomes do not hang on how many
 * run at once.
 */
export interface Runner {
  /** runs at once */
  readonly workers: number;
  start(specs: readonly RunSpec[], listener: RunnerListener, options: RunnerOptions): RunnerJob;
}

/** One run that is being computed somewhere. */
export interface Attempt {
  /** @throws WorkerDied where another attempt may succeed; anything else is the run's own fault */
  readonly outcome: Promise<ReplicateOutcome>;
  /** Ends it at once; `outcome` may then reject with anything, or never settle. */
  cancel(): void;
}

/** The place where runs are computed: all that differs between a browser, Node and machines elsewhere. */
export interface RunPlace {
  readonly workers: number;
  /** @param onStep told now and then how many of the run's steps are done */
  begin(spec: RunSpec, keep: Keep, onStep: (done: number) => void): Attempt;
  /** milliseconds, for the pace alone: no result depends on it */
  now(): number;
}

/** The worker that computed a run is gone; the run may be tried again. */
export class WorkerDied extends Error {
  override name = 'WorkerDied';
}
/** The runs were cancelled by their caller. */
export class RunsCancelled extends Error {
  override name = 'RunsCancelled';
}

/** How often a run is tried whose worker dies. */
export const attemptsOfRun = 3;
/** Outcomes that may be held, for each worker, before no other run is started. */
const heldPerWorker = 2;
const progressEvery = 100;

/** A runner that keeps all workers of a place busy. */
export function createRunner(place: RunPlace): Runner {
  return { workers: place.workers, start: (...given) => startRuns(place, ...given) };
}

function startRuns(
  place: RunPlace,
  specs: readonly RunSpec[],
  listener: RunnerListener,
  { keep, inOrder = false }: RunnerOptions,
): RunnerJob {
  const begun = place.now();
  const steps = specs.reduce((sum, spec) => sum + spec.years * spec.stepsPerYear, 0);
  /** by place in the list; what is not handed over yet */
  const stepsDone = new Map<number, number>();
  const running = new Set<Attempt>();
  const held = new Map<number, () => void | Promise<void>>();
  let next = 0;
  let turn = 0;
  let runsDone = 0;
  let stepsHandedOver = 0;
  let saidAt = -Infinity;
  let over = false;
  let handingOver = Promise.resolve();
  let waiting: (() => void)[] = [];
  let fail!: (reason: unknown) => void;
  const failed = new Promise<never>((_, reject) => (fail = reject));

  function end(reason: unknown) {
    if (over) return;
    over = true;
    fail(reason);
    for (const attempt of running) attempt.cancel();
  }

  function say() {
    const now = place.now();
    if (now - saidAt < progressEvery && runsDone < specs.length) return;
    saidAt = now;
    let done = stepsHandedOver;
    for (const n of stepsDone.values()) done += n;
    const secondsLeft = done > 0 ? ((now - begun) / 1000 / done) * (steps - done) : undefined;
    listener.onProgress?.({ runsDone, runs: specs.length, stepsDone: done, steps, secondsLeft });
  }

  function handOver(index: number) {
    handingOver = handingOver.then(async () => {
      if (over) return;
      await held.get(index)?.();
      held.delete(index);
      stepsDone.delete(index);
      stepsHandedOver += specs[index].years * specs[index].stepsPerYear;
      runsDone++;
      say();
      waiting.forEach((wake) => wake());
      waiting = [];
    });
    handingOver.catch(end);
  }

  function settle(index: number, tell: () => void | Promise<void>) {
    held.set(index, tell);
    if (!inOrder) handOver(index);
    else for (; turn < next && held.has(turn); turn++) handOver(turn);
  }

  async function outcomeOf(index: number): Promise<ReplicateOutcome> {
    for (let tried = 1; ; tried++) {
      const attempt = place.begin(specs[index], keep, (done) => {
        if (over) return;
        stepsDone.set(index, done);
        try {
          say();
        } catch (error) {
          end(error);
        }
      });
      running.add(attempt);
      try {
        return await attempt.outcome;
      } catch (error) {
        if (over || !(error instanceof WorkerDied) || tried === attemptsOfRun) throw error;
        stepsDone.delete(index);
      } finally {
        running.delete(attempt);
      }
    }
  }

  /** One of as many lines of work as there are workers. */
  async function work(): Promise<void> {
    while (!over && next < specs.length) {
      if (next - runsDone >= heldPerWorker * place.workers) {
        await new Promise<void>((wake) => waiting.push(wake));
        continue;
      }
      const index = next++;
      await outcomeOf(index).then(
        (outcome) => settle(index, () => listener.onResult(outcome, index)),
        (error: unknown) => settle(index, () => listener.onFailure(error, index)),
      );
    }
  }

  const lines = Promise.all(Array.from({ length: place.workers }, work)).then(() => handingOver);
  return {
    finished: Promise.race([lines, failed]),
    cancel: () => {
      end(new RunsCancelled('The runs were cancelled'));
    },
  };
}
