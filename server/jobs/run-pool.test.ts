import { mkdtemp, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, expect, test } from 'vitest';
import { runReplicate, type ReplicateOutcome } from '#sim-core/ensemble/replicate.ts';
import { RunsCancelled, WorkerDied } from '#sim-core/ensemble/runner.ts';
import { RunProblem } from '#sim-core/index.ts';
import { runSpecSchema, type RunSpecInput } from '#sim-core/spec/run-spec.ts';
import { createRunPool, type RunPool } from './run-pool.ts';
import { workerFile } from './worker-file.ts';

const grid = { width: 30, height: 20, cellSize: 1, originX: 500_000, originY: 4_000_000, epsg: 32617 };
const bytes = (value: number) => new Uint8Array(600).fill(value);
const ground = {
  capacity: bytes(255),
  vigour: bytes(255),
  exposure: bytes(0),
  refuge: bytes(0),
  fence: bytes(0),
  cover: new Float32Array(600).fill(0.3, 0, 200),
};
const specOf = (given: Partial<RunSpecInput>) =>
  runSpecSchema.parse({
    version: 1,
    seed: 'test',
    surveyYear: 2020,
    years: 4,
    rates: { backgroundLoss: 0.1 },
    layers: { cover: { file: 'cover.tif' } },
    ...given,
  });
const replicate = (r: number) => specOf({ replicate: r });
const keep = { closing: true, coverYears: [2022] };

let pool: RunPool;
afterEach(() => pool.close());

const runAll = async (specs: ReturnType<typeof specOf>[], inOrder = true) => {
  const outcomes: ReplicateOutcome[] = [];
  const failures: unknown[] = [];
  const order: number[] = [];
  await pool.start(
    specs,
    {
      onResult: (outcome, index) => {
        outcomes[index] = outcome;
        order.push(index);
      },
      onFailure: (error, index) => {
        failures[index] = error;
      },
    },
    { keep, inOrder },
  ).finished;
  return { outcomes, failures, order };
};

test('what replicates draw does not hang on how many workers there are', async () => {
  const uncertain = {
    draws: 6,
    rates: { lateralSpread: { law: 'uniform', low: 0.4, high: 1.5 } },
  } as const;
  const specs = Array.from({ length: 6 }, (_, r) => specOf({ replicate: r, uncertain }));
  const digests: string[][] = [];
  for (const workers of [1, 2]) {
    pool = createRunPool({ grid, ground, workers });
    digests.push((await runAll(specs)).outcomes.map(({ result }) => result.digest));
    await pool.close();
  }
  expect(digests[0]).toHaveLength(6);
  expect(digests[1]).toEqual(digests[0]);
});

test.each([1, 2, 4])('%d workers come to the same as this thread', async (workers) => {
  pool = createRunPool({ grid, ground, workers });
  const specs = Array.from({ length: 6 }, (_, r) => replicate(r));
  const { outcomes, order } = await runAll(specs);
  expect(order).toEqual([0, 1, 2, 3, 4, 5]);
  expect(outcomes).toEqual(specs.map((spec) => runReplicate({ spec, grid, ground }, keep)));
  expect(new Set(outcomes.map(({ result }) => result.digest)).size).toBe(6);
});

test('a run that the engine refuses fails alone, with the fields that are wrong', async () => {
  pool = createRunPool({ grid, ground, workers: 1 });
  const wrong = specOf({ actions: [{ kind: 'mound', year: 2021, x: 0, y: 0, radius: 2 }] });
  const { outcomes, failures } = await runAll([replicate(0), wrong, replicate(1)]);
  expect(Object.keys(outcomes)).toEqual(['0', '2']);
  expect(failures[1]).toBeInstanceOf(RunProblem);
  expect((failures[1] as RunProblem).problems[0].field).toMatch(/^actions/);
});

test('cancelling ends a run that is under way', async () => {
  pool = createRunPool({ grid, ground, workers: 1 });
  const job = pool.start(
    [specOf({ years: 500, stepsPerYear: 12 })],
    {
      onResult: () => undefined,
      onFailure: () => undefined,
      onProgress: () => {
        job.cancel();
      },
    },
    { keep },
  );
  await expect(job.finished).rejects.toThrow(RunsCancelled);
});

/** A pool whose worker is other code than ours, with the path of a file that its workers may share. */
async function poolOf(code: (file: string) => string): Promise<() => Promise<void>> {
  const folder = await mkdtemp(join(tmpdir(), 'foothold-runs-'));
  const filename = join(folder, 'worker.mjs');
  await writeFile(filename, code(join(folder, 'mark')));
  pool = createRunPool({ grid, ground, workers: 2, worker: { filename, execArgv: [] } });
  return () => rm(folder, { recursive: true });
}

test('a worker that dies takes its own run alone with it, and that is tried again', async () => {
  const clear = await poolOf(
    (mark) => `
      import { existsSync, writeFileSync } from 'node:fs';
      export default async ({ spec, port }) => {
        port.postMessage(0);
        if (spec.replicate === 1 && !existsSync('${mark}')) {
          writeFileSync('${mark}', '');
          process.exit(3);
        }
        if (spec.replicate === 3) process.exit(4);
        await new Promise((resolve) => setTimeout(resolve, 20));
        return { outcome: spec.replicate };
      };`,
  );
  const { outcomes, failures } = await runAll([0, 1, 2, 3, 4].map(replicate));
  expect(outcomes).toEqual([0, 1, 2, undefined, 4]);
  expect(failures[3]).toBeInstanceOf(WorkerDied);
  expect((failures[3] as Error).message).toMatch(/exited with code: 4/);
  await clear();
});

test.each([
  ['be loaded', { ...workerFile('run-worker'), filename: '/no/such/worker.mjs' }],
  ['start', { ...workerFile('run-worker'), execArgv: ['--import', 'no-such-loader'] }],
])('workers that cannot %s fail their runs instead of leaving them to wait', async (_, worker) => {
  pool = createRunPool({ grid, ground, workers: 2, worker });
  const { failures } = await runAll([replicate(0), replicate(1), replicate(2)]);
  expect(failures).toHaveLength(3);
  for (const failure of failures) expect(failure).toBeInstanceOf(WorkerDied);
});
