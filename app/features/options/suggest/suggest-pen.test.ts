// @vitest-environment node
import { expect, it } from 'vitest';
import { readSuggest, startingSuggest } from './suggest-pen.ts';

it('reads a number or a budget, and says what is wrong with either', () => {
  expect(readSuggest(startingSuggest, undefined)).toEqual({ by: 'count', count: 10 });
  const budget = { ...startingSuggest, by: 'budget', budget: '2500' } as const;
  expect(readSuggest(budget, 1200)).toEqual({ by: 'budget', budget: 2500, each: 1200 });
  expect(readSuggest(budget, undefined)).toContain('No cost');
  expect(readSuggest(budget, 2501)).toContain('not a single one');
  expect(readSuggest(budget, 0.001)).toContain('1,000');
  expect(readSuggest({ ...startingSuggest, count: '1.5' }, 1)).toContain('whole');
});
