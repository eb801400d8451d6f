// @vitest-environment node
import { expect, it } from 'vitest';
import type { Run } from '#contract/runs.ts';
import { outlookOfRun, plantOfRun } from './origins-in-words.ts';

const run = (droughtIndex: unknown, outlook: unknown, replicate = 0) =>
  ({ spec: { droughtIndex, replicate }, origins: { outlook } }) as unknown as Run;

it('names the outlook of a run, and which future of it', () => {
  const drawn = { kind: 'palmer-type', standardDeviation: 2 };
  expect(outlookOfRun(run(drawn, { name: 'Dry', weather: 'drawn' }, 2))).toBe(
    'Dry, future 3 of its drawn weather',
  );
  expect(outlookOfRun(run([0, 1], { name: 'Dry', weather: 'listed' }))).toBe('Dry, its listed years');
  expect(outlookOfRun(run([0, 1], null))).toBe('listed years; as none of the site’s outlooks had it');
  expect(outlookOfRun({ ...run(drawn, null, 4), origins: null })).toBe('drawn weather, future 5');
});

it('names the plant, its profile and version', () => {
  const profile = { name: 'Bay grass', version: 2, changed: true };
  expect(plantOfRun({ name: 'Grass', profile, asSet: true })).toBe(
    'Grass, from “Bay grass”, version 2; changed since',
  );
  expect(plantOfRun({ name: 'Grass', profile: null, asSet: false })).toBe(
    'Grass, typed in on the site; with rates of this run’s own',
  );
});
