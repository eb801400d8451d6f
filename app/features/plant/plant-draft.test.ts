import { expect, it } from 'vitest';
import { plantSchema } from '#contract/plants.ts';
import { defaultRates, parameters, rateNames } from '#sim-core/spec/parameters.ts';
import { grazerParameters } from '#sim-core/spec/process-parameters.ts';
import { plantErrors, plantOf, rateGroups, startPlant, wrongFields } from './plant-draft.ts';
import { typeRate } from './rate-sheet.ts';

const plant = plantSchema.parse({ name: 'Cordgrass', rates: defaultRates });
const start = startPlant(plant);
const none = { rates: {}, grazers: {}, fragments: {}, beliefs: {}, fieldNumbers: {} };

it('asks for every rate once', () => {
  expect(rateGroups.flatMap((group) => group.names).sort()).toEqual([...rateNames].sort());
});

it('follows what is typed, and holds the last rate that made sense', () => {
  const typed = typeRate(parameters, start.rates, 'tolerance', '−3,1');
  expect(typed.values.tolerance).toBe(-3.1);
  const half = typeRate(parameters, typed, 'tolerance', '-');
  expect(half.values.tolerance).toBe(-3.1);
  expect(half.typed.tolerance).toBe('-');
  expect(plantErrors({ ...start, rates: half }, [])).toEqual({
    ...none,
    rates: { tolerance: 'Found “-”. Tolerance must lie between -10 and 5 index' },
  });
});

it('says what is out of range, and what the engine refuses', () => {
  const rates = typeRate(parameters, start.rates, 'carryOver', '1.5');
  const refused = [{ field: 'rates.lateralSpread', message: 'A front of 9 m/yr cannot be shown' }];
  const errors = plantErrors({ ...start, name: ' ', rates }, refused);
  expect(errors).toEqual({
    ...none,
    name: 'Give the plant a name',
    rates: {
      carryOver: 'Found “1.5”. Carry-over must lie between 0 and 1 share a year',
      lateralSpread: 'A front of 9 m/yr cannot be shown',
    },
  });
  expect(wrongFields(errors)).toBe(3);
  expect(plantErrors(start, [])).toEqual(none);
});

it('has no processes until one is turned on; what is typed into one that is off is neither judged nor saved', () => {
  expect(plantOf(start)).toEqual({ ...plant, processes: {} });
  const wrong = { ...start.grazers, ...typeRate(grazerParameters, start.grazers, 'grazingRate', '-1') };
  expect(plantErrors({ ...start, grazers: wrong }, [])).toEqual(none);
  expect(plantOf({ ...start, grazers: wrong }).processes).toEqual({});
  expect(plantErrors({ ...start, grazers: { ...wrong, on: true } }, []).grazers.grazingRate).toMatch(
    /Found “-1”/,
  );
  const far = [{ field: 'processes.grazers.grazerSpread', message: 'Too far' }];
  const on = { ...start, grazers: { ...start.grazers, on: true } };
  expect(plantErrors(on, far).grazers).toEqual({ grazerSpread: 'Too far' });
  const saved = plantOf(on);
  expect(saved.processes?.grazers?.grazingRate).toBe(grazerParameters.grazingRate.default);
  expect(startPlant(saved).grazers.on).toBe(true);
  expect(startPlant(saved).fragments.on).toBe(false);
});
