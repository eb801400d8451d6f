// @vitest-environment node
import { expect, it } from 'vitest';
import type { Work } from '#contract/works.ts';
import { isFaint, worksOnMap } from './works-on-map.ts';

const mound: Work = { kind: 'mound', id: 'm', year: 2028, x: 1, y: 2, radius: 1.5, strength: 1, halo: 1 };
const clumps: Work = {
  kind: 'clumps',
  id: 'c',
  year: 2027,
  each: 3,
  points: [
    [3, 4],
    [5, 6],
  ],
};
const fence: Work = {
  kind: 'fence',
  id: 'f',
  year: 2027,
  until: 2030,
  strength: 1,
  area: { shape: 'disc', x: 0, y: 0, radius: 4 },
};

it('draws a flag for a mound, a dot for each clump and an outline for what takes up ground', () => {
  const { footholds, areas } = worksOnMap([mound, clumps, fence], 2028);
  expect(footholds).toMatchObject([
    { id: 'm', kind: 'planned', x: 1, y: 2, radius: 2.5, faint: false },
    { id: 'c', kind: 'clump', x: 3, y: 4 },
    { id: 'c', kind: 'clump', x: 5, y: 6 },
  ]);
  expect(areas).toMatchObject([{ id: 'f', kind: 'fence', faint: false }]);
  expect(areas[0].ring).toHaveLength(32);
});

it('draws faint what is not there in the year: not yet, or no longer', () => {
  expect([2026, 2027, 2028].map((year) => isFaint(mound, year))).toEqual([true, true, false]);
  expect([2026, 2030, 2031].map((year) => isFaint(fence, year))).toEqual([true, false, true]);
  expect(worksOnMap([mound], 2030, true).footholds[0].faint).toBe(true);
});

it('keeps what is drawn of works that did not change', () => {
  const before = worksOnMap([mound, clumps], 2028).footholds;
  const after = worksOnMap([{ ...mound, x: 9 }, clumps], 2028).footholds;
  expect(after[0]).not.toBe(before[0]);
  expect(after[1]).toBe(before[1]);
});
