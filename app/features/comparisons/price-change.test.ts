// @vitest-environment node
import { expect, it } from 'vitest';
import { unitCostsSchema } from '#sim-core/spec/unit-costs.ts';
import { priceChangeWords } from './price-change.ts';

const then = unitCostsSchema.parse({ currency: 'EUR', mound: 300, budget: 20_000 });
const today = (changes: object) => ({
  costs: { ...then, ...changes },
  changedAt: '2026-12-01T10:00:00.000Z',
  changedBy: 'Ines Marlow',
});

it('says where the prices of today differ from those of the plan', () => {
  const plan = { unitCosts: then, currency: 'EUR' };
  expect(priceChangeWords(plan, today({}))).toBe('');
  const words = priceChangeWords(plan, today({ budget: 500, mound: 310 }));
  expect(words).toContain('the budget €500 (then €20,000)');
  expect(words).toContain('a mound €310 (then €300)');
  expect(words).not.toContain('clump');
  expect(priceChangeWords(plan, today({ budget: null }))).toContain('the budget not set (then €20,000)');
});

it('says that nothing was kept, of plans from before', () => {
  expect(priceChangeWords({ unitCosts: undefined, currency: 'EUR' }, today({}))).toMatch(/were not kept/);
  expect(priceChangeWords({ unitCosts: undefined, currency: null }, today({}))).toBe('');
});
