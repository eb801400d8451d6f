import { expect, test } from 'vitest';
import { createReferenceKernel } from '#sim-core/kernel/reference/reference-kernel.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';
import { gridOf, kernelSetup } from '#sim-core/testing/setups.ts';
import { prepareWorks } from './works.ts';

const grid = gridOf(4, 1, 2);
const surveyed = Uint8Array.of(0, 0, 100, 0);
/** A fence around the cells from one column to another. */
const fence = (
  from: number,
  to: number,
  year: number,
  until: number | undefined,
  strength: number,
): Action => ({
  kind: 'fence',
  ...{ year, until, strength },
  area: {
    shape: 'polygon',
    ring: [
      [grid.originX + 2 * from, grid.originY],
      [grid.originX + 2 * to, grid.originY],
      [grid.originX + 2 * to, grid.originY - 2],
      [grid.originX + 2 * from, grid.originY - 2],
    ],
  },
});

/** F of each year from 2021 on. */
function fencesOf(actions: Action[], years: number, grazed = true) {
  const setup = kernelSetup({ width: 4, height: 1, grazers: grazed ? { fence: surveyed } : undefined });
  const kernel = createReferenceKernel(setup);
  const works = prepareWorks(actions, grid);
  const map = { kernel, capacity: setup.capacity, fence: surveyed, sites: setup.sites, clumpsOnFullCell: 16 };
  return Array.from({ length: years }, (_, i) => {
    works.apply(2021 + i, i, { ...map, luck: { k0: 1, k1: 2 }, replicate: 0 });
    return kernel.fence && [...kernel.fence];
  });
}

test('a fence stands from its year to the end of its last, above what was surveyed, and falls back after', () => {
  const actions = [fence(0, 3, 2022, 2023, 0.6), fence(1, 2, 2023, undefined, 1)];
  expect(fencesOf(actions, 5)).toEqual([
    [0, 0, 100, 0],
    [153, 153, 153, 0],
    [153, 255, 153, 0],
    [0, 255, 100, 0],
    [0, 255, 100, 0],
  ]);
});

test('a fence lowers none that is stronger, and may stand for one year', () => {
  const actions = [fence(2, 3, 2021, 2021, 0.2), fence(0, 1, 2021, 2021, 0.2)];
  expect(fencesOf(actions, 2)).toEqual([
    [51, 0, 100, 0],
    [0, 0, 100, 0],
  ]);
});

test('without grazers there is nothing to keep out', () => {
  expect(fencesOf([fence(0, 4, 2021, undefined, 1)], 1, false)).toEqual([undefined]);
});
