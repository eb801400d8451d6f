import { spawnSync } from 'node:child_process';
import { mkdtemp, open, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { alignRaster } from '#rasters/align/align-raster.ts';
import type { RasterContent } from '#rasters/align/alignment-plan.ts';
import { planAlignment } from '#rasters/align/plan-alignment.ts';
import { coarsenGrid, newGridFor, ownGrid } from '#rasters/align/suggest-grid.ts';
import { inspectRaster } from '#rasters/describe/inspect-raster.ts';
import type { RasterDescription } from '#rasters/describe/raster-description.ts';
import type { RasterSource } from '#rasters/read/raster-source.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import type { Grid } from '#sim-core/grid/grid.ts';

/**
 * How long, and in how much memory, a raster of 6,000 × 6,000 32-bit floats comes onto a grid, each case in a process of
 * its own: node .config/run.mjs rasters/bench/align-large.ts [side]
 */
const cases: Record<string, { content: RasterContent; grid: (description: RasterDescription) => Grid }> = {
  'nothing (inspected alone)': { content: 'amounts', grid: ownGrid },
  'same cells, copied': { content: 'amounts', grid: ownGrid },
  'half a cell aside, bilinear': {
    content: 'amounts',
    grid: (d) => ({ ...ownGrid(d), originX: d.originX + d.cellWidth / 2 }),
  },
  'cells 2.5 times as wide, area-weighted': {
    content: 'amounts',
    grid: (d) => coarsenGrid(ownGrid(d), 2.5 * d.cellWidth),
  },
  'cells 4 times as wide, majority': {
    content: 'classes',
    grid: (d) => coarsenGrid(ownGrid(d), 4 * d.cellWidth),
  },
  'another zone, bilinear': { content: 'amounts', grid: (d) => newGridFor(d, 32616, d.cellWidth) },
  'another zone, cells twice as wide, area-weighted': {
    content: 'amounts',
    grid: (d) => newGridFor(d, 32616, 2 * d.cellWidth),
  },
  'a corner of 500 × 500, copied': {
    content: 'amounts',
    grid: (d) => ({ ...ownGrid(d), width: 500, height: 500 }),
  },
};

const [, self, first, path, name] = process.argv;
if (first === 'make') await make(path, Number(name));
else if (first === 'case') await measure(path, name);
else await all(Number(first ?? 6000));

async function all(side: number): Promise<void> {
  const folder = await mkdtemp(join(tmpdir(), 'foothold-align-'));
  const run = (...args: string[]) =>
    spawnSync(process.execPath, [...process.execArgv, self ?? fileURLToPath(import.meta.url), ...args], {
      stdio: 'inherit',
    });
  try {
    for (const blocks of ['strips', 'tiles']) {
      const file = join(folder, blocks);
      run('make', file, String(side));
      console.log(`${side} × ${side} float32 in ${blocks}`);
      for (const one of Object.keys(cases)) run('case', file, one);
    }
  } finally {
    await rm(folder, { recursive: true });
  }
}

async function make(file: string, side: number): Promise<void> {
  const grid = {
    width: side,
    height: side,
    cellSize: 0.5,
    originX: 473_000,
    originY: 3_474_000,
    epsg: 32617,
  };
  const values = Float32Array.from({ length: side * side }, (_, i) => ((i * 2_654_435_761) % 4096) / 4096);
  await writeFile(
    file,
    encodeGeoTiff({ grid, values }, { blocks: file.endsWith('tiles') ? 'tiles' : 'strips' }),
  );
}

async function measure(file: string, one: string): Promise<void> {
  const handle = await open(file);
  const source: RasterSource = {
    size: (await handle.stat()).size,
    read: async (offset, length) => (await handle.read(new Uint8Array(length), 0, length, offset)).buffer,
  };
  const before = process.resourceUsage().maxRSS;
  const began = performance.now();
  const description = await inspectRaster(source);
  const { content, grid } = cases[one];
  const target = grid(description);
  if (!one.startsWith('nothing'))
    await alignRaster(source, planAlignment(description, { band: 1, content, grid: target }));
  const seconds = (performance.now() - began) / 1000;
  const [start, peak] = [before, process.resourceUsage().maxRSS].map((kilobytes) =>
    Math.round(kilobytes / 1024),
  );
  const values = Math.round((target.width * target.height * 4) / 2 ** 20);
  console.log(
    `  ${one}: ${target.width} × ${target.height} cells, ${seconds.toFixed(1)} s, peak ${peak} MB (${start} MB before, grid of ${values} MB)`,
  );
  await handle.close();
}
