// @vitest-environment node
import { describe, expect, it } from 'vitest';
import type { Option } from '#contract/options.ts';
import {
  draftOf,
  isUnsaved,
  moundsOf,
  optionDraft,
  type DraftAction,
  type OptionDraft,
} from './option-draft.ts';

const mound = (x: number, year = 2028) => ({
  id: `m${x}`,
  kind: 'mound' as const,
  year,
  x,
  y: 10,
  radius: 1.5,
  strength: 1,
  halo: 0,
});
const planting = {
  id: 'p',
  kind: 'planting',
  year: 2028,
  cover: 0.5,
  area: { shape: 'disc', x: 1, y: 1, radius: 2 },
} as const;
const after = (draft: OptionDraft, ...actions: DraftAction[]) => actions.reduce(optionDraft, draft);
const places = (draft: OptionDraft) => moundsOf(draft.works).map((work) => work.action.x);
const start = draftOf({ works: [mound(1), planting], revision: 3 });

describe('optionDraft', () => {
  it('places, selects what was placed, and takes it back and forth', () => {
    const placed = after(start, { type: 'place', mound: mound(2) });
    expect(places(placed)).toEqual([1, 2]);
    expect(placed.works.find((work) => work.key === placed.selected)?.action).toMatchObject({ x: 2 });
    const undone = after(placed, { type: 'undo' });
    expect([places(undone), undone.selected, isUnsaved(undone)]).toEqual([[1], undefined, false]);
    expect(places(after(undone, { type: 'redo' }))).toEqual([1, 2]);
    expect(after(start, { type: 'undo' })).toBe(start);
    expect(after(start, { type: 'redo' })).toBe(start);
  });

  it('gives a new mound a key that no earlier one had, also after an undo', () => {
    const twice = after(
      start,
      { type: 'place', mound: mound(2) },
      { type: 'undo' },
      { type: 'place', mound: mound(3) },
    );
    const keys = [...twice.works, ...after(twice, { type: 'place', mound: mound(4) }).works].map(
      (w) => w.key,
    );
    expect(new Set(keys).size).toBe(4);
  });

  it('counts a mound pushed along by arrow keys as one step back', () => {
    const moved = after(
      start,
      { type: 'change', key: 'm1', change: { x: 2, y: 10 } },
      { type: 'change', key: 'm1', change: { x: 3, y: 10 } },
      { type: 'change', key: 'm1', change: { year: 2030 } },
    );
    expect(moved.past).toHaveLength(2);
    expect(after(moved, { type: 'undo' }).works[0].action).toMatchObject({ x: 3, year: 2028 });
    expect(after(moved, { type: 'undo' }, { type: 'undo' }).works[0].action).toMatchObject({ x: 1 });
  });

  it('changes nothing for what is not there, is no mound, or is the same already', () => {
    expect(after(start, { type: 'change', key: 'w9', change: { x: 2 } })).toBe(start);
    expect(after(start, { type: 'change', key: 'p', change: { x: 2 } })).toBe(start);
    expect(after(start, { type: 'change', key: 'm1', change: { x: 1 } })).toBe(start);
    expect(after(start, { type: 'remove', key: 'w9' })).toBe(start);
  });

  it('keeps works of other kinds in their place', () => {
    const removed = after(start, { type: 'remove', key: 'm1' });
    expect(removed.works.map((work) => work.action)).toEqual([planting]);
    expect(isUnsaved(removed)).toBe(true);
  });

  it('knows what is saved, also when more was drawn while saving', () => {
    const drawn = after(start, { type: 'place', mound: mound(2) });
    const more = after(drawn, { type: 'place', mound: mound(3) });
    expect(isUnsaved(after(drawn, { type: 'saved', revision: 4, works: drawn.works }))).toBe(false);
    const saved = after(more, { type: 'saved', revision: 4, works: drawn.works });
    expect([isUnsaved(saved), saved.revision]).toEqual([true, 4]);
  });

  it('discards to what is saved, and can be asked to bring it back', () => {
    const drawn = after(start, { type: 'place', mound: mound(2) });
    const discarded = after(drawn, { type: 'discard' });
    expect([isUnsaved(discarded), places(discarded)]).toEqual([false, [1]]);
    expect(places(after(discarded, { type: 'undo' }))).toEqual([1, 2]);
  });

  it('takes theirs without losing mine', () => {
    const mine = after(start, { type: 'place', mound: mound(2) });
    const taken = after(mine, {
      type: 'take',
      option: { works: [mound(7)], revision: 8 } as unknown as Option,
    });
    expect([places(taken), taken.revision, isUnsaved(taken)]).toEqual([[7], 8, false]);
    const back = after(taken, { type: 'undo' });
    expect([places(back), back.revision, isUnsaved(back)]).toEqual([[1, 2], 8, true]);
  });
});
