import { MessageChannel } from 'node:worker_threads';
import { Piscina } from 'piscina';
import { ProblemError } from '../middleware/problem-error.ts';
import type { Refusal, RasterTask, TaskResults } from './raster-tasks.ts';
import { taskCells } from './task-cells.ts';
import { workerFile, type WorkerFile } from './worker-file.ts';

/** Heavy work on rasters, off the thread that answers requests. */
export interface RasterPool {
  /**
   * Runs one task in the worker. On the signal, a task that waits is dropped and one under way loses its worker.
   * @throws ProblemError what the task refuses, or that too many wait, or that it took too long or too much memory
   * @throws the signal's reason
   */
  run<K extends keyof TaskResults>(
    task: Extract<RasterTask, { kind: K }>,
    progress?: TaskProgress,
  ): Promise<TaskResults[K]>;
  close(): Promise<void>;
}

export interface TaskProgress {
  /** told the share that is done, 0..1, by tasks that know it */
  onProgress?: (share: number) => void;
  signal?: AbortSignal;
}

export interface RasterPoolSettings {
  /** tasks that may wait for the worker */
  queue: number;
  /** milliseconds that a task of so many cells may take once it has begun; then its worker is destroyed */
  longestMs: (cells: number) => number;
  worker: WorkerFile;
}

const defaults: RasterPoolSettings = {
  queue: 24,
  // Ten million cells take one or two seconds, and a worker as long to start, on a machine that does nothing else.
  longestMs: (cells) => 30_000 + 30_000 * (cells / 1e7),
  worker: workerFile('raster-worker'),
};

export function createRasterPool(settings: Partial<RasterPoolSettings> = {}): RasterPool {
  const { queue, longestMs, worker } = { ...defaults, ...settings };
  const pool = new Piscina({
    ...worker,
    // A package that geotiff.js loads reads it, and fails in a worker that has none.
    workerData: {},
    minThreads: 0,
    maxThreads: 1,
    idleTimeout: 10_000,
    resourceLimits: { maxOldGenerationSizeMb: 512, maxYoungGenerationSizeMb: 64 },
  });
  let breakOff: ((why: unknown) => void) | undefined;
  // A worker that fails to start tells the pool alone, and its task would wait. One that fails with no task is replaced.
  pool.on('error', (error) => breakOff?.(error));

  async function perform(task: RasterTask, { onProgress, signal }: TaskProgress): Promise<unknown> {
    signal?.throwIfAborted();
    const limit = longestMs(await taskCells(task));
    const stop = new AbortController();
    let why: unknown;
    breakOff = (reason) => {
      why ??= reason;
      stop.abort();
    };
    const timer = setTimeout(() => breakOff?.(tooLong()), limit);
    const cancelled = () => breakOff?.(signal?.reason);
    signal?.addEventListener('abort', cancelled);
    // It may have come while the header was read, before anybody listened.
    if (signal?.aborted) cancelled();
    const { port1: here, port2: there } = new MessageChannel();
    here.on('message', (share: number) => onProgress?.(share));
    try {
      return await pool.run({ task, port: there }, { signal: stop.signal, transferList: [there] });
    } catch (error) {
      // The worker is gone before anyone clears up after it, so that it cannot write once more.
      if (why !== undefined) await Promise.all(pool.threads.map((thread) => thread.terminate()));
      throw why ?? breakdown(error);
    } finally {
      clearTimeout(timer);
      signal?.removeEventListener('abort', cancelled);
      here.close();
      breakOff = undefined;
    }
  }

  // One task at a time is handed over, so that none is timed while it waits for another.
  let last: Promise<unknown> = Promise.resolve();
  // Piscina's own limit lets everything through while its worker is starting.
  let unfinished = 0;
  return {
    async run<K extends keyof TaskResults>(
      task: Extract<RasterTask, { kind: K }>,
      progress: TaskProgress = {},
    ) {
      if (unfinished > queue) throw busy();
      unfinished++;
      const turn = last.then(() => perform(task, progress)).finally(() => unfinished--);
      last = turn.catch(() => undefined);
      const answer = (await turn) as { value: TaskResults[K] } | { refused: Refusal };
      if ('value' in answer) return answer.value;
      const { code, message, ...parts } = answer.refused;
      throw new ProblemError(code, message, parts);
    },
    close: () => pool.destroy(),
  };
}

const busy = () =>
  new ProblemError(
    'too-many-requests',
    'The server is working through other rasters and as many wait as it takes. Try again in a minute.',
  );

const rewrite =
  'write it again with gdal_translate -co TILED=YES -co COMPRESS=DEFLATE IN.tif OUT.tif, and clip it to the site.';

const tooLong = () => {
  const parts = {
    found: 'a raster that takes far longer to read than its size explains',
    expected: 'seconds for ten million cells',
    remedy: `The file may be damaged: ${rewrite}`,
  };
  return new ProblemError(
    'raster-too-large',
    `Found ${parts.found}; expected ${parts.expected}. ${parts.remedy}`,
    parts,
  );
};

/** What became of a task that did not come to its end. */
function breakdown(error: unknown): unknown {
  if ((error as Error & { code?: string }).code === 'ERR_WORKER_OUT_OF_MEMORY')
    return new ProblemError(
      'raster-too-large',
      `Found a raster that needs more memory than a site may; expected a plain grid of cells. To mend it, ${rewrite}`,
    );
  return error;
}
