import { expect, it } from 'vitest';
import { plantableArea } from './ground-facts.ts';

const classes = [
  { value: 1, name: 'Creek', colour: '#8496a2', capacity: 0, vigour: 0 },
  { value: 2, name: 'Marsh', colour: '#5b825a', capacity: 0.8, vigour: 1 },
];

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
