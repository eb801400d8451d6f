// @vitest-environment node
import { expect, it } from 'vitest';
import type { Ring } from '#app/map/rings.ts';
import { holdAt, middles, pulled, withoutCorner } from './corners.ts';

const square: Ring = [
  [0, 0],
  [10, 0],
  [10, 10],
  [0, 10],
];

it('has a middle in every side, the closing one where it is closed', () => {
  expect(middles(square, true)).toEqual([
    [5, 0],
    [10, 5],
    [5, 10],
    [0, 5],
  ]);
  expect(middles(square, false)).toHaveLength(3);
});

it('takes hold of a corner before a middle, and of nothing out of reach', () => {
  expect(holdAt(square, 9, 1, 2, true)).toEqual({ kind: 'corner', index: 1 });
  expect(holdAt(square, 0.5, 5.5, 2, true)).toEqual({ kind: 'middle', index: 3 });
  expect(holdAt(square, 0.5, 5.5, 2, false)).toBeUndefined();
  expect(holdAt(square, 3, 3, 6, true)).toEqual({ kind: 'corner', index: 0 });
  expect(holdAt(square, 5, 5, 2, true)).toBeUndefined();
});

it('moves a corner, makes one of a middle, and takes one away while enough are left', () => {
  expect(pulled(square, { kind: 'corner', index: 2 }, [12, 12])[2]).toEqual([12, 12]);
  expect(pulled(square, { kind: 'middle', index: 3 }, [-2, 5])).toEqual([...square, [-2, 5]]);
  expect(pulled(square, { kind: 'middle', index: 0 }, [5, -1])[1]).toEqual([5, -1]);
  expect(withoutCorner(square, 1, true)).toEqual([square[0], square[2], square[3]]);
  expect(withoutCorner(square.slice(0, 3), 1, true)).toBeUndefined();
  expect(withoutCorner(square.slice(0, 3), 1, false)).toHaveLength(2);
});
