import { describe, expect, it } from 'vitest';
import { sameWork, workChanges } from './work-changes.ts';
import { newWorkId, runActions, strayWork, workSchema, worksOf, worksSchema, type Work } from './works.ts';

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

describe('works', () => {
  it('take the kinds of the engine, each with an id, a name and a set', () => {
    const fence = {
      kind: 'fence',
      year: 2027,
      area: { shape: 'disc', x: 1, y: 2, radius: 3 },
      id: 'f-1',
      name: 'North fence',
      set: 's1',
    };
    expect(workSchema.parse(fence)).toEqual({ ...fence, strength: 1 });
    expect(workSchema.safeParse({ ...fence, id: 'with blanks' }).success).toBe(false);
    expect(workSchema.safeParse({ ...fence, colour: 'coral' }).success).toBe(false);
  });

  it('get an id where none is given, and may not share one', () => {
    const plain = runActions([mound('a')])[0];
    const made = worksSchema.parse([plain, plain]);
    expect(new Set(made.map((work) => work.id)).size).toBe(2);
    const twice = worksSchema.safeParse([mound('a'), mound('b'), mound('a')]);
    expect(twice.error?.issues[0].path).toEqual([2, 'id']);
    expect(newWorkId()).toMatch(/^[a-z0-9]{10}$/);
  });

  it('reach the engine as plain actions in their order', () => {
    const plain = { kind: 'mound', year: 2027, x: 1, y: 2, radius: 1.5, strength: 1, halo: 0 };
    const named = { ...mound('b', 5), name: 'Second', set: 's' };
    expect(runActions([mound('a'), named])).toEqual([plain, { ...plain, x: 5 }]);
    expect(worksOf(runActions([mound('a'), named])).map((work) => work.id)).toEqual(['w1', 'w2']);
    expect(named.name).toBe('Second');
  });

  it('may only name sets that are there', () => {
    const laid = { pattern: 'scattered', seed: 's', parameters: {} };
    const works = [mound('a'), { ...mound('b'), set: 's1' }];
    expect(strayWork({ works, sets: [{ id: 's1', laid }] })).toBeUndefined();
    expect(strayWork({ works, sets: [] })).toBe(1);
  });
});

describe('workChanges', () => {
  it('tells works apart by id, wherever they stand', () => {
    const before = [mound('a'), mound('b'), mound('c')];
    const after = [mound('c'), mound('b', 9), mound('d')];
    const { added, removed, changed } = workChanges(before, after);
    expect([added, removed, changed].map((works) => works.map((work) => work.id))).toEqual([
      ['d'],
      ['a'],
      ['b'],
    ]);
    expect(changed[0]).toMatchObject({ x: 9 });
  });

  it('takes works for the same whatever the order of their fields, and a missing name for none', () => {
    const area = { shape: 'polygon', ring: [[0, 0], [1, 0], [1, 1]] }; // prettier-ignore
    expect(sameWork({ kind: 'loss', area, share: 1 }, { share: 1, area: { ...area }, kind: 'loss' })).toBe(
      true,
    );
    expect(sameWork({ ...mound('a'), name: undefined }, mound('a'))).toBe(true);
    const moved = { ...area, ring: [[0, 0], [1, 0], [1, 1.001]] }; // prettier-ignore
    expect(sameWork({ area }, { area: moved })).toBe(false);
    expect(sameWork({ area }, { area: { ...area, ring: area.ring.slice(1) } })).toBe(false);
  });
});
