import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import { ProblemError } from '#server/middleware/problem-error.ts';
import { cover, smallGrid } from '#server/testing/sites.ts';
import { createRasterPool, type RasterPool } from './raster-pool.ts';
import { workerFile } from './worker-file.ts';

let folder: string;
let pool: RasterPool;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'foothold-pool-'));
  await writeFile(join(folder, 'cover.tif'), cover());
});
afterEach(async () => {
  await pool.close();
  await rm(folder, { recursive: true, force: true });
});

const task = (valuesName: string, path = join(folder, 'cover.tif')) =>
  ({
    kind: 'read-layer',
    path,
    valuesPath: join(folder, valuesName),
    part: 'cover',
    grid: null,
    cells: 1000,
  }) as const;

it('reads a raster in its worker and leaves its values in a file', async () => {
  pool = createRasterPool();
  const read = await pool.run(task('values'));
  expect(read).toMatchObject({ grid: smallGrid, unit: 'share', facts: { dataType: 'float32' } });
  expect(decodeCellValues(await readFile(join(folder, 'values'))).values).toHaveLength(24);
});

it('has the decoders of geotiff.js in its worker', async () => {
  pool = createRasterPool();
  const path = join(import.meta.dirname, '../../rasters/fixtures/good-zstd.tif');
  const { facts } = await pool.run({ ...task('values', path), part: 'habitat' });
  expect(facts).toMatchObject({ dataType: 'uint8', noData: 255, maximum: 254 });
});

it('brings a refusal across whole', async () => {
  pool = createRasterPool();
  const refusal = await pool.run({ ...task('values'), cells: 10 }).catch((error: unknown) => error);
  expect(refusal).toBeInstanceOf(ProblemError);
  expect(refusal).toMatchObject({ code: 'raster-too-large', extra: { found: '6 × 4 cells' } });
});

it('says what failed when it is no refusal, and works on', async () => {
  pool = createRasterPool();
  await expect(pool.run(task('values', join(folder, 'nothing')))).rejects.toThrow('ENOENT');
  await expect(pool.run(task('values'))).resolves.toMatchObject({ unit: 'share' });
});

it('refuses what comes when as many wait as it takes', async () => {
  pool = createRasterPool({ queue: 2 });
  const asked = Array.from({ length: 6 }, (_, i) => pool.run(task(`values-${i}`)));
  const settled = await Promise.allSettled(asked);
  const refused = settled.filter((s) => s.status === 'rejected').map((s) => s.reason as ProblemError);
  expect(refused.length).toBeGreaterThanOrEqual(3);
  for (const problem of refused) expect(problem).toMatchObject({ code: 'too-many-requests' });
  expect(settled.filter((s) => s.status === 'fulfilled').length).toBeGreaterThanOrEqual(2);
});

it('destroys a worker that takes longer than the size of the raster explains, leaves nothing, and works on', async () => {
  pool = createRasterPool({ longestMs: (cells) => (cells > 24 ? 1 : 60_000) });
  const grid = { ...smallGrid, width: 300, height: 200 };
  await writeFile(join(folder, 'large.tif'), encodeGeoTiff({ grid, values: new Float32Array(60_000) }));
  const large = { ...task('large-values', join(folder, 'large.tif')), cells: 60_000 };
  const outcomes = await Promise.allSettled([pool.run(large), pool.run(task('values'))]);
  expect(outcomes).toMatchObject([
    {
      status: 'rejected',
      reason: { code: 'raster-too-large', extra: { remedy: expect.stringContaining('damaged') as string } },
    },
    { status: 'fulfilled', value: { unit: 'share' } },
  ]);
  expect((await readdir(folder)).sort()).toEqual(['cover.tif', 'large.tif', 'values']);
});

it('says how far a task is, and drops one whose signal comes before its worker has it', async () => {
  pool = createRasterPool();
  const shares: number[] = [];
  const survey = { kind: 'survey', path: join(folder, 'cover.tif'), band: null } as const;
  const seen = pool.run(
    { ...survey, thumbnailPath: join(folder, 'small') },
    { onProgress: (share) => shares.push(share) },
  );
  await expect(seen).resolves.toMatchObject({ band: 1, facts: { dataType: 'float32' } });
  expect(shares.at(-1)).toBe(1);
  const stop = new AbortController();
  const dropped = pool.run({ ...survey, thumbnailPath: join(folder, 'never') }, { signal: stop.signal });
  // By now its header is being read, and no worker has it yet.
  for (let i = 0; i < 5; i++) await Promise.resolve();
  stop.abort(new Error('enough'));
  await expect(dropped).rejects.toThrow('enough');
  expect(await readdir(folder)).not.toContain('never');
});

/** A pool whose worker is other code than ours. */
async function poolOf(code: string, longestMs = 60_000): Promise<RasterPool> {
  const filename = join(folder, 'worker.mjs');
  await writeFile(filename, code);
  return createRasterPool({ worker: { filename, execArgv: [] }, longestMs: () => longestMs });
}

it('destroys a worker that loops for ever, each time', async () => {
  pool = await poolOf('export default () => { for (;;); };', 300);
  for (let i = 0; i < 2; i++)
    await expect(pool.run(task('values'))).rejects.toMatchObject({ code: 'raster-too-large' });
});

it('rejects the task of a worker that cannot be loaded, and lives on', async () => {
  pool = await poolOf('throw new Error("no such luck");');
  for (let i = 0; i < 2; i++) await expect(pool.run(task('values'))).rejects.toThrow('no such luck');
});

it('rejects the task of a worker that cannot start, and lives on', async () => {
  pool = createRasterPool({
    worker: { ...workerFile('raster-worker'), execArgv: ['--import', 'no-such-loader'] },
  });
  for (let i = 0; i < 2; i++) await expect(pool.run(task('values'))).rejects.toThrow('no-such-loader');
});

it('rejects the task of a worker that dies of it', async () => {
  pool = await poolOf('export default () => process.exit(3);');
  for (let i = 0; i < 2; i++) await expect(pool.run(task('values'))).rejects.toThrow('exited with code: 3');
});
