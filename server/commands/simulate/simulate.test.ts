import { spawn } from 'node:child_process';
import { createHash } from 'node:crypto';
import { once } from 'node:events';
import { mkdir, mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest';
import { readRaster } from '#rasters/read/read-raster.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import { projectRoot } from '#server/project.ts';
import { createRun, type RunResult } from '#sim-core/index.ts';
import { constantBytes, toBytes } from '#sim-core/grid/ground.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import { simulate } from './command.ts';

const grid: Grid = { width: 20, height: 14, cellSize: 1, originX: 400_000, originY: 5_000_000, epsg: 32631 };
const cells = grid.width * grid.height;
const cover = Float32Array.from({ length: cells }, (_, i) => (i % grid.width < 6 ? 0.6 : 0));
const habitat = Uint8Array.from({ length: cells }, (_, i) => (i % grid.width === 12 ? 1 : 2));

let folder: string;
let said: string;
let printed: string;
beforeEach(async () => {
  folder = await mkdtemp(join(tmpdir(), 'foothold-simulate-'));
  said = printed = '';
  await writeFile(join(folder, 'cover.tif'), encodeGeoTiff({ grid, values: cover }));
  await writeFile(join(folder, 'habitat.tif'), encodeGeoTiff({ grid, values: habitat }));
});
afterEach(() => rm(folder, { recursive: true, force: true }));

const run = (...argv: string[]) =>
  simulate(argv, {
    folder,
    dataDir: join(folder, 'data'),
    print: (text) => (printed += text),
    progress: { write: (text) => (said += text), isTerminal: false, now: () => 0 },
  });

const plain = {
  version: 1,
  seed: 'a',
  surveyYear: 2020,
  years: 4,
  rates: { backgroundLoss: 0.1 },
  droughtIndex: [0, -2.5, 0, 1],
  layers: { capacity: { file: 'habitat.tif', classes: { 2: 0.8 } }, cover: { file: 'cover.tif' } },
};
const writeSpec = (spec: object, before = '') =>
  writeFile(join(folder, 'spec.json'), before + JSON.stringify(spec));
const readText = (...path: string[]) => readFile(join(folder, ...path), 'utf8');
const readTif = async (...path: string[]) => readRaster(await readFile(join(folder, ...path)));

/** The same run without files. */
function engine(given: object = {}) {
  const spec = runSpecSchema.parse({ ...plain, ...given });
  const ground = {
    capacity: toBytes(Float32Array.from(habitat, (h) => (h === 2 ? 0.8 : 0))),
    vigour: constantBytes(cells, 1),
    exposure: constantBytes(cells, 0),
    refuge: constantBytes(cells, 0),
    fence: constantBytes(cells, 0),
    cover,
  };
  const run = createRun({ spec, grid, ground });
  const covers = [run.cover()];
  while (run.nextYear()) covers.push(run.cover());
  return { covers, closing: run.closing(), result: run.result() };
}
interface Summary extends RunResult {
  spec: unknown;
  layers: Record<string, { file: string; sha256: string }>;
  replicates: { replicate: number; digest: string; recoveredYear: number | null }[];
  recovered: { count: number; of: number };
}
const summaryOf = async (out: string) => JSON.parse(await readText(out, 'summary.json')) as Summary;

describe('a run on files', () => {
  test('takes layers put together from files, curves and places, and says where each file stands', async () => {
    const heights = Float32Array.from({ length: cells }, (_, i) => (i % grid.width) / 10);
    await writeFile(join(folder, 'heights.tif'), encodeGeoTiff({ grid, values: heights }));
    const curve = [
      [0.2, 0.5],
      [1, 1],
    ];
    const mound = { x: 400_005.5, y: 4_999_993.5, radius: 2, halo: 1 };
    const layers = {
      capacity: { product: [plain.layers.capacity, { file: 'heights.tif', curve }] },
      refuge: { highest: [{ mounds: [mound] }, { file: 'heights.tif', scale: 0.1 }] },
      cover: plain.layers.cover,
    };
    await writeSpec({ ...plain, layers });
    expect(await run('spec.json', '--out', 'out')).toBe(0);
    const summary = await summaryOf('out');
    expect(Object.keys(summary.layers)).toEqual([
      'capacity.product.0',
      'capacity.product.1',
      'refuge.highest.1',
      'cover',
    ]);
    const survey = (await readTif('out', 'cover-2020.tif')).values;
    // Column 3: 0.3 m stands for a factor of 0.5 + 0.5 · 0.1/0.8, on capacity 0.8.
    expect(survey[3]).toBeCloseTo(0.8 * (0.5 + (0.5 * 0.1) / 0.8), 2);
    await writeSpec({ ...plain, layers: { ...layers, refuge: { mounds: [{ ...mound, x: 0 }] } } });
    expect(await run('spec.json', '--out', 'other')).toBe(1);
    expect(said).toMatch(/layers\.refuge: Mound 1 reaches no cell/);
    await writeSpec({ ...plain, layers: { ...layers, fence: { highest: [0, { file: 'none.tif' }] } } });
    expect(await run('spec.json', '--out', 'other')).toBe(1);
    expect(said).toMatch(/layers\.fence\.highest\.1: .*no such file/);
  });

  test('is the engine’s own run, written as maps, series and summary', async () => {
    await writeSpec(plain);
    expect(await run('spec.json', '--out', 'out')).toBe(0);
    expect((await readdir(join(folder, 'out'))).sort()).toEqual([
      'closing.tif',
      ...[2020, 2021, 2022, 2023, 2024].map((year) => `cover-${year}.tif`),
      'series.csv',
      'summary.json',
    ]);
    const expected = engine();
    for (const [i, year] of [2020, 2021, 2022, 2023, 2024].entries()) {
      const raster = await readTif('out', `cover-${year}.tif`);
      expect(raster.grid).toEqual(grid);
      const values = expected.covers[i].map((share, cell) =>
        expected.closing[cell] === -32768 ? -9999 : share,
      );
      expect(raster).toMatchObject({ noData: -9999, values });
      expect(await readFile(join(folder, 'out', `cover-${year}.tif`), 'latin1')).toContain('not rounded');
    }
    const closing = await readTif('out', 'closing.tif');
    expect(closing).toMatchObject({ dataType: 'int16', noData: -32768, values: expected.closing });
    expect(await readFile(join(folder, 'out', 'closing.tif'), 'latin1')).toContain(
      'closing year, 0 = open at the horizon',
    );

    const summary = await summaryOf('out');
    const { series, ...facts } = expected.result;
    expect(summary).toMatchObject({ ...facts, kernel: { ...facts.kernel } });
    expect(summary.layers.cover).toEqual({
      file: 'cover.tif',
      sha256: createHash('sha256')
        .update(await readFile(join(folder, 'cover.tif')))
        .digest('hex'),
    });
    expect(runSpecSchema.parse(summary.spec)).toEqual(runSpecSchema.parse(plain));

    const lines = (await readText('out', 'series.csv')).split('\r\n');
    expect(lines).toHaveLength(series.length + 2);
    expect(lines[0]).toMatch(/^time_year,drought_index,covered_area_m2,/);
    expect(Number(lines[3].split(',')[2])).toBe(series[2].coveredArea);
    expect(said).toMatch(/4 of 4 steps.*\nThe results are in /);
  });

  test('writes the years asked for; npm’s banner before the JSON is passed over', async () => {
    await writeSpec({ ...plain, reportYears: [2023] }, '\n> foothold@0.1.0 simulate\r\n> node x "{y"\n\n');
    expect(await run('spec.json', '--out', 'deep/out')).toBe(0);
    expect((await readdir(join(folder, 'deep/out'))).filter((n) => n.startsWith('cover'))).toEqual([
      'cover-2023.tif',
    ]);
  });

  test('replicates: mean cover, the year by which half have closed, a series and a digest each', async () => {
    await writeSpec({ ...plain, replicates: 3 });
    expect(await run('spec.json', '--out', 'out')).toBe(0);
    const runs = [0, 1, 2].map((replicate) => engine({ replicate }));
    const summary = await summaryOf('out');
    expect(summary.replicates).toEqual(
      runs.map(({ result: { digest, recoveredYear } }, replicate) => ({ replicate, digest, recoveredYear })),
    );
    expect(new Set(summary.replicates.map((r) => r.digest)).size).toBe(3);
    expect(summary.recovered.of).toBe(3);
    const mean = (await readTif('out', 'cover-2024.tif')).values;
    mean.forEach((value, i) =>
      expect(value).toBeCloseTo(
        runs[0].closing[i] === -32768 ? -9999 : runs.reduce((sum, { covers }) => sum + covers[4][i] / 3, 0),
        6,
      ),
    );
    const median = (await readTif('out', 'closing.tif')).values;
    const differing = median.filter((year, i) => {
      const [, middle] = runs.map(({ closing }) => closing[i] || 9999).sort((a, b) => a - b);
      expect(year).toBe(middle === 9999 ? 0 : middle);
      return runs.some(({ closing }) => closing[i] !== year);
    });
    expect(differing.length).toBeGreaterThan(0);
    const lines = (await readText('out', 'series.csv')).trimEnd().split('\r\n');
    expect(lines).toHaveLength(1 + 3 * 5);
    expect(lines.slice(1).map((line) => line.split(',')[0])).toEqual([...'000001111122222']);
  });

  test('uncertain rates: a table of draws, and replicates that are the engine’s own', async () => {
    const uncertain = {
      draws: 3,
      rates: {
        lateralSpread: { law: 'uniform', low: 0.3, high: 1.2 },
        tolerance: { law: 'normal', mean: -2.3, standardDeviation: 0.5 },
      },
    };
    await writeSpec({ ...plain, uncertain, replicates: 3 });
    expect(await run('spec.json', '--out', 'out')).toBe(0);
    const lines = (await readText('out', 'draws.csv')).trim().split('\r\n');
    expect(lines[0]).toBe('replicate,lateralSpread,tolerance,recovered_year');
    const spreads = lines.slice(1).map((line) => Number(line.split(',')[1]));
    expect(spreads.map((x) => Math.floor(((x - 0.3) / 0.9) * 3)).sort()).toEqual([0, 1, 2]);
    const summary = await summaryOf('out');
    for (const replicate of [0, 1, 2]) {
      const [, lateralSpread, tolerance] = lines[replicate + 1].split(',').map(Number);
      const alone = engine({ replicate, rates: { ...plain.rates, lateralSpread, tolerance } }).result;
      expect(summary.replicates[replicate].digest).toBe(alone.digest);
    }
    await writeSpec({ ...plain, uncertain, replicate: 1 });
    expect(await run('spec.json', '--out', 'one')).toBe(0);
    expect(await summaryOf('one')).toMatchObject({
      digest: summary.replicates[1].digest,
      drawn: { lateralSpread: spreads[1] },
    });
  });

  test('draws that cannot be run are refused before anything is written', async () => {
    const lateralSpread = { law: 'uniform', low: 0.005, high: 0.5 };
    await writeSpec({ ...plain, uncertain: { draws: 8, rates: { lateralSpread } }, replicates: 8 });
    expect(await run('spec.json', '--out', 'out')).toBe(1);
    expect(said).toMatch(/uncertain\.rates\.lateralSpread: \d of 8 futures draw rates that cannot be run/);
    await expect(readdir(join(folder, 'out'))).rejects.toThrow(/ENOENT/);
  });

  test('results do not hang on how many replicates run at once', async () => {
    await writeSpec({ ...plain, replicates: 5 });
    expect(await run('spec.json', '--out', 'one', '--workers', '1')).toBe(0);
    expect(await run('spec.json', '--out', 'three', '--workers', '3')).toBe(0);
    const names = await readdir(join(folder, 'one'));
    expect(names).toHaveLength(5 + 3);
    for (const name of names)
      expect(await readFile(join(folder, 'three', name))).toEqual(await readFile(join(folder, 'one', name)));
    expect(said).toMatch(/20 of 20 steps, 5 of 5 replicates, took/);
  });

  test('broken off, it leaves nothing half-written', async () => {
    await writeSpec({ ...plain, years: 500, droughtIndex: 0, replicates: 2000 });
    const command = spawn(
      process.execPath,
      ['--import', 'tsx', join(projectRoot, 'server/commands/simulate.ts'), 'spec.json', '--out', 'out'],
      { cwd: projectRoot, env: { ...process.env, INIT_CWD: folder }, stdio: 'ignore' },
    );
    const ended = once(command, 'exit');
    const before = ['cover.tif', 'habitat.tif', 'spec.json'];
    await vi.waitFor(async () => expect(await readdir(folder)).toHaveLength(before.length + 1), {
      timeout: 30_000,
    });
    command.kill('SIGINT');
    expect(await ended).toEqual([1, null]);
    expect((await readdir(folder)).sort()).toEqual(before);
  });

  test('--force replaces the results of an earlier run and leaves the rest alone', async () => {
    await writeSpec(plain);
    await run('spec.json', '--out', 'out');
    await writeFile(join(folder, 'out', 'notes.txt'), 'mine');
    await writeSpec({ ...plain, reportYears: [2021] });
    expect(await run('spec.json', '--out', 'out')).toBe(1);
    expect(said).toMatch(/out is not empty .* --force/);
    expect(await readdir(join(folder, 'out'))).toContain('cover-2024.tif');
    expect(await run('spec.json', '--out', 'out', '--force')).toBe(0);
    expect((await readdir(join(folder, 'out'))).sort()).toEqual([
      'closing.tif',
      'cover-2021.tif',
      'notes.txt',
      'series.csv',
      'summary.json',
    ]);
  });
});

describe('what cannot be run is refused in words, and nothing is written', () => {
  const refused = async (spec: object | string, ...argv: string[]) => {
    if (typeof spec === 'string') await writeFile(join(folder, 'spec.json'), spec);
    else await writeSpec(spec);
    const before = await readdir(folder);
    expect(await run(...(argv.length > 0 ? argv : ['spec.json', '--out', 'out']))).toBe(1);
    expect(await readdir(folder)).toEqual(before);
    expect(said).not.toMatch(/ at .*\.ts:/);
    return said;
  };

  test('every wrong field is named', async () => {
    const message = await refused({
      ...plain,
      years: 0,
      replicates: 0,
      rates: { lateralSpread: 99, speed: 1 },
      layers: { ...plain.layers, mud: 1 },
    });
    for (const field of ['replicates', 'years', 'rates.lateralSpread', 'rates.speed', 'layers.mud'])
      expect(message).toContain(`  ${field}: `);
    expect(message).toMatch(/Lateral spread must lie between 0\.005 and 20 m\/yr/);
  });

  test.each([{}, { replicates: 3 }])('what the engine refuses, too: %o', async (given) => {
    expect(await refused({ ...plain, ...given, rates: { lateralSpread: 0.005 } })).toMatch(
      /rates\.lateralSpread: A front of/,
    );
  });

  test('a spec that is no JSON, no object, or not there', async () => {
    expect(await refused('{"version": 1,')).toMatch(/^The spec is no JSON: /);
    said = '';
    expect(await refused('[1]')).toMatch(/must be a JSON object/);
    said = '';
    expect(await refused(plain, 'other.json', '--out', 'out')).toMatch(
      /other\.json cannot be read: there is no such file/,
    );
  });

  test('files that are missing, no GeoTIFF, or on other cells, each at its layer', async () => {
    await writeFile(join(folder, 'photo.tif'), 'no raster at all');
    await writeFile(
      join(folder, 'other.tif'),
      encodeGeoTiff({ grid: { ...grid, originX: grid.originX + 3 }, values: habitat }),
    );
    const message = await refused({
      ...plain,
      layers: {
        ...plain.layers,
        vigour: { file: 'gone.tif' },
        refuge: { file: 'photo.tif' },
        exposure: { file: 'other.tif' },
        fence: { file: '.' },
      },
    });
    expect(message).toMatch(/layers\.vigour: .*gone\.tif: there is no such file/);
    expect(message).toMatch(/layers\.refuge: .*photo\.tif: Found .*; expected /);
    expect(message).toMatch(/layers\.exposure: .*other\.tif: Found north-west corner at 400003/);
    expect(message).toMatch(/layers\.fence: .*this is a folder/);
  });

  test('numbers that are no shares, at their layer', async () => {
    const layers = { ...plain.layers, vigour: { file: 'habitat.tif' } };
    expect(await refused({ ...plain, layers })).toMatch(/layers\.vigour: Cell 0 holds 2; a share must lie/);
  });

  test('constants alone, uploaded layers and second bands', async () => {
    expect(await refused({ ...plain, layers: { cover: 0.5 } })).toMatch(/layers: None is a raster/);
    said = '';
    const layers = { cover: { layer: 'a'.repeat(64) }, refuge: { file: 'cover.tif', band: 2 } };
    const message = await refused({ ...plain, layers });
    expect(message).toMatch(/layers\.cover\.layer: Names an uploaded raster/);
    expect(message).toMatch(/layers\.refuge\.band: Found 2; files of one band/);
  });

  test('a command line that says too little or too much', async () => {
    expect(await refused(plain, 'spec.json')).toMatch(/Say with --out DIR/);
    said = '';
    expect(await refused(plain, '--out', 'out')).toMatch(/Found no spec; expected one/);
    said = '';
    expect(await refused(plain, 'spec.json', '--out', 'out', '--workers', '0')).toMatch(
      /Found --workers 0; expected a whole number from 1/,
    );
    said = '';
    expect(await refused(plain, 'spec.json', '--to', 'out')).toMatch(/Unknown option '--to'/);
    await mkdir(join(folder, 'full'));
    await writeFile(join(folder, 'full', 'x'), '');
    said = '';
    expect(await refused(plain, 'spec.json', '--out', 'full')).toMatch(/full is not empty \(it holds x\)/);
    said = '';
    expect(await refused(plain, 'spec.json', '--out', 'cover.tif')).toMatch(/cover\.tif is a file/);
  });
});

test('--help explains the command', async () => {
  expect(await run('--help')).toBe(0);
  expect(printed).toMatch(/^npm run simulate -- SPEC\.json --out DIR/);
});

test('--example prints a complete spec that runs as it stands, wherever it is saved', async () => {
  expect(await run('--example')).toBe(0);
  const example = JSON.parse(printed) as Record<string, unknown>;
  const parsed = runSpecSchema.parse(example);
  // Nothing is left to a default: what the schema fills in is there already.
  expect(Object.keys(example).sort()).toEqual(Object.keys(parsed).sort());
  expect(example.rates).toEqual(parsed.rates);
  expect(parsed.actions.length).toBeGreaterThan(10);
  expect(Object.keys(parsed.layers)).toHaveLength(6);
  await mkdir(join(folder, 'elsewhere'));
  await writeFile(join(folder, 'elsewhere', 'spec.json'), `> npm\n${printed}`);
  expect(await run('elsewhere/spec.json', '--out', 'out')).toBe(0);
  const summary = await summaryOf('out');
  expect(summary.engineVersion).toBeTruthy();
  const rows = (await readText('out', 'series.csv')).trimEnd().split('\r\n');
  expect(rows).toHaveLength(2 + 25);
});
