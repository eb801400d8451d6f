import { expect, it } from 'vitest';
import { niceTicks, stagger } from './chart-ticks.ts';

it('ticks at round numbers within the span', () => {
  expect(niceTicks(-0.53, 2.1, 5)).toEqual([0, 1, 2]);
  expect(niceTicks(-0.13, 0.22, 5)).toEqual([-0.1, 0, 0.1, 0.2]);
  expect(niceTicks(120, 380, 5)).toEqual([200, 300]);
});

it('gives labels that would meet rows of their own, and keeps them on the chart', () => {
  const placed = stagger(
    [
      { at: 10, length: 80 },
      { at: 40, length: 80 },
      { at: 100, length: 80 },
      { at: 290, length: 80 },
    ],
    312,
  );
  expect(placed.map(({ row }) => row)).toEqual([0, 1, 0, 0]);
  expect(placed[3].from).toBe(210);
});
