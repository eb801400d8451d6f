// @vitest-environment node
import { expect, it } from 'vitest';
import { movedTo } from './order.ts';

it.each([
  ['b', 0, 'bacd'],
  ['b', 1, 'abcd'],
  ['b', 2, 'acbd'],
  ['b', 9, 'acdb'],
  ['b', -1, 'bacd'],
  ['d', 1, 'adbc'],
])('moves %s to place %d', (id, to, order) => {
  expect(movedTo(['a', 'b', 'c', 'd'], id, to).join('')).toBe(order);
});
