// @vitest-environment node
import { expect, it } from 'vitest';
import { copyIds, partnerOf, plantedMound, withoutPlanted, withPartners } from './planted-mounds.ts';

const pen = { radius: 1.5, strength: 1, halo: 1, clumps: 9 };
const at = { x: 10, y: 20, year: 2027, set: 's' };
const pair = plantedMound('a', pen, at);

it('sets clumps on a mound, in its middle and its year, unless there are none', () => {
  expect(pair).toMatchObject([
    { kind: 'mound', id: 'a', set: 's', x: 10, y: 20, year: 2027, radius: 1.5 },
    { kind: 'clumps', id: 'a-p', set: 's', points: [[10, 20]], each: 9, year: 2027 },
  ]);
  expect(pair[0]).not.toHaveProperty('clumps');
  expect(plantedMound('a', { ...pen, clumps: 0 }, at)).toHaveLength(1);
});

it('takes both where one is meant, and nothing that is not there', () => {
  expect([partnerOf('a'), partnerOf('a-p')]).toEqual(['a-p', 'a']);
  expect(withPartners(['a-p'], pair)).toEqual(new Set(['a-p', 'a']));
  expect(withPartners(['a'], pair.slice(0, 1))).toEqual(new Set(['a']));
  expect(withoutPlanted(pair)).toEqual(pair.slice(0, 1));
  expect(withoutPlanted(pair.slice(1))).toEqual(pair.slice(1));
});

it('gives copies ids that still belong together, and clumps copied alone one of their own', () => {
  let n = 0;
  const ids = copyIds([...pair].reverse(), () => `n${n++}`);
  expect([ids.get('a'), ids.get('a-p')]).toEqual(['n0', 'n0-p']);
  expect(copyIds(pair.slice(1), () => 'alone').get('a-p')).toBe('alone');
});
