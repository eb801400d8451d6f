import { expect, test } from 'vitest';
import { gridOf } from '#sim-core/testing/setups.ts';
import type { Area } from '#sim-core/spec/run-spec.ts';
import { drawnOnGrid } from './drawn-area.ts';

const side = 120;
const on = (cellSize: number) => gridOf(side / cellSize, side / cellSize, cellSize);
const at = (east: number, south: number): [number, number] => {
  const { originX, originY } = on(1);
  return [originX + east, originY - south];
};
/** 18 discs of 2 m, none of them with its middle on a line or a centre of cells in particular */
const discs = Array.from({ length: 18 }, (_, i) => {
  const [x, y] = at(8.3 + 17.37 * (i % 6), 11.9 + 23.71 * Math.floor(i / 6));
  return { shape: { shape: 'disc', x, y, radius: 2 } satisfies Area };
});
const drawn = 18 * Math.PI * 4;

test('small discs change area by the centre rule, and keep it where edges are shared', () => {
  for (const cellSize of [1, 2, 4, 6]) {
    const grid = on(cellSize);
    const shared = drawnOnGrid(
      discs.map((disc) => ({ ...disc, edges: 'shared' as const })),
      grid,
    );
    expect(shared.drawn).toBeCloseTo(drawn, 9);
    expect(shared.taken / drawn).toBeGreaterThan(0.99);
    expect(shared.taken / drawn).toBeLessThan(1.01);
    expect(shared.differs).toBe(false);
  }
  const coarse = drawnOnGrid(discs, on(4));
  expect(Math.abs(coarse.taken / drawn - 1)).toBeGreaterThan(0.1);
  expect(coarse).toMatchObject({ places: 18, narrow: 18, differs: true });
  expect(drawnOnGrid(discs, on(1))).toMatchObject({ narrow: 0, differs: false });
});

test('a mound of 1.5 m on cells of 4 m is narrow, on 1 m it is not', () => {
  const [x, y] = at(40, 40);
  const mound = [{ shape: { shape: 'disc', x, y, radius: 1.5 } satisfies Area }];
  expect(drawnOnGrid(mound, on(4)).narrow).toBe(1);
  expect(drawnOnGrid(mound, on(1)).narrow).toBe(0);
});

test('a long strip is as narrow as it is across, a square as wide as its side, and what leaves the grid is not compared', () => {
  const box = (west: number, north: number, width: number, height: number): Area => ({
    shape: 'polygon',
    ring: [
      at(west, north),
      at(west + width, north),
      at(west + width, north + height),
      at(west, north + height),
    ],
  });
  const narrow = (shape: Area, cellSize: number) => drawnOnGrid([{ shape }], on(cellSize)).narrow;
  expect([narrow(box(10, 10, 60, 3), 2), narrow(box(10, 10, 60, 5), 2)]).toEqual([1, 0]);
  expect([narrow(box(10, 10, 7, 7), 4), narrow(box(10, 10, 8, 8), 4)]).toEqual([1, 0]);
  expect(drawnOnGrid([{ shape: box(-20, 10, 60, 60) }], on(2))).toMatchObject({ places: 0, differs: false });
});
