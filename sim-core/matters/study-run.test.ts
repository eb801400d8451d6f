import { expect, test } from 'vitest';
import { runSpecSchema, type RunSpecInput } from '#sim-core/spec/run-spec.ts';
import { ratesOfRun } from '#sim-core/belief/rates-of-run.ts';
import { specAtRates, studyKeys } from './study-run.ts';

const given: RunSpecInput = {
  version: 1,
  seed: 'keys',
  surveyYear: 2024,
  years: 5,
  rates: {},
  processes: { grazers: {} },
  uncertain: { draws: 8, rates: { lateralSpread: { law: 'uniform', low: 0.2, high: 0.9 } } },
  layers: { cover: 0.5 },
};
const base = (changes: Partial<RunSpecInput> = {}) =>
  ({ ...runSpecSchema.parse(given), ...changes }) as ReturnType<typeof runSpecSchema.parse>;

test('a key follows from the rates that a run comes to, the future and all else that decides it', () => {
  const keyOf = studyKeys(base());
  const key = keyOf(3, { lateralSpread: 0.4 });
  expect(key).toMatch(/^[0-9a-f]{64}$/);
  // Fields in another order, another replicate of the base and other beliefs make no other run.
  const turned = Object.fromEntries(Object.entries(base({ replicate: 9 })).reverse()) as ReturnType<
    typeof base
  >;
  expect(studyKeys({ ...turned, uncertain: undefined })(3, { lateralSpread: 0.4 })).toBe(key);
  // A rate that is set to the value that it has anyway is the same run.
  expect(keyOf(3, { lateralSpread: 0.4, fillRate: base().rates.fillRate })).toBe(key);
  const others = [
    keyOf(4, { lateralSpread: 0.4 }),
    keyOf(3, { lateralSpread: 0.41 }),
    keyOf(3, { lateralSpread: 0.4, grazingRate: 0.3 }),
    studyKeys(base({ seed: 'other' }))(3, { lateralSpread: 0.4 }),
    studyKeys(base({ years: 6 }))(3, { lateralSpread: 0.4 }),
    studyKeys(
      base({ actions: [{ kind: 'loss', year: 2025, area: { kind: 'everywhere' }, share: 0.5 }] as never }),
    )(3, {
      lateralSpread: 0.4,
    }),
  ];
  expect(new Set([key, ...others]).size).toBe(7);
});

test('the run of a spec at the rates that a future draws is that future', () => {
  const spec = base({ replicate: 5 });
  const { drawn, rates, processes } = ratesOfRun(spec);
  const at = specAtRates(base(), 5, drawn);
  expect(at.uncertain).toBeUndefined();
  expect(ratesOfRun(at)).toMatchObject({ rates, processes });
});
