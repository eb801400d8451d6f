import { expect, it } from 'vitest';
import { defaultRates, rateNames } from '#sim-core/spec/parameters.ts';
import { plantErrors, rateGroups, startPlant, typeRate } from './plant-draft.ts';

const start = startPlant({ name: 'Cordgrass', rates: defaultRates });

it('asks for every rate once', () => {
  expect(rateGroups.flatMap((group) => group.names).sort()).toEqual([...rateNames].sort());
});

it('follows what is typed, and holds the last rate that made sense', () => {
  const typed = typeRate(start, 'tolerance', '−3,1');
  expect(typed.rates.tolerance).toBe(-3.1);
  const half = typeRate(typed, 'tolerance', '-');
  expect(half.rates.tolerance).toBe(-3.1);
  expect(half.typed.tolerance).toBe('-');
  expect(plantErrors(half, [])).toEqual({
    tolerance: 'Found “-”. Tolerance must lie between -10 and 5 index',
  });
});

it('says what is out of range, and what the engine refuses', () => {
  const wrong = typeRate({ ...start, name: ' ' }, 'carryOver', '1.5');
  const refused = [{ field: 'rates.lateralSpread', message: 'A front of 9 m/yr cannot be shown' }];
  expect(plantErrors(wrong, refused)).toEqual({
    name: 'Give the plant a name',
    carryOver: 'Found “1.5”. Carry-over must lie between 0 and 1 share a year',
    lateralSpread: 'A front of 9 m/yr cannot be shown',
  });
  expect(plantErrors(start, [])).toEqual({});
});
