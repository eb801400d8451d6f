import { expect, test } from 'vitest';
import { sourceBytes } from '#sim-core/grid/build-ground.ts';
import { areaExtent } from '#sim-core/plan/extent.ts';
import { layerSourceSchema, type Area } from '#sim-core/spec/run-spec.ts';
import { gridOf } from '#sim-core/testing/setups.ts';
import { areaCells } from './area-cells.ts';
import { areaShares, moundShares } from './area-shares.ts';

const grid = gridOf(30, 30, 2);
const at = (column: number, row: number): [number, number] => [
  grid.originX + column * grid.cellSize,
  grid.originY - row * grid.cellSize,
];
const box = (west: number, north: number, east: number, south: number) => [
  at(west, north),
  at(east, north),
  at(east, south),
  at(west, south),
];
const sum = (shares: Float32Array) => shares.reduce((all, share) => all + share, 0);
/** A square of 8 cells a side with a hole of 4, and an island of 2 in the hole that is a second hole’s ring by even-odd. */
const ringed: Area = {
  shape: 'polygon',
  ring: box(2, 2, 10, 10),
  holes: [box(4, 4, 8, 8), box(5, 5, 7, 7)],
};

test('holes are holes by the even-odd rule, in cells by their centre and in shares: 64 − 16 + 4 cells', () => {
  const { cells } = areaCells(ringed, grid);
  expect(cells).toHaveLength(52);
  expect(cells).not.toContain(4 * 30 + 4);
  expect(cells).toContain(5 * 30 + 5);
  const { shares } = areaShares(ringed, grid);
  expect(sum(shares)).toBeCloseTo(52, 6);
  expect(areaExtent({ ...ringed, holes: [box(4, 4, 8, 8)] })).toEqual({
    area: 48 * 4,
    outline: 32 * 2 + 16 * 2,
  });
});

test('cells on an edge take the share of their ground that lies within, exactly along the rows', () => {
  const shape: Area = { shape: 'polygon', ring: box(3.25, 2, 5.5, 4.5) };
  const { cells, shares } = areaShares(shape, grid);
  const of = (column: number, row: number) => shares[cells.indexOf(row * 30 + column)];
  expect([of(3, 2), of(4, 2), of(5, 2), of(5, 4)].map((share) => Number(share.toFixed(6)))).toEqual([
    0.75, 1, 0.5, 0.25,
  ]);
  expect(cells).not.toContain(2 * 30 + 6);
});

test.each([0.4, 1.3, 2, 5.7, 19])('a triangle and a disc in shares have their exact area: %f m', (r) => {
  const [x, y] = at(14.37, 15.81);
  const triangle: Area = {
    shape: 'polygon',
    ring: [
      [x - r, y - r / 2],
      [x + r, y - r],
      [x + r / 3, y + r],
    ],
  };
  for (const area of [triangle, { shape: 'disc', x, y, radius: r } satisfies Area]) {
    const taken = sum(areaShares(area, grid).shares) * 4;
    expect(taken / areaExtent(area).area).toBeGreaterThan(0.975);
    expect(taken / areaExtent(area).area).toBeLessThan(1.025);
  }
});

test('a mound fades like a cone: its sum is π (r² + r h + h²/3)', () => {
  const [x, y] = at(15.2, 14.7);
  for (const [radius, halo] of [
    [2, 2],
    [3, 12],
    [0.5, 4],
  ]) {
    const taken = sum(moundShares({ x, y, radius, halo, strength: 1 }, grid).shares) * 4;
    // Volume of a truncated cone of height 1 whose top has the radius r and whose foot has r + h.
    const volume = Math.PI * (radius * radius + radius * halo + (halo * halo) / 3);
    expect(taken / volume).toBeGreaterThan(0.98);
    expect(taken / volume).toBeLessThan(1.02);
  }
});

test('a mound smaller than the points between which it lies still shelters its cell', () => {
  const [x, y] = at(4.5, 6.5);
  const { cells, shares } = moundShares({ x, y, radius: 0.01, halo: 0, strength: 1 }, grid);
  expect([...cells]).toEqual([6 * 30 + 4]);
  expect(shares[0]).toBeCloseTo((Math.PI * 0.0001) / 4, 9);
});

test('a source says which rule counts, and says nothing for the centre', () => {
  const [x, y] = at(4, 6);
  const mounds = [{ x, y, radius: 1 }];
  const bytes = (source: object) =>
    sourceBytes(layerSourceSchema.parse(source), grid, () => {
      throw new Error('no raster');
    });
  // A disc of 1 m around a corner of cells of 2 m: a quarter of π/4 of each cell, no centre.
  const quarters = [...bytes({ mounds, edges: 'shared' })].filter(Boolean);
  expect(quarters).toHaveLength(4);
  for (const quarter of quarters) expect(Math.abs(quarter - (255 * Math.PI) / 16)).toBeLessThan(1);
  expect([...bytes({ mounds })].filter(Boolean)).toEqual([200]);
  const areas = [{ area: { shape: 'polygon', ring: box(3.25, 2, 4, 3) }, strength: 0.5 }];
  expect([...bytes({ areas, edges: 'shared' })].filter(Boolean)).toEqual([96]);
  expect([...bytes({ areas })].filter(Boolean)).toEqual([128]);
  expect(() => bytes({ areas, edges: 'centre' })).toThrow();
});
