import { expect, it } from 'vitest';
import { dayOf, endDays, endOf } from './token-end.ts';

const now = new Date(2026, 11, 1, 15, 30);

it('ends so many days from now', () => {
  expect(endOf('30', '', now)).toBe(new Date(now.getTime() + 30 * 86_400_000).toISOString());
  expect(endOf('365', '', now)).toBe(new Date(now.getTime() + 365 * 86_400_000).toISOString());
});

it('ends with a day where the person is', () => {
  const end = new Date(endOf('date', '2027-03-01', now)!);
  expect(dayOf(end)).toBe('2027-03-01');
  expect([end.getHours(), end.getMinutes()]).toEqual([23, 59]);
  expect(endOf('date', '2026-12-01', now)).toBeDefined();
});

it.each(['', 'soon', '2026-11-30', '2028-01-01'])('does not end on %j', (day) => {
  expect(endOf('date', day, now)).toBeUndefined();
});

it('may end within 366 days, to the end of the last', () => {
  const { first, last } = endDays(now);
  expect(first).toBe('2026-12-01');
  const days = (Date.parse(endOf('date', last, now)!) - now.getTime()) / 86_400_000;
  expect(days).toBeLessThanOrEqual(366);
  expect(days).toBeGreaterThan(365);
});
