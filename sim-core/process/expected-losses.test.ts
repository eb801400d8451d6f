import { describe, expect, test } from 'vitest';
import { createRun } from '#sim-core/run/create-run.ts';
import { gridProblems } from '#sim-core/run/grid-problems.ts';
import { buildGround } from '#sim-core/grid/build-ground.ts';
import type { ExpectedLoss } from '#sim-core/spec/outlook-changes.ts';
import { runSpecSchema, type RunSpecInput } from '#sim-core/spec/run-spec.ts';
import { gridOf } from '#sim-core/testing/setups.ts';
import { datedLosses } from './expected-losses.ts';

const span = { seed: 'sallow', replicate: 0, surveyYear: 2020, years: 50 };
const yearsOf = (losses: ExpectedLoss[], given: Partial<typeof span> = {}) =>
  datedLosses({ ...span, ...given, losses }).map(({ years }) => years);

describe('the years of a loss', () => {
  test('a dated one comes in its year in every replicate', () => {
    for (const replicate of [0, 7])
      expect(yearsOf([{ year: 2031, share: 0.5 }], { replicate })).toEqual([[2031]]);
  });
  test('one by chance comes as often as its chance says, within its years alone', () => {
    const met = Array.from({ length: 400 }, (_, replicate) =>
      yearsOf([{ chance: 0.1, share: 1, from: 2031, until: 2060 }], { replicate }),
    ).flat(2);
    expect(Math.min(...met)).toBeGreaterThanOrEqual(2031);
    expect(Math.max(...met)).toBeLessThanOrEqual(2060);
    // 400 futures × 30 years; four standard errors of a binomial share.
    expect(Math.abs(met.length / 12_000 - 0.1)).toBeLessThan(4 * Math.sqrt(0.09 / 12_000));
  });
  test('its luck is its own: other losses, years, horizons and larger chances leave what came', () => {
    const loss = { chance: 0.2, share: 0.5 };
    const [alone] = yearsOf([loss]);
    expect(alone.length).toBeGreaterThan(2);
    expect(yearsOf([loss, { chance: 0.9, share: 1 }])[0]).toEqual(alone);
    expect(yearsOf([{ ...loss, from: 2040 }])[0]).toEqual(alone.filter((year) => year >= 2040));
    expect(yearsOf([loss], { years: 30 })[0]).toEqual(alone.filter((year) => year <= 2050));
    expect(yearsOf([{ ...loss, chance: 0.5 }])[0]).toEqual(expect.arrayContaining([...alone]));
    expect(yearsOf([loss], { replicate: 1 })[0]).not.toEqual(alone);
  });
});

const grid = gridOf(8, 8, 2);
const none = () => {
  throw new Error('No raster here');
};
const layers = { capacity: 1, vigour: 1, exposure: 0, refuge: 0, fence: 0, cover: 0.5 };
const ground = buildGround(layers, grid, none);
const run = (more: Partial<RunSpecInput>) => {
  const spec = runSpecSchema.parse({
    ...{ version: 1, mode: 'mean-field', seed: 'a', surveyYear: 2020, years: 3, rates: {} },
    layers: { capacity: 1, cover: 0.5 },
    ...more,
  });
  const going = createRun({ spec, grid, ground });
  while (going.nextYear());
  return going.result();
};

describe('in a run', () => {
  test('the whole site loses its share in the year, on top of what the option does', () => {
    const { series } = run({ losses: [{ year: 2022, share: 0.4 }] });
    expect(series.map((row) => row.lostToEvents > 0)).toEqual([false, false, true, false]);
    expect(series[2].lostToEvents).toBeCloseTo(0.4 * series[1].coveredArea, 3);
    const area = { shape: 'disc', x: grid.originX + 4, y: grid.originY - 4, radius: 2 } as const;
    const part = run({ losses: [{ year: 2022, share: 0.4, area }] }).series[2].lostToEvents;
    expect(part).toBeGreaterThan(0);
    expect(part).toBeLessThan(series[2].lostToEvents / 3);
  });
  test('is the loss that an option expects, and none leaves the digest as it was', () => {
    const ring = [
      [grid.originX, grid.originY],
      [grid.originX + 16, grid.originY],
      [grid.originX + 16, grid.originY - 16],
      [grid.originX, grid.originY - 16],
    ] as [number, number][];
    const ofOption = run({
      actions: [{ kind: 'loss', year: 2022, area: { shape: 'polygon', ring }, share: 0.4 }],
    });
    expect(run({ losses: [{ year: 2022, share: 0.4 }] }).digest).toBe(ofOption.digest);
    expect(run({ losses: [] }).digest).toBe(run({}).digest);
    expect(run({}).digest).not.toBe(ofOption.digest);
  });
  test('what cannot come is refused at its field', () => {
    const said = (losses: unknown[]) => {
      const parsed = runSpecSchema.safeParse({
        ...{ version: 1, seed: 'a', surveyYear: 2020, years: 3, rates: {}, layers: { cover: 1 } },
        losses,
      });
      return parsed.success ? [] : parsed.error.issues.map(({ path }) => path.join('.'));
    };
    expect(said([{ year: 2030, share: 0.4 }])).toContain('losses.0.year');
    expect(said([{ chance: 0.1, share: 0.4, from: 2022, until: 2021 }])).toContain('losses.0.until');
    expect(said([{ chance: 0, share: 0.4 }]).length).toBeGreaterThan(0);
    const far = { shape: 'disc', x: 1e7, y: 1e7, radius: 5 } as const;
    const spec = runSpecSchema.parse({
      ...{ version: 1, seed: 'a', surveyYear: 2020, years: 3, rates: {} },
      layers: { capacity: { file: 'k.tif' }, cover: 1 },
      losses: [{ year: 2021, share: 0.4, area: far }],
    });
    expect(gridProblems(spec, grid).map(({ field }) => field)).toContain('losses.0.area');
  });
});
