import { expect, it } from 'vitest';
import type { Work } from '#contract/works.ts';
import { standingWorks } from './standing-works.ts';

const grid = { width: 10, height: 10, cellSize: 1, originX: 0, originY: 10, epsg: 32631 };
/** The western half stands. */
const cover = Uint8Array.from({ length: 100 }, (_, i) => (i % 10 < 5 ? 200 : 0));
const mound = (id: string, x: number): Work => ({
  ...{ kind: 'mound', id, year: 2027, x, y: 5.5, radius: 1, strength: 1, halo: 0 },
});
const clumps = (id: string, xs: number[]): Work => ({
  ...{ kind: 'clumps', id, year: 2027, points: xs.map((x): [number, number] => [x, 5.5]), each: 3 },
});
const planting = (id: string, west: number, east: number): Work => ({
  ...{ kind: 'planting', id, year: 2027, cover: 0.5 },
  area: {
    shape: 'polygon',
    ring: [
      [west, 2],
      [east, 2],
      [east, 4],
      [west, 4],
    ],
  },
});

it('counts mounds, clumps and plantings that stand on marsh, those on a mound as part of it', () => {
  const found = standingWorks(
    [
      mound('wet', 2.5),
      clumps('on it', [2.5]),
      mound('bare', 7.5),
      clumps('some', [3.5, 4.5, 8.5]),
      clumps('none', [8.5]),
      planting('most', 2, 6),
      planting('little', 4, 9),
    ],
    grid,
    cover,
  );
  expect([...found.ids]).toEqual(['wet', 'on it', 'some', 'most']);
  expect(found.words).toBe('1 mound, 6 clumps and 1 planting');
});

it('says nothing of a fence or a loss, of bare ground, or while cover is not known', () => {
  const fence: Work = {
    ...{ kind: 'fence', id: 'f', year: 2027, strength: 1 },
    area: { shape: 'disc', x: 2, y: 5, radius: 1 },
  };
  expect(standingWorks([fence, mound('bare', 7.5)], grid, cover).words).toBe('');
  expect(standingWorks([mound('wet', 2.5)], grid, undefined).words).toBe('');
});
