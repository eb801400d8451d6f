// @vitest-environment node
import { expect, it } from 'vitest';
import type { Feature } from '#contract/features.ts';
import { surveyedOnOption, surveyedOnOptionInWords } from './surveyed-on-option.ts';

const grid = { width: 6, height: 4, cellSize: 2, originX: 100, originY: 50, epsg: 32631 };
const feature = (id: string, kind: Feature['kind'], shape: Feature['shape']) =>
  ({ id, kind, shape, name: '', strength: 1, halo: 0, source: { row: 1 } }) as unknown as Feature;
const square = (west: number, south: number, side: number): [number, number][] => [
  [west, south],
  [west + side, south],
  [west + side, south + side],
  [west, south + side],
];
const polygon = { shape: 'polygon' as const, ring: square(100, 42, 8), holes: [square(102, 44, 4)] };
const discs = [1, 2, 3, 4].map((n) =>
  feature(`disc ${n}`, 'refuge', { shape: 'disc', x: 108 + n / 2, y: 44, radius: 0.5 }),
);

it('draws a polygon with a hole and the points beside it one by one, though they make one patch of cells', () => {
  const surveyed = surveyedOnOption(
    [
      feature('p', 'refuge', polygon),
      ...discs,
      feature('f', 'fence', polygon),
      feature('a', 'allowed', polygon),
    ],
    grid,
    undefined,
  );
  expect(surveyed.footholds.map(({ id, x, y }) => [id, x, y])).toEqual(
    [1, 2, 3, 4].map((n) => [`disc ${n}`, 108 + n / 2, 44]),
  );
  expect(surveyed.areas.map(({ id, kind }) => [id, kind])).toEqual([
    ['p', 'refuge'],
    ['f', 'fence'],
  ]);
  expect(surveyed.areas[0].holes).toEqual(polygon.holes);
  expect(surveyedOnOptionInWords(surveyed)).toBe(
    '4 surveyed mounds, 1 surveyed refuge area, 1 surveyed fence',
  );
});

it('marks strong patches of a refuge raster beside them, and says nothing where nothing was surveyed', () => {
  const refuge = new Uint8Array(24);
  refuge[5] = 255;
  const surveyed = surveyedOnOption(discs, grid, refuge);
  expect(surveyed.footholds).toHaveLength(5);
  expect(surveyed.footholds[4]).toEqual({
    id: 's0',
    x: 111,
    y: 49,
    kind: 'surveyed',
    name: 'Surveyed mound',
  });
  expect(surveyedOnOptionInWords(surveyedOnOption([], grid, undefined))).toBe('');
});
