import { expect, it } from 'vitest';
import { differenceOf, levelValues } from './told-apart.ts';

it('gives a difference either way round', () => {
  const sooner = { estimate: 2, low: 1, high: 4 };
  const figures = { pairs: [{ first: 1, second: 0, sooner, chanceGained: sooner }] } as never;
  expect(differenceOf(figures, 'sooner', 1, 0)).toEqual(sooner);
  expect(differenceOf(figures, 'sooner', 0, 1)).toEqual({ estimate: -2, low: -4, high: -1 });
  expect(differenceOf(figures, 'sooner', 0, 2)).toBeUndefined();
});

it('evens out what cannot be told apart, group by group from the greatest down', () => {
  const within = (limit: number, values: readonly number[]) => (a: number, b: number) =>
    Math.abs(values[a] - values[b]) > limit;
  const values = [1, 9, 2, 8, 5];
  expect(levelValues(values, within(2, values))).toEqual([1.5, 8.5, 1.5, 8.5, 5]);
  expect(levelValues(values, () => false)).toEqual([5, 5, 5, 5, 5]);
  expect(levelValues(values, () => true)).toEqual(values);
});
