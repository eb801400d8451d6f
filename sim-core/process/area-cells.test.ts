import { expect, test } from 'vitest';
import { gridOf } from '#sim-core/testing/setups.ts';
import { areaCells } from './area-cells.ts';
import { moundStrengths } from './mound-strengths.ts';

const grid = gridOf(12, 10, 2);
/** A point by columns from the west and rows from the north, 0.5 being the middle of the first. */
const at = (column: number, row: number) => ({
  x: grid.originX + column * grid.cellSize,
  y: grid.originY - row * grid.cellSize,
});
const drawn = (cells: Iterable<number>) => {
  const rows = Array.from({ length: 10 }, () => Array.from({ length: 12 }, () => '.'));
  for (const cell of cells) rows[Math.floor(cell / 12)][cell % 12] = '#';
  return rows.map((row) => row.join(''));
};

test.each([
  [5, 81],
  [10, 317],
  [20, 1257],
])('a disc of %i cells around a centre holds %i: Gauss circle, OEIS A000328', (radius, cells) => {
  const wide = gridOf(61, 61, 2);
  const middle = { x: wide.originX + 61, y: wide.originY - 61 };
  const area = areaCells({ shape: 'disc', ...middle, radius: radius * 2 }, wide);
  expect(area.cells).toHaveLength(cells);
  expect(area.share).toBe(1);
});

test('a disc at the edge keeps what lies on the grid', () => {
  const { cells } = areaCells({ shape: 'disc', ...at(0.5, 0.5), radius: 2.9 }, grid);
  expect(drawn(cells).slice(0, 3)).toEqual(['##..........', '##..........', '............']);
});

test('a disc that holds no centre takes the cell it stands in for the share of its area', () => {
  const { cells, share } = areaCells({ shape: 'disc', ...at(3.1, 4.1), radius: 0.5 }, grid);
  expect([...cells]).toEqual([4 * 12 + 3]);
  expect(share).toBeCloseTo((Math.PI * 0.25) / 4, 12);
  expect(areaCells({ shape: 'disc', ...at(-3, 4), radius: 0.5 }, grid).cells).toHaveLength(0);
});

test('a polygon takes the cells whose centre it holds, by the even-odd rule', () => {
  const corners = (...points: [number, number][]) =>
    points.map(([c, r]) => [at(c, r).x, at(c, r).y] as [number, number]);
  const ell = corners([1, 1], [9, 1], [9, 3], [4, 3], [4, 8.6], [1, 8.4]);
  expect(drawn(areaCells({ shape: 'polygon', ring: ell }, grid).cells)).toEqual([
    '............',
    '.########...',
    '.########...',
    '.###........',
    '.###........',
    '.###........',
    '.###........',
    '.###........',
    '..##........',
    '............',
  ]);
  const off = corners([-5, -5], [20, -5], [20, 1], [-5, 1]);
  expect(areaCells({ shape: 'polygon', ring: off }, grid).cells).toHaveLength(12);
});

test('two polygons that share a side share no cell and leave none out', () => {
  const side: [number, number] = [at(4.5, 0).x, at(0, 0.5).y];
  const [x0, y0] = [at(0, 0).x, at(0, 0).y];
  const [x1, y1] = [at(12, 0).x, at(0, 10).y];
  const west = areaCells(
    {
      shape: 'polygon',
      ring: [
        [x0, y0],
        [side[0], y0],
        [side[0], y1],
        [x0, y1],
      ],
    },
    grid,
  ).cells;
  const east = areaCells(
    {
      shape: 'polygon',
      ring: [
        [side[0], y0],
        [x1, y0],
        [x1, y1],
        [side[0], y1],
      ],
    },
    grid,
  ).cells;
  expect([...west, ...east].sort((a, b) => a - b)).toEqual(Array.from({ length: 120 }, (_, i) => i));
});

test('a mound is full within its radius and fades over its halo', () => {
  const mound = { kind: 'mound' as const, year: 2021, ...at(5.5, 5.5), radius: 2, strength: 0.8, halo: 4 };
  const { cells, strengths } = moundStrengths(mound, grid);
  const along = new Map([...cells].map((cell, i) => [cell, strengths[i]]));
  const row = Array.from({ length: 12 }, (_, c) => along.get(5 * 12 + c) ?? 0);
  // Full strength 204 = 0.8 × 255; two metres into the halo, half of it; at its end, none.
  expect(row).toEqual(
    [0, 0, 0, 102, 204, 204, 204, 102, 0, 0, 0, 0].map((v, i) => (i === 3 || i === 7 ? 102 : v)),
  );
  expect(along.get(4 * 12 + 4)).toBe(Math.round(204 * (1 - (Math.sqrt(8) - 2) / 4)));
});

test('a mound smaller than a cell shelters the cell that it stands in; one off the grid none', () => {
  const small = { kind: 'mound' as const, year: 2021, ...at(5.05, 5.05), radius: 0.6, strength: 1, halo: 0 };
  const { cells, strengths } = moundStrengths(small, grid);
  expect([...cells]).toEqual([5 * 12 + 5]);
  expect(strengths[0]).toBe(Math.round((255 * Math.PI * 0.36) / 4));
  expect(moundStrengths({ ...small, ...at(-1, 5) }, grid).cells).toHaveLength(0);
});
