// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { processesSchema } from '#sim-core/spec/processes.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';
import { composeRunSpec } from './compose-run-spec.ts';
import { layerFixture, siteFixture } from './testing/site-fixture.ts';

const choices = { mode: 'counts', seed: ' tide-7 ' } as const;
const wait = { works: [] };
const mound = (more: Partial<Extract<Action, { kind: 'mound' }>> = {}): Action => ({
  kind: 'mound',
  year: 2028,
  x: 1002.5,
  y: 1998.5,
  radius: 1,
  strength: 1,
  halo: 0,
  ...more,
});

describe('composeRunSpec', () => {
  it('takes each layer by its hash and its numbers by table or scale', () => {
    const { spec } = composeRunSpec(siteFixture(), { works: [mound()] }, choices);
    expect(spec?.layers).toEqual({
      capacity: { layer: 'a'.repeat(64), classes: { 1: 0, 2: 0.9 } },
      vigour: { layer: 'a'.repeat(64), classes: { 1: 0, 2: 1 } },
      cover: { layer: 'b'.repeat(64), scale: 0.01 },
      refuge: { layer: 'c'.repeat(64), scale: 1 / 255 },
      exposure: 0,
      fence: 0,
    });
    expect(spec).toMatchObject({
      seed: 'tide-7',
      mode: 'counts',
      surveyYear: 2026,
      years: 4,
      droughtIndex: [0, -1, -4, 0],
      actions: [mound()],
      rates: defaultRates,
    });
  });

  it('takes the processes of the plant, none unless they are on, and says where theirs are mended', () => {
    const site = siteFixture();
    expect(composeRunSpec(site, wait, choices).spec?.processes).toEqual({});
    const grazed = (grazerSpread: number) => {
      const { plant } = siteFixture();
      const processes = processesSchema.parse({ grazers: { grazerSpread } });
      return composeRunSpec({ ...site, plant: { ...plant, processes } }, wait, choices);
    };
    expect(grazed(3).spec?.processes.grazers).toMatchObject({ grazerSpread: 3, grazingRate: 0.01 });
    expect(grazed(500).problems).toMatchObject([{ field: 'processes.grazers.grazerSpread', mend: 'plant' }]);
  });

  it('runs without a refuge layer', () => {
    const layers = [layerFixture('habitat'), layerFixture('cover')];
    expect(composeRunSpec(siteFixture({ layers }), wait, choices).spec?.layers.refuge).toBe(0);
  });

  it.each([
    ['no layers', { layers: [] }, ['layers.capacity', 'layers.cover']],
    [
      'no class table',
      { layers: [layerFixture('habitat', { classes: null }), layerFixture('cover')] },
      ['layers.capacity'],
    ],
    [
      'no class that can hold the plant',
      {
        layers: [
          layerFixture('habitat', {
            classes: [{ value: 1, name: 'creek', colour: '#b7c4ce', capacity: 0, vigour: 0 }],
          }),
          layerFixture('cover'),
        ],
      },
      ['layers.capacity'],
    ],
    [
      'per cent taken for shares',
      { layers: [layerFixture('habitat'), layerFixture('cover', { maximum: 100 })] },
      ['layers.cover'],
    ],
  ])('says what the ground lacks: %s', (_, site, fields) => {
    const { problems } = composeRunSpec(siteFixture(site), wait, choices);
    expect(problems?.map((p) => p.field)).toEqual(fields);
    expect(problems?.every((p) => p.mend === 'ground')).toBe(true);
  });

  it('says at which field, and where it is mended, when the schema refuses', () => {
    const { problems } = composeRunSpec(siteFixture(), { works: [mound({ year: 2031 })] }, choices);
    expect(problems).toEqual([
      {
        field: 'actions.0.year',
        mend: 'options',
        message: 'Number 1 of the works: Dated 2031; works must fall in the simulated years 2027 to 2030',
      },
    ]);
    expect(composeRunSpec(siteFixture(), wait, { ...choices, seed: '  ' }).problems?.[0]).toMatchObject({
      field: 'seed',
      mend: 'form',
    });
  });

  it('asks the engine: works off the grid and rates that no kernel can give', () => {
    const off = composeRunSpec(siteFixture(), { works: [mound(), mound({ x: 5000 })] }, choices);
    expect(off.problems).toMatchObject([{ field: 'actions.1', mend: 'options' }]);
    const rates = { ...defaultRates, lateralSpread: 20, fillRate: 0.01 };
    const steep = composeRunSpec(siteFixture({ plant: { ...siteFixture().plant, rates } }), wait, choices);
    expect(steep.problems).toMatchObject([{ field: 'rates.lateralSpread', mend: 'plant' }]);
  });
});
