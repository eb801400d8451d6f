// @vitest-environment node
import { expect, it } from 'vitest';
import { bareClosing } from './bare-closing.ts';

const summary = (closable: number, ...areas: number[]) => ({
  closable,
  closedBy: areas.map((area, i) => ({ year: 2026 + i, area })),
  half: undefined,
  eighty: undefined,
  ninety: undefined,
});

it('counts from what stood at the survey, and not from nothing', () => {
  // 100 of 200 m² stood: half of the rest is 150.
  const { bare, years } = bareClosing(summary(200, 100, 130, 149, 150, 180, 189));
  expect(bare).toBe(100);
  expect(years.map(({ year }) => year)).toEqual([2029, 2030, undefined]);
});

it('has no years where nothing is open, or nothing closes', () => {
  expect(bareClosing(summary(100, 100, 100)).years.map(({ year }) => year)).toEqual([
    undefined,
    undefined,
    undefined,
  ]);
  expect(bareClosing(summary(100, 0, 0)).years[0].year).toBeUndefined();
});
