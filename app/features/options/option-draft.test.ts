// @vitest-environment node
import { describe, expect, it } from 'vitest';
import type { Work, WorkSet } from '#contract/works.ts';
import { draftOf, isUnsaved, optionDraft, type DraftAction, type OptionDraft } from './option-draft.ts';

const mound = (id: string, x: number, more: Partial<Work> = {}): Work => ({
  kind: 'mound',
  id,
  year: 2028,
  x,
  y: 10,
  radius: 1.5,
  strength: 1,
  halo: 0,
  ...(more as object),
});
const planting: Work = {
  kind: 'planting',
  id: 'p',
  year: 2028,
  cover: 0.5,
  area: { shape: 'disc', x: 1, y: 1, radius: 2 },
};
const set: WorkSet = { id: 's', laid: { pattern: 'scattered', seed: '1', parameters: { count: 2 } } };
const after = (draft: OptionDraft, ...actions: DraftAction[]) => actions.reduce(optionDraft, draft);
const add = (...works: Work[]): DraftAction => ({ type: 'add', works });
const ids = (draft: OptionDraft) => draft.works.map((work) => work.id).join('');
const start = draftOf({ works: [mound('a', 1), planting], sets: [], revision: 3 });

describe('optionDraft', () => {
  it('adds, selects what was added, and takes it back and forth as one step', () => {
    const added = after(start, add(mound('b', 2), mound('c', 3)));
    expect([ids(added), [...added.selected]]).toEqual(['apbc', ['b', 'c']]);
    const undone = after(added, { type: 'undo' });
    expect([ids(undone), undone.selected.size, isUnsaved(undone)]).toEqual(['ap', 0, false]);
    expect(ids(after(undone, { type: 'redo' }))).toBe('apbc');
    expect(after(start, { type: 'undo' })).toBe(start);
    expect(after(start, { type: 'redo' })).toBe(start);
  });

  it('puts works in place of others in one step', () => {
    const laid = after(start, { type: 'add', works: [mound('b', 2)], instead: new Set(['a']) });
    expect([ids(laid), laid.past.length]).toEqual(['pb', 1]);
  });

  it('counts works pushed along by arrow keys as one step back', () => {
    const push = (x: number): DraftAction => ({ type: 'change', works: [mound('a', x)], step: 'push a' });
    const moved = after(start, push(2), push(3), {
      type: 'change',
      works: [mound('a', 3, { year: 2030 })],
    });
    expect(moved.past).toHaveLength(2);
    expect(after(moved, { type: 'undo' }).works[0]).toMatchObject({ x: 3, year: 2028 });
    expect(after(moved, { type: 'undo' }, { type: 'undo' }).works[0]).toMatchObject({ x: 1 });
    // Letting go and taking hold again is another step.
    expect(after(start, push(2), { type: 'select', ids: ['a'] }, push(3)).past).toHaveLength(2);
  });

  it('changes nothing for what is not there or the same already', () => {
    expect(after(start, { type: 'change', works: [mound('z', 2)] })).toBe(start);
    expect(after(start, { type: 'change', works: [mound('a', 1)] })).toBe(start);
    expect(after(start, { type: 'remove', ids: new Set(['z']) })).toBe(start);
    expect(after(start, { type: 'add', works: [] })).toBe(start);
  });

  it('removes several at once, and selects nothing that is gone', () => {
    const chosen = after(start, { type: 'select', ids: ['a', 'p'] });
    const removed = after(chosen, { type: 'remove', ids: new Set(['a']) });
    expect([ids(removed), [...removed.selected]]).toEqual(['p', ['p']]);
    expect(isUnsaved(removed)).toBe(true);
  });

  it('keeps how a set was laid as long as one of its works stands', () => {
    const laid = after(start, {
      type: 'add',
      works: [mound('b', 2, { set: 's' }), mound('c', 3, { set: 's' })],
      sets: [set],
    });
    expect(laid.sets).toEqual([set]);
    const one = after(laid, { type: 'remove', ids: new Set(['b']) });
    expect(one.sets).toEqual([set]);
    const none = after(one, { type: 'remove', ids: new Set(['c']) });
    expect(none.sets).toEqual([]);
    expect(after(none, { type: 'undo' }).sets).toEqual([set]);
  });

  it('knows what is saved, also when more was drawn while saving', () => {
    const drawn = after(start, add(mound('b', 2)));
    const more = after(drawn, add(mound('c', 3)));
    expect(isUnsaved(after(drawn, { type: 'saved', revision: 4, state: drawn }))).toBe(false);
    const saved = after(more, { type: 'saved', revision: 4, state: drawn });
    expect([isUnsaved(saved), saved.revision]).toEqual([true, 4]);
  });

  it('discards to what is saved, and can be asked to bring it back', () => {
    const drawn = after(start, add(mound('b', 2)));
    const discarded = after(drawn, { type: 'discard' });
    expect([isUnsaved(discarded), ids(discarded)]).toEqual([false, 'ap']);
    expect(ids(after(discarded, { type: 'undo' }))).toBe('apb');
  });

  it('takes theirs without losing mine', () => {
    const mine = after(start, add(mound('b', 2)));
    const taken = after(mine, { type: 'take', option: { works: [mound('t', 7)], sets: [], revision: 8 } });
    expect([ids(taken), taken.revision, isUnsaved(taken)]).toEqual(['t', 8, false]);
    const back = after(taken, { type: 'undo' });
    expect([ids(back), back.revision, isUnsaved(back)]).toEqual(['apb', 8, true]);
  });
});
