import type { Run } from '#contract/runs.ts';
import type { SeriesRow } from '#sim-core/spec/run-result.ts';
import { errorText, type ProblemError } from '#app/lib/api-client.ts';
import type { RunHandle } from '#app/workers/run-client.ts';
import type { PackedLayers, RunInput, RunListener, RunProgress } from '#app/workers/run-loop.ts';
import { createLiveList } from '#app/lib/live-list.ts';
import { saveWithRetry, troubleWords } from '#app/lib/save-with-retry.ts';
import type { RunServer } from './run-server.ts';

/**
 * Where work in this tab stands. `pausing`: it will stand still when the year that is being worked on is done;
 * `saving`: all years are done and their end is being recorded.
 */
export type LivePhase =
  'loading' | 'running' | 'pausing' | 'paused' | 'saving' | 'done' | 'stopped' | 'failed';

/** A run that this tab is working on: its first time, or a repeat that only compares the digest. */
export interface LiveRun {
  readonly runId: string;
  readonly siteId: string;
  readonly name: string;
  readonly repeat: boolean;
  readonly surveyYear: number;
  readonly years: number;
  readonly phase: LivePhase;
  /** latest year that is done */
  readonly year: number | undefined;
  /** years whose frame the server has, ascending */
  readonly savedYears: readonly number[];
  readonly rows: readonly SeriesRow[];
  readonly progress: RunProgress | undefined;
  /** why saving waits, while it does */
  readonly trouble: string | undefined;
  /** why it failed */
  readonly error: string | undefined;
  /** closing years, once the horizon is reached */
  readonly closing: Int16Array | undefined;
  /** the digest that a repeat came to */
  readonly digest: string | undefined;
}

/** What the manager stands on; all of it can be replaced in a test. */
export interface RunManagerParts {
  readonly server: RunServer;
  readonly startWorker: (input: RunInput, listener: RunListener) => RunHandle;
  readonly wait: (milliseconds: number, signal: AbortSignal) => Promise<void>;
  /** each frame as it comes; not called for repeats */
  readonly onFrame: (runId: string, year: number, frame: Uint8Array) => void;
  /** the list of runs changed: `active` of them are at work */
  readonly onChange?: (active: number) => void;
}

export interface StartParts {
  readonly run: Run;
  readonly loadLayers: () => Promise<PackedLayers>;
  /** what the server now knows of the run */
  readonly onRecord: (run: Run) => void;
}

export interface RunManager {
  readonly subscribe: (listener: () => void) => () => void;
  /** the same array until something changed */
  readonly list: () => readonly LiveRun[];
  get(runId: string): LiveRun | undefined;
  /** Works on a run that the server has just registered: each frame is stored as it comes. */
  start(parts: StartParts): void;
  /** Runs a stored run once more, stores nothing, and records whether the digest agreed. */
  repeat(parts: StartParts): void;
  pause(runId: string): void;
  resume(runId: string): void;
  /** one more year, then stands still */
  step(runId: string): void;
  /** Ends the work at once; frames that are stored stay. */
  cancel(runId: string): Promise<void>;
  /** Takes a run that is over off the list. */
  dismiss(runId: string): void;
}

interface Job {
  readonly parts: StartParts;
  readonly abort: AbortController;
  handle?: RunHandle;
}

const atWork: readonly LivePhase[] = ['loading', 'running', 'pausing', 'paused', 'saving'];
export const isAtWork = (live: LiveRun | undefined): live is LiveRun =>
  live !== undefined && atWork.includes(live.phase);

/** Keeps runs going outside of any page, so that leaving a page does not end them. */
export function createRunManager(manager: RunManagerParts): RunManager {
  const { server, startWorker, wait, onFrame } = manager;
  const jobs = new Map<string, Job>();
  const lives = createLiveList<LiveRun>({
    idOf: (live) => live.runId,
    isAtWork,
    onChange: manager.onChange,
  });
  const { get, change } = lives;

  function begin(parts: StartParts, repeat: boolean): void {
    const { run } = parts;
    if (isAtWork(get(run.id))) return;
    const job: Job = { parts, abort: new AbortController() };
    jobs.set(run.id, job);
    const { id: runId, siteId, name, surveyYear, years } = run;
    const fresh: LiveRun = {
      ...{
        runId,
        siteId,
        name,
        repeat,
        surveyYear,
        years,
        phase: 'loading',
        year: undefined,
        savedYears: [],
      },
      ...{ rows: [], progress: undefined, trouble: undefined, error: undefined },
      ...{ closing: undefined, digest: undefined },
    };
    lives.put(fresh);
    work(job, repeat).catch((error: unknown) => over(job, repeat, error));
  }

  async function work(job: Job, repeat: boolean): Promise<void> {
    const { run, loadLayers, onRecord } = job.parts;
    const { signal } = job.abort;
    const save = saver(job);
    const ground = await loadLayers();
    if (signal.aborted) return;
    const onYear: RunListener['onYear'] = async ({ year, rows, frame, packed }) => {
      const before = get(run.id)?.rows ?? [];
      change(run.id, { year, rows: [...before, ...rows] });
      if (repeat || !frame || !packed) return;
      onFrame(run.id, year, frame);
      await save(() => server.putFrame(run.id, year, packed, signal));
      const saved = get(run.id)?.savedYears ?? [];
      change(run.id, { savedYears: [...saved, year].sort((a, b) => a - b) });
    };
    const onProgress = (progress: RunProgress) => {
      change(run.id, { progress });
    };
    const onStandstill = () => {
      if (get(run.id)?.phase === 'pausing') change(run.id, { phase: 'paused' });
    };
    job.handle = startWorker(
      { spec: run.spec, grid: run.grid, ground },
      { onYear, onProgress, onStandstill },
    );
    // Whoever paused while the layers were on their way meant it.
    if (get(run.id)?.phase === 'paused') job.handle.pause();
    else change(run.id, { phase: 'running' });
    const { result, closing, packedClosing } = await job.handle.result;
    change(run.id, { phase: 'saving', closing });
    if (repeat) {
      const { digest, engineVersion } = result;
      const checked = await save(() => server.check(run.id, { digest, engineVersion }));
      onRecord(checked);
      change(run.id, { phase: 'done', digest });
    } else {
      await save(() => server.putClosing(run.id, packedClosing, signal));
      onRecord(await save(() => server.finish(run.id, result)));
      change(run.id, { phase: 'done', digest: result.digest });
    }
    jobs.delete(run.id);
  }

  const saver =
    (job: Job) =>
    <T>(send: () => Promise<T>): Promise<T> =>
      saveWithRetry(send, {
        wait,
        signal: job.abort.signal,
        onTrouble: (error: ProblemError | undefined) => {
          change(job.parts.run.id, { trouble: error && troubleWords(error, 'the run') });
        },
      });

  /** The work ended before its end: cancelled, refused, or the worker died. */
  function over(job: Job, repeat: boolean, error: unknown): void {
    const { run, onRecord } = job.parts;
    jobs.delete(run.id);
    if (job.abort.signal.aborted) return;
    job.abort.abort();
    job.handle?.cancel();
    change(run.id, { phase: 'failed', error: errorText(error), trouble: undefined });
    // What nobody works on any more must not stand in the list as running.
    if (!repeat) server.stop(run.id).then(onRecord, () => undefined);
  }

  async function cancel(runId: string): Promise<void> {
    const job = jobs.get(runId);
    if (!job) return;
    jobs.delete(runId);
    job.abort.abort();
    job.handle?.cancel();
    const repeat = get(runId)?.repeat;
    change(runId, { phase: 'stopped', trouble: undefined });
    if (!repeat) job.parts.onRecord(await server.stop(runId));
  }

  return {
    subscribe: lives.subscribe,
    list: lives.list,
    get,
    start: (parts) => begin(parts, false),
    repeat: (parts) => begin(parts, true),
    pause: (runId) => {
      const { phase } = get(runId) ?? {};
      if (phase !== 'loading' && phase !== 'running') return;
      jobs.get(runId)?.handle?.pause();
      change(runId, { phase: phase === 'loading' ? 'paused' : 'pausing' });
    },
    resume: (runId) => {
      const job = jobs.get(runId);
      const { phase } = get(runId) ?? {};
      if (phase !== 'paused' && phase !== 'pausing') return;
      job?.handle?.resume();
      change(runId, { phase: job?.handle ? 'running' : 'loading' });
    },
    step: (runId) => {
      const handle = jobs.get(runId)?.handle;
      if (get(runId)?.phase !== 'paused' || !handle) return;
      handle.step();
      change(runId, { phase: 'pausing' });
    },
    cancel,
    dismiss: (runId) => {
      if (!isAtWork(get(runId))) lives.remove(runId);
    },
  };
}
