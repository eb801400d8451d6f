import { createHash } from 'node:crypto';
import { describe, expect, test } from 'vitest';
import type { CreateKernel } from '#sim-core/kernel/kernel.ts';
import { createReferenceKernel } from '#sim-core/kernel/reference/reference-kernel.ts';
import { runResultSchema, seriesRowSchema } from '#sim-core/spec/run-result.ts';
import type { RunSpecInput } from '#sim-core/spec/run-spec.ts';
import { gridOf, groundOf, specOf } from '#sim-core/testing/setups.ts';
import { createRun, type RunInput } from './create-run.ts';
import { engineVersion } from './engine-version.ts';
import { RunProblem } from './run-problem.ts';

const width = 24;
const height = 18;
const grid = gridOf(width, height);
/** Ground with a bare middle, a channel that holds nothing, and a refuge; drawn by a small generator of its own. */
function ground() {
  let state = 12345;
  const next = () => (state = (Math.imul(state, 1103515245) + 12345) & 0x7fffffff) / 0x80000000;
  const of = (value: (x: number, y: number) => number) =>
    Uint8Array.from({ length: width * height }, (_, i) => value(i % width, Math.floor(i / width)));
  return groundOf(width * height, {
    capacity: of((x) => (x === 11 ? 0 : 255 - x)),
    vigour: of((_, y) => 255 - 3 * y),
    exposure: of((x) => x * 4),
    refuge: of((x, y) => (x > 3 && x < 7 && y > 3 && y < 7 ? 255 : 0)),
    cover: Float32Array.from({ length: width * height }, (_, i) => (i % width < 6 ? next() : 0)),
  });
}
const spec = (given: Partial<RunSpecInput> = {}) =>
  specOf({
    years: 6,
    rates: { backgroundLoss: 0.05 },
    droughtIndex: [0.5, -1, -3.2, -0.5, 0, 1],
    actions: [
      { kind: 'mound', year: 2022, x: grid.originX + 15, y: grid.originY - 9, radius: 2, halo: 2 },
      {
        kind: 'planting',
        year: 2022,
        area: { shape: 'disc', x: grid.originX + 15, y: grid.originY - 9, radius: 1.5 },
        cover: 0.4,
      },
      {
        kind: 'loss',
        year: 2023,
        area: { shape: 'disc', x: grid.originX + 3, y: grid.originY - 3, radius: 2 },
        share: 0.5,
      },
    ],
    ...given,
  });
function runAll(input: RunInput, createKernel?: CreateKernel) {
  const run = createRun(input, createKernel);
  const years = [run.survey];
  for (let outcome = run.nextYear(); outcome; outcome = run.nextYear()) years.push(outcome);
  return { run, years, result: run.result() };
}

describe('a run', () => {
  /**
   * Change detectors: these digests were written down from this engine, not from a source, and may be wrong. When one
   * changes on purpose, write the new one here and raise `engineVersion`; when it changes otherwise, something broke.
   */
  test.each([
    ['mean-field', '5b9892578f5f3864b4a2f4aa005010ca97cd6795f6a566e4cb30cc1e347c1c0e'],
    ['counts', '014f62bc95a4f698065d25c1dceba6d5a090ecbd8fbaf3ccef1730e24bded316'],
  ] as const)('keeps the digest of engine 2.1.0 (%s)', (mode, digest) => {
    expect(engineVersion).toBe('2.1.0');
    expect(runAll({ spec: spec({ mode }), grid, ground: ground() }).result.digest).toBe(digest);
  });

  test('gives a row a step, a frame a year, and the digest of all frames', () => {
    const { years, result } = runAll({ spec: spec({ stepsPerYear: 4 }), grid, ground: ground() });
    expect(years.map((y) => y.year)).toEqual([2020, 2021, 2022, 2023, 2024, 2025, 2026]);
    expect(years.map((y) => y.rows.length)).toEqual([1, 4, 4, 4, 4, 4, 4]);
    expect(result.series).toEqual(years.flatMap((y) => y.rows));
    expect(result.series.slice(0, 4).map((r) => r.time)).toEqual([2020, 2020.25, 2020.5, 2020.75]);
    expect(result.series[0].droughtIndex).toBeNull();
    expect(result.series.slice(1, 9).map((r) => r.droughtIndex)).toEqual([
      0.5, 0.5, 0.5, 0.5, -1, -1, -1, -1,
    ]);
    const hash = createHash('sha256');
    for (const { frame } of years) hash.update(frame!);
    expect(result.digest).toBe(hash.digest('hex'));
    expect(runResultSchema.parse(result)).toEqual(result);
    for (const row of result.series) seriesRowSchema.parse(row);
  });

  test('reports the years asked for; cover is as the kernel holds it', () => {
    const run = createRun({ spec: spec({ reportYears: [2021, 2026] }), grid, ground: ground() });
    expect(run.survey.frame).toBeUndefined();
    const first = run.nextYear();
    expect(first?.frame).toEqual(Uint8Array.from(run.cover(), (c) => Math.round(255 * c)));
    expect(run.nextYear()?.frame).toBeUndefined();
    const before = run.cover();
    const kept = before.slice();
    run.nextYear();
    expect(before).toEqual(kept);
    expect(run.cover()).not.toEqual(kept);
  });

  test('knows its result after the last year only, and tells its steps', () => {
    const run = createRun({
      spec: spec({ years: 1, droughtIndex: 0, actions: [], stepsPerYear: 2 }),
      grid,
      ground: ground(),
    });
    expect(() => run.result()).toThrow(/stands at 2020; its result is known after 2021/);
    const told: [number, number][] = [];
    run.nextYear((done, of) => told.push([done, of]));
    expect(told).toEqual([
      [1, 2],
      [2, 2],
    ]);
    expect(run.nextYear()).toBeUndefined();
    expect(run.result()).toBe(run.result());
  });

  test('leaves the ground as it was', () => {
    const given = ground();
    runAll({ spec: spec(), grid, ground: given });
    expect(given).toEqual(ground());
  });

  test('changes with seed and replicate, but every replicate starts from the same survey', () => {
    const digests = [{}, { seed: 'other' }, { replicate: 1 }].map((given) => {
      const { result, years } = runAll({ spec: spec(given), grid, ground: ground() });
      return [result.digest, years[0].frame!.join()];
    });
    expect(new Set(digests.map(([d]) => d)).size).toBe(3);
    expect(digests[2][1]).toBe(digests[0][1]);
  });

  test('what is dated in a year shows in its frame, not before', () => {
    const at = 9 * width + 15;
    const { years } = runAll({
      spec: spec({ mode: 'mean-field', rates: { backgroundLoss: 0, droughtLoss: 0 } }),
      grid,
      ground: ground(),
    });
    const frames = new Map(years.map((y) => [y.year, y.frame!]));
    expect(frames.get(2021)![at]).toBe(0);
    expect(frames.get(2022)![at]).toBeGreaterThan(0.4 * 255);
    const lost = years.map((y) => y.rows[0].lostToEvents > 0);
    expect(lost).toEqual([false, false, false, true, false, false, false]);
  });

  test('drought of a year kills in that year', () => {
    const { years } = runAll({ spec: spec({ actions: [] }), grid, ground: ground() });
    const drought = years.map((y) => y.rows[0].lostToDrought);
    expect(drought.indexOf(Math.max(...drought))).toBe(3);
    expect(years[3].rows[0].coveredArea).toBeLessThan(years[2].rows[0].coveredArea);
  });

  test('the yearly balance holds in mean-field: what was there, plus recruits, less losses', () => {
    // Without recruits (a tiny fill-in rate balanced by a carry-over of 1) cover can only go where losses say.
    const { years } = runAll({
      spec: spec({
        mode: 'mean-field',
        rates: { fillRate: 0.01, carryOver: 1, lateralSpread: 0.02, backgroundLoss: 0.1, refugeGrowth: 0 },
      }),
      grid,
      ground: groundOf(width * height, { cover: new Float32Array(width * height).fill(1) }),
    });
    for (let y = 1; y < years.length; y++) {
      const [before, row] = [years[y - 1].rows[0], years[y].rows[0]];
      const lost = row.lostToDrought + row.lostToBackground + row.lostToEvents;
      const gained = row.coveredArea - (before.coveredArea - lost);
      expect(lost).toBeGreaterThan(0);
      expect(gained).toBeGreaterThanOrEqual(-1e-3);
      expect(gained).toBeLessThan(0.011 * before.coveredArea);
    }
  });

  test('closing years: the survey year where it is closed already, 0 open, −32768 where nothing can grow', () => {
    const { run, result } = runAll({ spec: spec(), grid, ground: ground() });
    const closing = run.closing();
    expect(closing[11]).toBe(-32768);
    const years = new Set(closing);
    expect([...years].every((y) => y === 0 || y === -32768 || (y >= 2020 && y <= 2026))).toBe(true);
    expect(years.has(2020) && years.has(2022)).toBe(true);
    const closed = closing.filter((y) => y > 0).length;
    expect(result.series.at(-1)?.closedArea).toBe(closed);
    expect(result.series.slice(1).reduce((sum, r) => sum + r.closingArea, result.series[0].closedArea)).toBe(
      closed,
    );
    expect(closing.filter((y) => y === 2022)).toHaveLength(result.series[2].closingArea);
  });

  test('recovers where it grows undisturbed, and is censored where it has no time', () => {
    const calm = { droughtIndex: 0, actions: [], rates: { lateralSpread: 1.5 } };
    const long = runAll({ spec: spec({ ...calm, years: 40 }), grid, ground: ground() }).result;
    expect(long.recoveredYear).toBeGreaterThan(2025);
    expect(long.recoveredYear).toBeLessThan(2060);
    const row = long.series.find((r) => r.time === long.recoveredYear);
    expect(row?.recoveredShare).toBeGreaterThanOrEqual(0.9);
    expect(row!.coveredArea / long.referenceArea).toBeCloseTo(row!.recoveredShare, 12);
    expect(
      runAll({ spec: spec({ ...calm, years: 3 }), grid, ground: ground() }).result.recoveredYear,
    ).toBeNull();
  });
});

describe('processes beside spread and loss', () => {
  const droughts = { years: 8, droughtIndex: [-1, -3.5, -4.5, -4, 0, 1, -4, 0] };
  const grazed = (given: Partial<RunSpecInput> = {}, createKernel?: CreateKernel) =>
    runAll(
      {
        spec: spec({
          ...droughts,
          processes: { grazers: { initialGrazers: 100, grazingRate: 0.02 } },
          ...given,
        }),
        grid,
        ground: ground(),
      },
      createKernel,
    );

  test('are off: a spec that names none and one that names none of them are the same run', () => {
    expect(runAll({ spec: spec({ processes: {} }), grid, ground: ground() }).result.digest).toBe(
      runAll({ spec: spec(), grid, ground: ground() }).result.digest,
    );
  });

  test.each(['mean-field', 'counts'] as const)(
    'grazers take their share, and the losses tell it (%s)',
    (mode) => {
      const { series } = grazed({ mode }).result;
      const without = runAll({ spec: spec({ ...droughts, mode }), grid, ground: ground() }).result.series;
      expect(series.slice(1).every((row) => row.lostToGrazing > 0)).toBe(true);
      expect(without.every((row) => row.lostToGrazing === 0)).toBe(true);
      expect(series.at(-1)!.coveredArea).toBeLessThan(0.9 * without.at(-1)!.coveredArea);
      const reference = grazed({ mode }, createReferenceKernel).result.series;
      // The luck of single clumps moves on with the rounding of single chances.
      const near = mode === 'counts' ? 0.05 : 1e-4;
      series.forEach((row, i) =>
        expect(Math.abs(row.coveredArea - reference[i].coveredArea)).toBeLessThan(
          near * row.coveredArea + near,
        ),
      );
    },
  );

  test('fences keep them out while they stand', () => {
    const everywhere = { shape: 'disc' as const, x: grid.originX + 12, y: grid.originY - 9, radius: 40 };
    const lost = (until: number | undefined) =>
      grazed({
        mode: 'mean-field',
        actions: [{ kind: 'fence', year: 2022, until, area: everywhere }],
      }).result.series.map((row) => row.lostToGrazing > 0);
    expect(lost(undefined)).toEqual([false, true, false, false, false, false, false, false, false]);
    expect(lost(2024)).toEqual([false, true, false, false, false, true, true, true, true]);
    const fenced = grazed({ actions: [{ kind: 'fence', year: 2022, area: everywhere }] });
    expect(fenced.result.warnings.join(' ')).not.toMatch(/Fences/);
    const surveyed = { ...ground(), fence: new Uint8Array(width * height).fill(255) };
    const { series } = runAll({
      spec: spec({ ...droughts, processes: { grazers: {} } }),
      grid,
      ground: surveyed,
    }).result;
    expect(series.every((row) => row.lostToGrazing === 0)).toBe(true);
  });

  test('fragments take root far from where anything stands, in counts mode alone', () => {
    const quiet = { years: 3, droughtIndex: 1, actions: [], rates: { lateralSpread: 0.3 } };
    const east = (given: Partial<RunSpecInput>) => {
      const { run, result } = runAll({ spec: spec({ ...quiet, ...given }), grid, ground: ground() });
      return { cells: run.cover().filter((c, i) => c > 0 && i % width > 11).length, result };
    };
    const processes = { fragments: { fragmentRate: 0.5, fragmentDistance: 10 } };
    expect(east({}).cells).toBe(0);
    const scattered = east({ processes });
    expect(scattered.cells).toBeGreaterThan(20);
    expect(east({ processes }).result.digest).toBe(scattered.result.digest);
    expect(east({ processes, replicate: 1 }).result.digest).not.toBe(scattered.result.digest);
    const field = east({ processes, mode: 'mean-field' });
    expect(field.result.digest).toBe(east({ mode: 'mean-field' }).result.digest);
    expect(field.result.warnings.join(' ')).toMatch(/Fragments .* left out in mean-field/);
  });

  test('series of runs made before there were grazers are read as without', () => {
    const { lostToGrazing, ...old } = runAll({ spec: spec(), grid, ground: ground() }).result.series[2];
    expect(lostToGrazing).toBe(0);
    expect(seriesRowSchema.parse(old)).toEqual({ ...old, lostToGrazing: 0 });
  });
});

describe('a run that cannot be is refused at its fields', () => {
  const problems = (given: Partial<RunInput>) => {
    try {
      createRun({ spec: spec(), grid, ground: ground(), ...given });
    } catch (error) {
      if (error instanceof RunProblem) return error.problems;
      throw error;
    }
    return [];
  };
  test('a front that no kernel gives', () => {
    expect(problems({ spec: spec({ rates: { lateralSpread: 0.005 } }) })[0]).toMatchObject({
      field: 'rates.lateralSpread',
    });
  });
  test('works off the site', () => {
    const off = spec({ actions: [{ kind: 'mound', year: 2022, x: 0, y: 0, radius: 1 }] });
    expect(problems({ spec: off })[0]).toMatchObject({ field: 'actions.0' });
    const inChannel = spec({
      actions: [{ kind: 'clumps', year: 2022, points: [[grid.originX + 11.5, grid.originY - 2]] }],
    });
    expect(problems({ spec: inChannel })[0]).toMatchObject({ field: 'actions.0.points.0' });
  });
  test('a layer of another size, or ground that holds nothing', () => {
    const bare = new Uint8Array(width * height);
    expect(problems({ ground: { ...ground(), exposure: new Uint8Array(5) } })).toEqual([
      { field: 'layers.exposure', message: 'Found 5 cells; expected 24 × 18 = 432' },
    ]);
    expect(problems({ ground: { ...ground(), capacity: bare } })[0]).toMatchObject({
      field: 'layers.capacity',
    });
  });
  test('ground on which nothing grows still runs, with a warning; so do fences without grazers', () => {
    const vigour = new Uint8Array(width * height);
    const fence = { shape: 'disc' as const, x: grid.originX + 3, y: grid.originY - 3, radius: 2 };
    const { result } = runAll({
      spec: spec({ actions: [{ kind: 'fence', year: 2021, area: fence }] }),
      grid,
      ground: { ...ground(), vigour },
    });
    expect(result.referenceArea).toBe(0);
    expect(result.recoveredYear).toBeNull();
    expect(result.series.every((r) => r.recoveredShare === 0)).toBe(true);
    expect(result.warnings.join(' ')).toMatch(/Nothing grows from little.*Fences keep grazers out/);
  });
});
