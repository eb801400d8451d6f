// @vitest-environment node
import { expect, it } from 'vitest';
import type { Work } from '#contract/works.ts';
import { copiedWorks, movedWork, snappedToCorner, snappedToMiddle } from './move-works.ts';

const grid = { width: 6, height: 4, cellSize: 2, originX: 100, originY: 50, epsg: 32631 };
const works: Work[] = [
  {
    kind: 'mound',
    id: 'm',
    name: 'North',
    set: 's',
    year: 2028,
    x: 1,
    y: 2,
    radius: 1,
    strength: 1,
    halo: 0,
  },
  {
    kind: 'clumps',
    id: 'c',
    year: 2028,
    each: 3,
    points: [
      [1, 2],
      [3, 4],
    ],
  },
  {
    kind: 'fence',
    id: 'f',
    year: 2028,
    strength: 1,
    area: {
      shape: 'polygon',
      ring: [
        [0, 0],
        [4, 0],
        [4, 4],
      ],
    },
  },
  { kind: 'loss', id: 'l', year: 2028, share: 1, area: { shape: 'disc', x: 5, y: 5, radius: 2 } },
];

it('moves every kind of works, to the centimetre, and nothing else about it', () => {
  expect(works.map((work) => movedWork(work, 0.105, -1))).toMatchObject([
    { id: 'm', name: 'North', set: 's', x: 1.11, y: 1, radius: 1 },
    {
      id: 'c',
      each: 3,
      points: [
        [1.11, 1],
        [3.11, 3],
      ],
    },
    {
      id: 'f',
      area: {
        ring: [
          [0.11, -1],
          [4.11, -1],
          [4.11, 3],
        ],
      },
    },
    { id: 'l', area: { x: 5.11, y: 4, radius: 2 } },
  ]);
});

it('copies under new ids, outside the set and without the name', () => {
  let n = 0;
  const copies = copiedWorks(works, 10, 0, () => `n${n++}`);
  expect(copies.map((work) => work.id)).toEqual(['n0', 'n1', 'n2', 'n3']);
  expect(copies[0]).toMatchObject({ x: 11, y: 2 });
  expect([copies[0].set, copies[0].name]).toEqual([undefined, undefined]);
});

it('snaps to the middle and to the corners of cells, also beyond the site', () => {
  expect(snappedToMiddle(grid, [102.1, 47.9])).toEqual([103, 47]);
  expect(snappedToMiddle(grid, [99.9, 50.1])).toEqual([99, 51]);
  expect(snappedToCorner(grid, [102.9, 47.1])).toEqual([102, 48]);
  expect(snappedToCorner(grid, [103.1, 46.9])).toEqual([104, 46]);
});
