import { RunProblem } from '#sim-core/index.ts';
import type { Runner, RunnerJob, RunnerProgress } from '#sim-core/ensemble/runner.ts';
import { recordStudyRun } from '#sim-core/matters/study-run.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import type { StudyRun } from '#sim-core/spec/study-run.ts';
import type { DrawnRates } from '#sim-core/spec/uncertain.ts';
import { errorText } from '#app/lib/api-client.ts';
import { createLiveList } from '#app/lib/live-list.ts';
import { saveWithRetry, troubleWords } from '#app/lib/save-with-retry.ts';
import type { PackedLayers, RunInput } from '#app/workers/run-loop.ts';
import type { StudiedEnsemble, StudyServer } from './study-server.ts';

export type StudyPhase = 'loading' | 'running' | 'saving' | 'paused' | 'done' | 'failed';

/** A run that a study needs and nobody has made yet. */
export interface StudyTask {
  readonly ensemble: StudiedEnsemble;
  readonly key: string;
  readonly rates: DrawnRates;
  readonly spec: RunSpec;
}

/** The study of a comparison that this tab works on, or worked on last. */
export interface LiveStudy {
  readonly comparisonId: string;
  readonly phase: StudyPhase;
  /** of the runs that were left when it was started */
  readonly progress: RunnerProgress | undefined;
  /** rises with each run */
  readonly version: number;
  /** runs that the engine refuses at such rates */
  readonly refused: number;
  /** why saving waits, while it does */
  readonly trouble: string | undefined;
  readonly error: string | undefined;
}

export interface StudyManagerParts {
  readonly server: StudyServer;
  readonly createPool: (input: RunInput) => Runner & { close(): void };
  readonly wait: (milliseconds: number, signal: AbortSignal) => Promise<void>;
  /** milliseconds */
  readonly now: () => number;
  readonly onChange?: (active: number) => void;
}

export interface StudyWork {
  readonly comparisonId: string;
  readonly grid: RunInput['grid'];
  readonly tasks: readonly StudyTask[];
  readonly loadLayers: () => Promise<PackedLayers>;
  /** Hears when the work stands still, whatever the reason. */
  readonly onStill: () => void;
}

export interface StudyManager {
  readonly subscribe: (listener: () => void) => () => void;
  get(comparisonId: string): LiveStudy | undefined;
  /** A run that this tab made. */
  madeRun(ensemble: StudiedEnsemble, key: string): StudyRun | undefined;
  start(work: StudyWork): void;
  /** Stands still when what is done is saved; runs in their middle are run again later. */
  pause(comparisonId: string): void;
}

export const isStudying = (phase: StudyPhase | undefined): boolean =>
  phase === 'loading' || phase === 'running' || phase === 'saving';

/** Runs that go to the server together, and how long one waits for company, ms. */
const pieceSize = 16;
const pieceWait = 2000;

const nameOf = ({ comparisonId, option, outlook }: StudiedEnsemble) => `${comparisonId}/${option}/${outlook}`;

/** Keeps studies going outside of any page. */
export function createStudyManager({
  server,
  createPool,
  wait,
  now,
  onChange,
}: StudyManagerParts): StudyManager {
  const made = new Map<string, Map<string, StudyRun>>();
  const jobs = new Map<string, { asked: boolean; running?: RunnerJob }>();
  const lives = createLiveList<LiveStudy>({
    idOf: (live) => live.comparisonId,
    isAtWork: ({ phase }) => isStudying(phase),
    onChange,
  });
  const { get, change } = lives;

  function start(work: StudyWork): void {
    const { comparisonId: id } = work;
    if (isStudying(get(id)?.phase)) return;
    jobs.set(id, { asked: false });
    lives.put({
      comparisonId: id,
      phase: 'loading',
      progress: undefined,
      version: get(id)?.version ?? 0,
      refused: 0,
      trouble: undefined,
      error: undefined,
    });
    run(work)
      .catch((error: unknown) => {
        change(id, { phase: 'failed', error: errorText(error), trouble: undefined });
      })
      .finally(work.onStill);
  }

  async function run({ comparisonId: id, grid, tasks, loadLayers }: StudyWork): Promise<void> {
    const job = jobs.get(id)!;
    const abort = new AbortController();
    const ground = await loadLayers();
    const send = (ensemble: StudiedEnsemble, runs: StudyRun[]) =>
      saveWithRetry(() => server.put(ensemble, runs, abort.signal), {
        wait,
        signal: abort.signal,
        onTrouble: (error) => change(id, { trouble: error && troubleWords(error, 'the study') }),
      });
    /** by option: runs on their way, and since when the first waits */
    const pieces = new Map<string, { ensemble: StudiedEnsemble; runs: StudyRun[]; since: number }>();
    const flush = async (isDue: (piece: { runs: StudyRun[]; since: number }) => boolean) => {
      for (const [name, piece] of [...pieces])
        if (isDue(piece)) {
          pieces.delete(name);
          await send(piece.ensemble, piece.runs);
        }
    };
    let takingIn = Promise.resolve();
    const takeIn = async (task: StudyTask, found: StudyRun) => {
      const name = nameOf(task.ensemble);
      const known = made.get(name) ?? new Map<string, StudyRun>();
      made.set(name, known.set(task.key, found));
      const piece = pieces.get(name) ?? { ensemble: task.ensemble, runs: [], since: now() };
      piece.runs.push(found);
      pieces.set(name, piece);
      change(id, { version: get(id)!.version + 1 });
      await flush(({ runs, since }) => runs.length >= pieceSize || now() - since > pieceWait);
    };
    change(id, { phase: 'running' });
    let paused = job.asked;
    if (tasks.length > 0 && !paused) {
      const pool = createPool({ spec: tasks[0].spec, grid, ground });
      try {
        job.running = pool.start(
          tasks.map(({ spec }) => spec),
          {
            onResult: (outcome, i) => {
              const { spec, rates } = tasks[i];
              takingIn = takeIn(tasks[i], recordStudyRun(outcome, spec, rates));
              return takingIn;
            },
            // Rates at the end of what is believed may be none that cells of this size can show.
            onFailure: (error) => {
              if (!(error instanceof RunProblem)) throw error;
              change(id, { refused: get(id)!.refused + 1 });
            },
            onProgress: (progress) => change(id, { progress }),
          },
          { keep: { closing: true } },
        );
        await job.running.finished;
      } catch (error) {
        if (!(error instanceof Error && error.name === 'RunsCancelled')) throw error;
        paused = true;
      } finally {
        pool.close();
      }
    }
    await takingIn;
    change(id, { phase: 'saving' });
    await flush(() => true);
    change(id, { phase: paused ? 'paused' : 'done' });
  }

  return {
    subscribe: lives.subscribe,
    get,
    madeRun: (ensemble, key) => made.get(nameOf(ensemble))?.get(key),
    start,
    pause: (id) => {
      const job = jobs.get(id);
      if (!job || !isStudying(get(id)?.phase)) return;
      job.asked = true;
      job.running?.cancel();
    },
  };
}
