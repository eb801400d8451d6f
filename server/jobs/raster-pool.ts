import { fileURLToPath } from 'node:url';
import { Piscina } from 'piscina';
import { ProblemError } from '../middleware/problem-error.ts';
import type { Refusal, RasterTask, TaskResults } from './raster-tasks.ts';

/** Heavy work on rasters, off the thread that answers requests. */
export interface RasterPool {
  /**
   * Runs one task in the worker.
   * @throws ProblemError what the task refuses, or that too many wait, or that it took too long or too much memory
   */
  run<K extends keyof TaskResults>(task: Extract<RasterTask, { kind: K }>): Promise<TaskResults[K]>;
  close(): Promise<void>;
}

export interface RasterPoolSettings {
  /** tasks that may wait for the worker */
  queue: number;
  /** a task that takes longer is broken off */
  longestMs: number;
}

const defaults: RasterPoolSettings = { queue: 24, longestMs: 5 * 60_000 };

/** Built, the worker is an entry of its own beside the bundle; from the sources it is read through tsx. */
const fromSources = import.meta.url.endsWith('.ts');
const workerFile = new URL(fromSources ? './raster-worker.ts' : './raster-worker.js', import.meta.url);

export function createRasterPool(settings: Partial<RasterPoolSettings> = {}): RasterPool {
  const { queue, longestMs } = { ...defaults, ...settings };
  const pool = new Piscina({
    filename: fileURLToPath(workerFile),
    execArgv: fromSources ? ['--import', 'tsx'] : [],
    minThreads: 0,
    maxThreads: 1,
    idleTimeout: 10_000,
    resourceLimits: { maxOldGenerationSizeMb: 512, maxYoungGenerationSizeMb: 64 },
  });
  // Piscina's own limit lets everything through while its worker is starting.
  let unfinished = 0;
  return {
    async run<K extends keyof TaskResults>(task: Extract<RasterTask, { kind: K }>) {
      if (unfinished > queue) throw busy();
      unfinished++;
      const answer = (await pool
        .run(task, { signal: AbortSignal.timeout(longestMs) })
        .catch((error: unknown) => {
          throw breakdown(error);
        })
        .finally(() => unfinished--)) as { value: TaskResults[K] } | { refused: Refusal };
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

/** What became of a task that did not come to its end. */
function breakdown(error: unknown): unknown {
  const { name, code } = error as Error & { code?: string };
  if (name === 'AbortError')
    return new ProblemError(
      'raster-too-large',
      'Found a raster that takes minutes to read; expected a few seconds. Clip it to the site, or write it again with gdal_translate -co TILED=YES -co COMPRESS=DEFLATE IN.tif OUT.tif.',
    );
  if (code === 'ERR_WORKER_OUT_OF_MEMORY')
    return new ProblemError(
      'raster-too-large',
      'Found a raster that needs more memory than a site may; expected a plain grid of cells. Write it again with gdal_translate -co TILED=YES -co COMPRESS=DEFLATE IN.tif OUT.tif.',
    );
  return error;
}
