import { expect, test } from 'vitest';
import { recordReplicate, createRun } from '#sim-core/index.ts';
import { allParameters, anyRateNames } from '#sim-core/spec/all-parameters.ts';
import { parameters } from '#sim-core/spec/parameters.ts';
import { fragmentParameters, grazerParameters } from '#sim-core/spec/process-parameters.ts';
import { runSpecSchema, type RunSpecInput } from '#sim-core/spec/run-spec.ts';
import { gridOf, groundOf, specOf } from '#sim-core/testing/setups.ts';
import { beliefQuantile } from './belief-quantile.ts';
import { ratesOfRun, withRates } from './rates-of-run.ts';

const draws = 12;
const spread = { law: 'triangular', low: 0.2, mode: 0.5, high: 1.5 } as const;
const tolerance = { law: 'normal', mean: -2.3, standardDeviation: 0.5 } as const;
const grazing = { law: 'log-normal', median: 0.01, factor: 2 } as const;
const uncertain = { draws, rates: { lateralSpread: spread, tolerance, grazingRate: grazing } };
const given: Partial<RunSpecInput> = { processes: { grazers: {} }, uncertain };
const drawnBy = (replicate: number, changes: Partial<RunSpecInput> = {}) =>
  ratesOfRun(specOf({ ...given, replicate, ...changes }));

/** Share of a law below a value, by halving its quantile function. */
function shareBelow(quantile: (p: number) => number, value: number): number {
  let [low, high] = [0, 1];
  for (let i = 0; i < 50; i++) {
    const middle = (low + high) / 2;
    if (quantile(middle) < value) low = middle;
    else high = middle;
  }
  return low;
}

test('no two tables of rates share a name', () => {
  const tables = [parameters, grazerParameters, fragmentParameters].map((table) => Object.keys(table).length);
  expect(anyRateNames).toHaveLength(tables.reduce((a, b) => a + b));
});

test.each([0, 1, 7])('block %i takes each rate once from every part of its law', (block) => {
  const rows = Array.from({ length: draws }, (_, i) => drawnBy(block * draws + i).drawn);
  for (const [name, belief] of Object.entries(uncertain.rates) as ['tolerance', typeof tolerance][]) {
    const quantile = beliefQuantile(belief, allParameters[name]);
    const parts = rows.map((row) => Math.floor(shareBelow(quantile, row[name]!) * draws));
    expect(parts.sort((a, b) => a - b)).toEqual(Array.from({ length: draws }, (_, i) => i));
  }
});

test('blocks, seeds and rates draw for themselves', () => {
  expect(drawnBy(0).drawn).toEqual(drawnBy(0).drawn);
  expect(drawnBy(draws).drawn).not.toEqual(drawnBy(0).drawn);
  expect(drawnBy(0, { seed: 'other' }).drawn).not.toEqual(drawnBy(0).drawn);
  // Another rate that becomes uncertain changes nothing in those that were.
  const more = {
    draws,
    rates: { ...uncertain.rates, fillRate: { law: 'uniform', low: 0.5, high: 2 } as const },
  };
  expect(drawnBy(3, { uncertain: more }).drawn).toMatchObject(drawnBy(3).drawn);
});

test('works, weather and years change nothing in what is drawn, so options and outlooks share it', () => {
  const { originX, originY } = gridOf(8, 8);
  const mound = { kind: 'mound', year: 2021, x: originX + 2, y: originY - 2, radius: 1 } as const;
  expect(drawnBy(5, { actions: [mound], droughtIndex: -3, years: 30 }).drawn).toEqual(drawnBy(5).drawn);
});

test('drawn rates take the place of the stated ones, in the plant and in its processes alone', () => {
  const { rates, processes, drawn } = drawnBy(4);
  expect(rates).toEqual({
    ...specOf({}).rates,
    lateralSpread: drawn.lateralSpread,
    tolerance: drawn.tolerance,
  });
  expect(processes.grazers?.grazingRate).toBe(drawn.grazingRate);
  expect(processes.fragments).toBeUndefined();
  expect(withRates(specOf({}), { grazingRate: 1 }).processes).toEqual({});
  expect(ratesOfRun(specOf({})).drawn).toEqual({});
});

test('a run with uncertain rates is the run with the rates that it draws', () => {
  const grid = gridOf(16, 12);
  const ground = groundOf(192, { cover: new Float32Array(192).fill(0.4, 0, 60) });
  const run = (spec: ReturnType<typeof specOf>) => {
    const made = createRun({ spec, grid, ground });
    while (made.nextYear());
    return made.result();
  };
  const spec = specOf({ ...given, replicate: 4, droughtIndex: -2 });
  const { rates, processes, drawn } = ratesOfRun(spec);
  const result = run(spec);
  expect(result).toEqual(run({ ...spec, rates, processes, uncertain: undefined }));
  expect(result.digest).not.toBe(run({ ...spec, uncertain: undefined }).digest);
  expect(recordReplicate(result, spec, -3).drawn).toEqual(drawn);
});

test('a spec names beliefs of rates that it has', () => {
  const wrong = (uncertainty: object) =>
    runSpecSchema.safeParse({ ...specOf({}), uncertain: uncertainty }).error?.issues[0];
  expect(wrong({ draws, rates: {} })?.message).toMatch(/leave "uncertain" out/);
  expect(wrong({ draws, rates: { grazingRate: grazing } })).toMatchObject({
    path: ['uncertain', 'rates', 'grazingRate'],
    message: expect.stringMatching(/grazers, which are off/) as string,
  });
  expect(wrong({ draws: 0, rates: { tolerance } })?.path).toEqual(['uncertain', 'draws']);
  expect(wrong({ draws, rates: { speed: tolerance } })?.code).toBe('unrecognized_keys');
});
