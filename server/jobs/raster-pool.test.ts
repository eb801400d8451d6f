import { mkdtemp, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, expect, it } from 'vitest';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { ProblemError } from '#server/middleware/problem-error.ts';
import { cover, smallGrid } from '#server/testing/sites.ts';
import { createRasterPool, type RasterPool } from './raster-pool.ts';

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

it('breaks off a task that takes too long, and works on', async () => {
  pool = createRasterPool({ longestMs: 1 });
  await expect(pool.run(task('values'))).rejects.toMatchObject({ code: 'raster-too-large' });
});
