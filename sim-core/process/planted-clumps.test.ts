import { expect, test } from 'vitest';
import { clumpSites } from '#sim-core/kernel/clump-sites.ts';
import { createReferenceKernel } from '#sim-core/kernel/reference/reference-kernel.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';
import { gridOf, kernelSetup } from '#sim-core/testing/setups.ts';
import { prepareWorks } from './works.ts';

const [width, height] = [9, 7];
const grid = gridOf(width, height, 2);
const middle = 3 * width + 4;
/** A point in a cell, by column and row. */
const at = (column: number, row: number): [number, number] => [
  grid.originX + 2 * column + 0.3,
  grid.originY - 2 * row - 1.7,
];
const clumps = (points: [number, number][], each: number): Action => ({
  kind: 'clumps',
  year: 2021,
  points,
  each,
});

/** Ground of 16 sites a cell, but for those told. */
function carryOut(
  mode: 'counts' | 'mean-field',
  actions: Action[],
  capacityOf: (cell: number) => number = () => 255,
  clumpsPerSquareMetre = 4,
) {
  const capacity = Uint8Array.from({ length: width * height }, (_, i) => capacityOf(i));
  const sites = clumpSites(clumpsPerSquareMetre, 2);
  const kernel = createReferenceKernel(kernelSetup({ width, height, mode, capacity, sites }));
  const map = { kernel, capacity, sites, clumpsOnFullCell: clumpsPerSquareMetre * 4, replicate: 0 };
  const none = { fence: new Uint8Array(width * height), luck: { k0: 1, k1: 2 } };
  prepareWorks(actions, grid).apply(2021, 0, { ...map, ...none });
  return kernel;
}
const total = (values: ArrayLike<number>) => Array.from(values).reduce((sum, v) => sum + v, 0);

test('clumps are set at each point; points in one cell, and works of one year, add up', () => {
  const actions = [clumps([at(4, 3), at(4, 3), at(0, 0)], 3), clumps([at(4, 3)], 2)];
  const counted = carryOut('counts', actions);
  expect([counted.clumps![middle], counted.clumps![0], total(counted.clumps!)]).toEqual([8, 3, 11]);
  expect(counted.cover[middle]).toBe(0.5);
  const field = carryOut('mean-field', actions);
  expect(field.cover[middle]).toBeCloseTo(0.5, 6);
  expect(total(field.cover)).toBeCloseTo(11 / 16, 6);
});

test.each(['counts', 'mean-field'] as const)(
  'what finds no free site goes to the nearest cells, northern first, and not where nothing grows (%s)',
  (mode) => {
    const barren = middle - width;
    const planted = [clumps([at(4, 3)], 16 + 16 + 4)];
    const { cover } = carryOut(mode, planted, (cell) => (cell === barren ? 0 : 255));
    // North of it nothing grows; west of it comes next, and then east of it.
    expect(cover[barren]).toBe(0);
    expect([cover[middle], cover[middle - 1], cover[middle + 1]]).toEqual([1, 1, 0.25]);
    expect(total(cover)).toBeCloseTo(36 / 16, 6);
  },
);

test.each(['counts', 'mean-field'] as const)(
  'beyond three cells clumps are lost, and none jumps round an edge (%s)',
  (mode) => {
    const inside = carryOut(mode, [clumps([at(4, 3)], 1000)]).cover;
    expect(total(inside)).toBe(29);
    expect([inside[middle + 3], inside[middle + 4], inside[middle + 2 * width + 2]]).toEqual([1, 0, 1]);
    const corner = carryOut(mode, [clumps([at(8, 0)], 1000)]).cover;
    expect(total(corner)).toBe(11);
    expect(Array.from(corner).every((c, i) => c === 0 || i % width >= 5)).toBe(true);
  },
);

test('a point is served before what others could not place', () => {
  const { clumps: set } = carryOut('counts', [clumps([at(4, 3), at(4, 2)], 16 + 4)]);
  // Both are full with their own; each leaves 4 over.
  expect([set![middle], set![middle - width]]).toEqual([16, 16]);
  expect(total(set!)).toBe(40);
});

test('a thin or coarse cell takes no more than it can hold', () => {
  const half = carryOut('mean-field', [clumps([at(4, 3)], 3)], () => 128).cover;
  expect(half[middle]).toBeCloseTo(3 / 16, 6);
  // One clump in 100 m² is the whole of a cell of 4 m² in both modes.
  for (const mode of ['counts', 'mean-field'] as const) {
    const { cover } = carryOut(mode, [clumps([at(4, 3)], 2)], () => 128, 0.01);
    expect([cover[middle], cover[middle - width], total(cover)].map((c) => Math.round(c * 255))).toEqual([
      128, 128, 256,
    ]);
  }
});

test('points that can take no clump are named', () => {
  const bad = [clumps([at(4, 3), at(-1, 0), at(20, 0)], 1), clumps([at(1, 0)], 1)];
  expect(prepareWorks(bad, grid).problems).toEqual([
    {
      field: 'actions.0.points.1',
      message:
        '2 points of these clumps, the first of them point 2, lie off the grid: move or remove what lies off the site',
    },
  ]);
  const capacity = Uint8Array.from({ length: width * height }, (_, i) => (i === 1 ? 0 : 255));
  expect(prepareWorks(bad.slice(1), grid, capacity).problems).toEqual([
    {
      field: 'actions.0.points.0',
      message:
        'Point 1 of these clumps lies where the plant cannot grow (capacity 0): move or remove what lies there',
    },
  ]);
});
