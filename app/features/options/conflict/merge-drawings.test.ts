// @vitest-environment node
import { describe, expect, it } from 'vitest';
import type { Work, WorkSet } from '#contract/works.ts';
import { mergeDrawings } from './merge-drawings.ts';

const mound = (id: string, x = 1): Work => ({
  id,
  kind: 'mound',
  year: 2027,
  x,
  y: 2,
  radius: 1.5,
  strength: 1,
  halo: 0,
});
const state = (works: Work[], sets: WorkSet[] = []) => ({ works, sets });
const set = (id: string): WorkSet => ({ id, laid: { pattern: 'grid', seed: 's', parameters: {} } });
const base = state([mound('a'), mound('b'), mound('c')]);

describe('mergeDrawings', () => {
  it('keeps what each did to other works', () => {
    const mine = state([mound('a', 5), mound('b'), mound('mine')]);
    const theirs = state([mound('c'), mound('a'), mound('b', 7), mound('theirs')]);
    const { works, clashes } = mergeDrawings(base, mine, theirs);
    expect(works).toEqual([mound('a', 5), mound('b', 7), mound('theirs'), mound('mine')]);
    expect(clashes).toEqual([]);
  });

  it('does once what both did alike', () => {
    const both = state([mound('a', 5), mound('c')]);
    expect(mergeDrawings(base, both, state([mound('a', 5), mound('c')]))).toEqual({ ...both, clashes: [] });
  });

  it('names the works that both changed otherwise', () => {
    const mine = state([mound('a', 5), mound('c', 9)]);
    const theirs = state([mound('a', 6), mound('b', 7)]);
    expect(
      mergeDrawings(base, mine, theirs)
        .clashes.map(({ id }) => id)
        .sort(),
    ).toEqual(['a', 'b', 'c']);
  });

  it('keeps the sets that the works still name', () => {
    const laid = { ...mound('d'), set: 's1' };
    const theirs = state([...base.works, { ...mound('e'), set: 's2' }], [set('s2'), set('gone')]);
    expect(
      mergeDrawings(base, state([...base.works, laid], [set('s1')]), theirs).sets.map(({ id }) => id),
    ).toEqual(['s2', 's1']);
  });
});
