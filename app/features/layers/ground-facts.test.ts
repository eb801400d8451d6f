import { expect, it } from 'vitest';
import { toShareBytes } from '#sim-core/grid/ground.ts';
import { sumShares } from '#app/workers/sum-shares.ts';
import { capacityMapping, plantableArea, refugeArea, unitMapping } from './ground-facts.ts';

const classes = [
  { value: 1, name: 'Creek', colour: '#8496a2', capacity: 0, vigour: 0 },
  { value: 2, name: 'Marsh', colour: '#5b825a', capacity: 0.8, vigour: 1 },
];
const habitat = Uint8Array.of(1, 2, 2, 9, 255);

it('gives ground without a class, and without data, no capacity', () => {
  expect([...toShareBytes(habitat, capacityMapping({ noData: 255 }, classes))]).toEqual([0, 204, 204, 0, 0]);
});

it('counts the ground that can hold the plant in m²', () => {
  const counts = {
    classCounts: [
      { value: 1, cells: 100 },
      { value: 2, cells: 30 },
      { value: 9, cells: 7 },
    ],
  };
  expect(plantableArea(counts, classes, 2)).toBe(120);
});

it('counts what stands no higher than what the ground can hold', () => {
  const cover = Float32Array.of(100, 100, 40, -1);
  const mapping = unitMapping({ unit: 'percent', noData: -1 });
  const capacity = Uint8Array.of(0, 204, 204, 204);
  expect(sumShares(cover, mapping, capacity)).toBeCloseTo(0.8 + 0.4, 5);
  expect(sumShares(cover, mapping, undefined)).toBeCloseTo(2.4, 5);
});

it('counts cells with any refuge', () => {
  expect(refugeArea(Uint8Array.of(0, 1, 255), 3)).toBe(18);
});
