// @vitest-environment node
import { expect, it } from 'vitest';
import { withoutPlanted } from '#contract/work-titles.ts';
import type { Work } from '#contract/works.ts';
import { plantedMound, withPartners } from './planted-mounds.ts';

const pen = { radius: 1.5, strength: 1, halo: 1, clumps: 9 };
const at = { x: 10, y: 20, year: 2027, set: 's' };
let n = 0;
const pair = plantedMound(() => `w${n++}`, pen, at);
const disc: Work = {
  kind: 'planting',
  id: 'disc',
  year: 2027,
  cover: 0.5,
  area: { shape: 'disc', x: 10, y: 20, radius: 1 },
};
const elsewhere: Work = { kind: 'clumps', id: 'else', year: 2027, each: 1, points: [[11, 20]] };

it('sets clumps on a mound, in its middle and its year, unless there are none', () => {
  expect(pair).toMatchObject([
    { kind: 'mound', id: 'w0', set: 's', x: 10, y: 20, year: 2027, radius: 1.5 },
    { kind: 'clumps', id: 'w1', set: 's', points: [[10, 20]], each: 9, year: 2027 },
  ]);
  expect(pair[0]).not.toHaveProperty('clumps');
  expect(plantedMound(() => 'm', { ...pen, clumps: 0 }, at)).toHaveLength(1);
});

it('takes a mound and what is planted on it together, whichever of them is meant', () => {
  const works = [...pair, disc, elsewhere];
  for (const id of ['w0', 'w1', 'disc'])
    expect([...withPartners([id], works)].sort()).toEqual(['disc', 'w0', 'w1']);
  expect([...withPartners(['else'], works)]).toEqual(['else']);
  // Without a mound below them, plantings of one place are their own.
  expect([...withPartners(['w1'], [pair[1], disc])]).toEqual(['w1']);
  expect(withoutPlanted(works).map((work) => work.id)).toEqual(['w0', 'else']);
  expect(withoutPlanted([pair[1], disc])).toHaveLength(2);
});
