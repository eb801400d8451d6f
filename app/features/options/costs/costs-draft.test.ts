// @vitest-environment node
import { expect, it } from 'vitest';
import type { UnitCosts } from '#sim-core/spec/unit-costs.ts';
import { draftOfCosts, readCosts } from './costs-draft.ts';

const costs: UnitCosts = {
  currency: 'NOK',
  mound: 420,
  clump: 3.5,
  fenceMetre: 12,
  visit: 900,
  visitsPerYear: 2,
  perYear: 0,
  discountRate: 0.07,
  budget: null,
};

it('comes back from the sentence as it was, with and without a budget', () => {
  for (const budget of [null, 20_000])
    expect(readCosts(draftOfCosts({ ...costs, budget })).costs).toEqual({ ...costs, budget });
  expect(draftOfCosts(costs)).toMatchObject({ discountRate: '7', budget: '' });
});

it.each([
  ['mound', '-1'],
  ['clump', ''],
  ['visitsPerYear', '1.5'],
  ['discountRate', '101'],
  ['budget', 'a lot'],
] as const)('says what is wrong with %s', (field, text) => {
  const { errors } = readCosts({ ...draftOfCosts(costs), [field]: text });
  expect(Object.keys(errors ?? {})).toEqual([field]);
});
