import { expect, test } from 'vitest';
import { direction } from './direction.ts';

test('a quarter of a turn is exact, and an eighth lies between its axes', () => {
  const quarters = [0, 0.25, 0.5, 0.75, 1].map(direction);
  expect(quarters.map(({ x, y }) => [x + 0, y + 0])).toEqual([
    [1, 0],
    [0, 1],
    [-1, 0],
    [0, -1],
    [1, 0],
  ]);
  const { x, y } = direction(0.125);
  expect(x).toBeCloseTo(Math.SQRT1_2, 15);
  expect(y).toBeCloseTo(Math.SQRT1_2, 15);
});

test('is (cos, sin) of the turn to the last digits, all the way round', () => {
  for (let i = 0; i < 5000; i++) {
    const turn = (i + 0.37) / 5000;
    const { x, y } = direction(turn);
    expect(Math.abs(x - Math.cos(2 * Math.PI * turn))).toBeLessThan(1e-15);
    expect(Math.abs(y - Math.sin(2 * Math.PI * turn))).toBeLessThan(1e-15);
  }
});
