import { expect, test } from 'vitest';
import { edgeDisplacement } from './edge-displacement.ts';
import { standing, unknown } from './map-agreement.ts';

const size = { width: 12, height: 5, cellSize: 2 };
/** Standing in the columns west of `end`. */
const west = (end: number) =>
  Uint8Array.from({ length: size.width * size.height }, (_, i) => (i % size.width < end ? standing : 0));

test.each([
  [4, 0],
  [7, 6],
  [2, -4],
])('a straight front at column %i against one at 4 lies %i m off', (end, metres) => {
  const found = edgeDisplacement(west(4), west(end), size)!;
  expect(found.mean).toBeCloseTo(metres, 6);
  expect(found.meanSize).toBeCloseTo(Math.abs(metres), 6);
  expect(found.quantiles.map((q) => Number(q.toFixed(6)))).toEqual([metres, metres, metres]);
  expect(found.cells).toBe(size.height);
});

test('both sides are told apart: ahead in the north, behind in the south', () => {
  const mixed = west(4);
  for (let x = 0; x < 6; x++) mixed[x] = standing;
  for (let x = 2; x < 4; x++) mixed[4 * size.width + x] = 0;
  const found = edgeDisplacement(west(4), mixed, size)!;
  expect(found.quantiles[0]).toBeLessThan(0);
  expect(found.quantiles[2]).toBeGreaterThan(0);
  expect(found.meanSize).toBeGreaterThan(Math.abs(found.mean));
});

test('where the survey says nothing there is no edge', () => {
  const partly = west(4).map((value, i) => (i % size.width > 5 ? unknown : value));
  expect(edgeDisplacement(partly, west(9), size)).toBeUndefined();
  expect(edgeDisplacement(west(12), west(4), size)).toBeUndefined();
});
