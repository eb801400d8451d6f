import type { Comparison } from '#contract/comparisons.ts';
import { recordReplicate, RunProblem } from '#sim-core/index.ts';
import type { Keep, ReplicateOutcome } from '#sim-core/ensemble/replicate.ts';
import type { Runner, RunnerJob, RunnerProgress } from '#sim-core/ensemble/runner.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { errorText } from '#app/lib/api-client.ts';
import { createLiveList } from '#app/lib/live-list.ts';
import { saveWithRetry, troubleWords } from '#app/lib/save-with-retry.ts';
import { mapNames } from '#rasters/ensemble/ensemble-maps.ts';
import type { EnsembleMapsDesk } from '#app/workers/ensemble-maps-client.ts';
import type { PackedLayers, RunInput } from '#app/workers/run-loop.ts';
import type { ComparisonServer } from './comparison-server.ts';
import type { EnsembleAddress } from './get-comparison.ts';
import type { KnownRecords } from '#sim-core/compare/known-records.ts';
import type { Enough } from './may-stop.ts';
import { ensembleKey, specOf, tasksLeft, type Task } from './ensemble-work.ts';

/** `saving`: the replicates stand still and the maps are on their way to the server. */
export type ComparisonPhase = 'loading' | 'running' | 'saving' | 'paused' | 'done' | 'failed';

/** A comparison that this tab works on. */
export interface LiveComparison {
  readonly comparisonId: string;
  readonly siteId: string;
  readonly name: string;
  readonly phase: ComparisonPhase;
  /** of the replicates that were left when this tab took it up */
  readonly progress: RunnerProgress | undefined;
  readonly records: KnownRecords;
  /** rises with each record */
  readonly version: number;
  /** stored ones that are run once more because the maps lack them */
  readonly again: number;
  /** why saving waits, while it does */
  readonly trouble: string | undefined;
  readonly error: string | undefined;
}

export interface ComparisonManagerParts {
  readonly server: ComparisonServer;
  readonly createPool: (input: RunInput) => Runner & { close(): void };
  readonly createDesk: () => EnsembleMapsDesk;
  /** looks whether enough is known, off the page's thread */
  readonly mayStop: (comparison: Comparison, known: KnownRecords) => Promise<Enough | undefined>;
  readonly wait: (milliseconds: number, signal: AbortSignal) => Promise<void>;
  /** milliseconds */
  readonly now: () => number;
  readonly onChange?: (active: number) => void;
}

export interface WorkOn {
  readonly comparison: Comparison;
  readonly loadLayers: () => Promise<PackedLayers>;
  /** Hears what the server knows of it when the work stands still. */
  readonly onRecord: (comparison: Comparison) => void;
}

export interface ComparisonManager {
  readonly subscribe: (listener: () => void) => () => void;
  readonly list: () => readonly LiveComparison[];
  get(comparisonId: string): LiveComparison | undefined;
  /** Works on a comparison from what is stored of it. */
  start(work: WorkOn): void;
  /** Stands still when what is done is saved; replicates in the middle of their run are run again later. */
  pause(comparisonId: string): void;
  /** Ends the comparison by hand: what is done is kept and shown. */
  stop(comparisonId: string): void;
  /** A map as it stands now; undefined while this tab does not work on the comparison. */
  map(
    comparisonId: string,
    option: number,
    outlook: number,
    name: string,
  ): Promise<Uint8Array | Int16Array> | undefined;
}

const atWork: readonly ComparisonPhase[] = ['loading', 'running', 'saving'];
export const isWorking = (phase: ComparisonPhase | undefined): boolean =>
  phase !== undefined && atWork.includes(phase);

/** Replicates of an ensemble that go to the server together, and how long one waits for company, ms. */
const pieceSize = 8;
const pieceWait = 2000;
/** How often the counts behind the maps are stored, ms; and how many times as long as storing them takes, at least. */
const stateEvery = 120_000;
const stateTimes = 30;
/** How often it is asked whether the comparison may stop, ms. */
const lookEvery = 4000;

type End = 'pause' | 'stop' | undefined;

interface Job {
  readonly work: WorkOn;
  readonly abort: AbortController;
  asked: End;
  desk?: EnsembleMapsDesk;
  running?: RunnerJob;
}

/** Keeps comparisons going outside of any page. */
export function createComparisonManager(parts: ComparisonManagerParts): ComparisonManager {
  const { server, createPool, createDesk, wait, now } = parts;
  const jobs = new Map<string, Job>();
  const lives = createLiveList<LiveComparison>({
    idOf: (live) => live.comparisonId,
    isAtWork: ({ phase }) => isWorking(phase),
    onChange: parts.onChange,
  });
  const { get, change } = lives;

  function start(work: WorkOn): void {
    const { id, siteId, name, plan } = work.comparison;
    if (isWorking(get(id)?.phase)) return;
    jobs.get(id)?.desk?.close();
    const job: Job = { work, abort: new AbortController(), asked: undefined };
    jobs.set(id, job);
    const live: LiveComparison = {
      comparisonId: id,
      siteId,
      name,
      phase: 'loading',
      progress: undefined,
      records: plan.options.map(() => plan.outlooks.map(() => new Map<number, ReplicateRecord>())),
      version: 0,
      again: 0,
      trouble: undefined,
      error: undefined,
    };
    lives.put(live);
    run(job).catch((error: unknown) => {
      fail(job, error);
    });
  }

  async function run(job: Job): Promise<void> {
    const { loadLayers, onRecord } = job.work;
    const { id, siteId } = job.work.comparison;
    const { signal } = job.abort;
    const save = saver(job);
    const comparison = await save(() => server.comparison(siteId, id, signal));
    const { plan, grid } = comparison;
    const addressOf = (option: number, outlook: number): EnsembleAddress => ({
      siteId,
      comparisonId: id,
      option,
      outlook,
    });
    const desk = (job.desk = createDesk());
    const ground = await loadLayers();
    const records = get(id)!.records as Map<number, ReplicateRecord>[][];
    const inMaps = new Map<string, Set<number>>();
    for (const { option, outlook, done, mapsState } of comparison.ensembles) {
      const address = addressOf(option, outlook);
      if (done > 0)
        for (const record of await save(() => server.replicates(address, signal)))
          records[option][outlook].set(record.replicate, record);
      const state = mapsState === null ? undefined : await save(() => server.mapsState(address, signal));
      const input = { width: grid.width, height: grid.height, years: plan.mapYears };
      const key = ensembleKey(option, outlook);
      inMaps.set(key, new Set(await desk.begin(key, input, state)));
    }
    const tasks = tasksLeft(plan, records, (option, outlook) => inMaps.get(ensembleKey(option, outlook))!);
    const again = tasks.filter((t) => records[t.option][t.outlook].has(t.replicate)).length;
    change(id, { phase: 'running', again, version: 1 });

    const pieces = createPieces(addressOf, (address, replicates) =>
      save(() => server.putReplicates(address, replicates, signal)),
    );
    let stateDue = now() + stateEvery;
    let storing = Promise.resolve();
    let lookedAt = now();
    let ending: NonNullable<Comparison['ending']> | undefined = 'all replicates';

    const takeIn = async (outcome: ReplicateOutcome, index: number) => {
      const task = tasks[index];
      const spec = specOf(comparison, task);
      const record = recordReplicate(outcome.result, spec, plan.droughtThreshold);
      const held = records[task.option][task.outlook];
      const before = held.get(task.replicate);
      if (before && before.digest !== record.digest)
        throw new Error(
          `Replicate ${task.replicate} came to another digest than the stored one. Load the page again, so that one engine computes it all.`,
        );
      await desk.add(
        ensembleKey(task.option, task.outlook),
        task.replicate,
        outcome.closing!,
        outcome.frames,
      );
      if (!before) {
        held.set(task.replicate, record);
        await pieces.add(task, record, now());
      }
      change(id, { version: get(id)!.version + 1 });
      if (now() > stateDue) {
        // The runs go on meanwhile.
        stateDue = Infinity;
        const from = now();
        storing = saveCounts([]).then(() => {
          stateDue = now() + Math.max(stateEvery, stateTimes * (now() - from));
        });
        // What went wrong is thrown where `storing` is waited for.
        storing.catch(() => job.running?.cancel());
      }
      if (plan.stop && now() - lookedAt > lookEvery) {
        lookedAt = now();
        const why = await parts.mayStop(comparison, records);
        if (why) {
          ending = why;
          job.running?.cancel();
        }
      }
    };
    /** what is being taken in; it is seen through even when the runs are cancelled meanwhile */
    let takingIn = Promise.resolve();
    const onResult = (outcome: ReplicateOutcome, index: number) => (takingIn = takeIn(outcome, index));
    /** Stores the counts behind the maps of every ensemble, and the maps themselves where `names` are given. */
    const saveCountsOf = async (option: number, outlook: number, names: readonly string[]) => {
      const [key, address] = [ensembleKey(option, outlook), addressOf(option, outlook)];
      const { state, replicates } = await desk.state(key);
      if (replicates === 0) return;
      await save(() => server.putMapsState(address, state, replicates, signal));
      for (const name of names) {
        const packed = await desk.packedMap(key, name);
        await save(() => server.putMap(address, name, packed, replicates, signal));
      }
    };
    // One is packed while another is on its way.
    const saveCounts = async (names: readonly string[]) => {
      await Promise.all(
        comparison.ensembles.map(({ option, outlook }) => saveCountsOf(option, outlook, names)),
      );
    };

    let cancelled = false;
    if (tasks.length > 0 && job.asked === undefined) {
      const pool = createPool({ spec: specOf(comparison, tasks[0]), grid, ground });
      try {
        const keep: Keep = { closing: true, frameYears: plan.mapYears };
        job.running = pool.start(
          tasks.map((task) => specOf(comparison, task)),
          {
            onResult,
            onFailure: (error) => {
              throw error;
            },
            onProgress: (progress) => {
              change(id, { progress });
            },
          },
          { keep },
        );
        await job.running.finished;
      } catch (error) {
        // Stopped on purpose: by hand, or because enough is known.
        if (!(error instanceof Error && error.name === 'RunsCancelled')) throw error;
        cancelled = true;
      } finally {
        pool.close();
      }
    }
    // Who asked for an end when all was done already gets the end that it came to.
    if (job.asked && (cancelled || job.running === undefined))
      ending = job.asked === 'stop' ? 'stopped by hand' : undefined;

    await takingIn;
    await storing;
    change(id, { phase: 'saving' });
    await pieces.flush();
    await saveCounts(mapNames(plan.mapYears));
    const why = ending;
    onRecord(await save(() => (why ? server.end(siteId, id, why) : server.comparison(siteId, id, signal))));
    change(id, { phase: why ? 'done' : 'paused' });
  }

  const saver =
    (job: Job) =>
    <T>(send: () => Promise<T>): Promise<T> =>
      saveWithRetry(send, {
        wait,
        signal: job.abort.signal,
        onTrouble: (error) => {
          change(job.work.comparison.id, { trouble: error && troubleWords(error, 'the comparison') });
        },
      });

  function fail(job: Job, error: unknown): void {
    const { id } = job.work.comparison;
    job.abort.abort();
    const words =
      error instanceof RunProblem ? error.problems.map((p) => p.message).join(' ') : errorText(error);
    change(id, { phase: 'failed', error: words, trouble: undefined });
  }

  const ask = (id: string, asked: NonNullable<End>) => {
    const job = jobs.get(id);
    if (!job || !isWorking(get(id)?.phase) || job.asked) return;
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
    map: (id, option, outlook, name) =>
      get(id) ? jobs.get(id)?.desk?.map(ensembleKey(option, outlook), name) : undefined,
  };
}

/** Gathers records by ensemble, and hands a piece on when it is full or has waited long enough. */
function createPieces(
  addressOf: (option: number, outlook: number) => EnsembleAddress,
  send: (address: EnsembleAddress, replicates: ReplicateRecord[]) => Promise<void>,
) {
  const waiting = new Map<string, { address: EnsembleAddress; records: ReplicateRecord[]; since: number }>();
  const hand = async (key: string) => {
    const piece = waiting.get(key);
    if (!piece) return;
    waiting.delete(key);
    await send(piece.address, piece.records);
  };
  return {
    async add({ option, outlook }: Task, record: ReplicateRecord, at: number): Promise<void> {
      const key = ensembleKey(option, outlook);
      const piece = waiting.get(key) ?? { address: addressOf(option, outlook), records: [], since: at };
      piece.records.push(record);
      waiting.set(key, piece);
      for (const [other, { records, since }] of [...waiting])
        if (records.length >= pieceSize || at - since > pieceWait) await hand(other);
    },
    async flush(): Promise<void> {
      for (const key of [...waiting.keys()]) await hand(key);
    },
  };
}
