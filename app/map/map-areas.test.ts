// @vitest-environment node
import { expect, it } from 'vitest';
import { areaAt, type MapArea } from './map-areas.ts';

const square = (id: string, west: number, south: number, side: number): MapArea => ({
  id,
  kind: 'planting',
  ring: [
    [west, south],
    [west + side, south],
    [west + side, south + side],
    [west, south + side],
  ],
});
const areas = [square('large', 0, 0, 100), square('small', 40, 40, 20)];

it('finds the smallest area that holds a place, and an outline before either', () => {
  expect(areaAt(areas, 50, 50, 0.1)?.id).toBe('small');
  expect(areaAt(areas, 20, 20, 0.1)?.id).toBe('large');
  expect(areaAt(areas, 100.5, 50, 0.1)?.id).toBe('large');
  expect(areaAt([areas[1], square('within', 38, 38, 24)], 39, 50, 0.05)?.id).toBe('within');
  expect(areaAt(areas, 102, 50, 0.1)).toBeUndefined();
});
