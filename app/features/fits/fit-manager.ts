import type { Fit, FitState } from '#contract/fits.ts';
import type { ReplicateOutcome } from '#sim-core/ensemble/replicate.ts';
import type { Runner, RunnerJob } from '#sim-core/ensemble/runner.ts';
import { nextProposals, takeRun, type AbcState } from '#sim-core/fit/abc.ts';
import { runOfProposal } from '#sim-core/fit/fit-run.ts';
import type { FitTarget } from '#sim-core/fit/fit-target.ts';
import { RunProblem } from '#sim-core/index.ts';
import { errorText } from '#app/lib/api-client.ts';
import { createLiveList } from '#app/lib/live-list.ts';
import { saveWithRetry, troubleWords } from '#app/lib/save-with-retry.ts';
import type { PackedLayers, RunInput } from '#app/workers/run-loop.ts';
import { abcPlanOf } from './abc-plan.ts';
import type { FitServer } from './change-fit.ts';

export type FitPhase = 'loading' | 'running' | 'saving' | 'paused' | 'done' | 'failed';

/** A fit that this tab works on. */
export interface LiveFit {
  readonly fitId: string;
  readonly siteId: string;
  readonly name: string;
  readonly phase: FitPhase;
  /** undefined until it has been fetched */
  readonly state: AbcState | undefined;
  readonly mostRuns: number;
  /** s, if it should take all runs that it may; undefined until the pace is known */
  readonly secondsLeft: number | undefined;
  /** why saving waits, while it does */
  readonly trouble: string | undefined;
  readonly error: string | undefined;
}

export interface FitManagerParts {
  readonly server: FitServer;
  readonly createPool: (input: RunInput) => Runner & { close(): void };
  readonly wait: (milliseconds: number, signal: AbortSignal) => Promise<void>;
  /** milliseconds */
  readonly now: () => number;
  readonly onChange?: (active: number) => void;
}

export interface WorkOnFit {
  readonly fit: Fit;
  readonly loadLayers: () => Promise<PackedLayers>;
  readonly loadTarget: () => Promise<FitTarget>;
  /** Hears what the server knows of it when the work stands still. */
  readonly onRecord: (fit: Fit) => void;
}

export interface FitManager {
  readonly subscribe: (listener: () => void) => () => void;
  readonly list: () => readonly LiveFit[];
  get(fitId: string): LiveFit | undefined;
  /** Works on a fit from what is stored of it. */
  start(work: WorkOnFit): void;
  /** Stands still once what is done is saved; runs in the middle are made again later. */
  pause(fitId: string): void;
  /** Ends it by hand: what is done is kept and shown. */
  stop(fitId: string): void;
}

const atWork: readonly FitPhase[] = ['loading', 'running', 'saving'];
export const isFitting = (live: Pick<LiveFit, 'phase'> | undefined): boolean =>
  live !== undefined && atWork.includes(live.phase);

/** Runs that are asked for at once, for each worker. */
const batchPerWorker = 4;
/** How often the state is saved between generations, ms. */
const saveEvery = 20_000;

interface Job {
  readonly work: WorkOnFit;
  readonly abort: AbortController;
  asked: 'pause' | 'stop' | undefined;
  running?: RunnerJob;
}

/** Keeps fits going outside of any page. */
export function createFitManager(parts: FitManagerParts): FitManager {
  const { server, createPool, wait, now } = parts;
  const jobs = new Map<string, Job>();
  const lives = createLiveList<LiveFit>({
    idOf: (live) => live.fitId,
    isAtWork: isFitting,
    onChange: parts.onChange,
  });
  const { get, change } = lives;

  function start(work: WorkOnFit): void {
    const { id, siteId, name, plan } = work.fit;
    if (isFitting(get(id))) return;
    const job: Job = { work, abort: new AbortController(), asked: undefined };
    jobs.set(id, job);
    lives.put({
      ...{ fitId: id, siteId, name, phase: 'loading', state: undefined, mostRuns: plan.mostRuns },
      ...{ secondsLeft: undefined, trouble: undefined, error: undefined },
    });
    run(job).catch((error: unknown) => {
      job.abort.abort();
      const words =
        error instanceof RunProblem ? error.problems.map((p) => p.message).join(' ') : errorText(error);
      change(id, { phase: 'failed', error: words, trouble: undefined });
    });
  }

  async function run(job: Job): Promise<void> {
    const { fit: opened, loadLayers, loadTarget, onRecord } = job.work;
    const { signal } = job.abort;
    const save = <T>(send: () => Promise<T>) =>
      saveWithRetry(send, {
        wait,
        signal,
        onTrouble: (error) => {
          change(opened.id, { trouble: error && troubleWords(error, 'the fit') });
        },
      });
    const fit = await save(() => server.fit(opened, signal));
    const { plan, grid } = fit;
    const abc = abcPlanOf(plan);
    const [ground, target] = await Promise.all([loadLayers(), loadTarget()]);
    let state: AbcState = fit.state;
    change(fit.id, { phase: 'running', state });
    const begun = { at: now(), runs: state.runs };
    let savedAt = now();
    let savedRuns = state.runs;
    const store = async () => {
      if (state.runs === savedRuns) return;
      savedAt = now();
      savedRuns = state.runs;
      await save(() => server.putState(fit, state as FitState, signal));
    };
    const first = runOfProposal(plan.base, plan.rates, {
      generation: 0,
      number: 0,
      point: plan.rates.map(() => 0.5),
    });
    const pool = createPool({ spec: first, grid, ground });
    try {
      while (job.asked === undefined) {
        const proposals = nextProposals(abc, state, batchPerWorker * pool.workers);
        if (proposals.length === 0) break;
        const generation = state.generations.length;
        const take = (index: number, figures: readonly number[] | null) => {
          state = takeRun(abc, state, proposals[index], figures);
        };
        job.running = pool.start(
          proposals.map((proposal) => runOfProposal(plan.base, plan.rates, proposal)),
          {
            onResult: (outcome: ReplicateOutcome, index) => take(index, outcome.figures!),
            onFailure: (error, index) => {
              // Rates that no kernel can show: the fit goes on without them and counts them.
              if (!(error instanceof RunProblem)) throw error;
              take(index, null);
            },
          },
          { keep: { closing: false, fit: { target, want: 'figures' } }, inOrder: true },
        );
        await job.running.finished.catch((error: unknown) => {
          if (!(error instanceof Error && error.name === 'RunsCancelled')) throw error;
        });
        const pace = (now() - begun.at) / 1000 / Math.max(1, state.runs - begun.runs);
        change(fit.id, { state, secondsLeft: pace * (plan.mostRuns - state.runs) });
        if (state.generations.length > generation || now() - savedAt > saveEvery) await store();
      }
    } finally {
      pool.close();
    }
    change(fit.id, { phase: 'saving' });
    await store();
    const stops = job.asked === 'stop' && state.ending === null;
    onRecord(await save(() => (stops ? server.stop(fit) : server.fit(fit, signal))));
    change(fit.id, { phase: job.asked && state.ending === null ? 'paused' : 'done' });
  }

  const ask = (id: string, asked: NonNullable<Job['asked']>) => {
    const job = jobs.get(id);
    if (!job || !isFitting(get(id)) || job.asked) return;
    job.asked = asked;
    job.running?.cancel();
  };

  return {
    subscribe: lives.subscribe,
    list: lives.list,
    get,
    start,
    pause: (id) => {
      ask(id, 'pause');
    },
    stop: (id) => {
      ask(id, 'stop');
    },
  };
}
