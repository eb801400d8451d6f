import { beforeEach, describe, expect, it } from 'vitest';
import type { Option } from '#contract/options.ts';
import type { Work, WorkSet } from '#contract/works.ts';
import { forgetDraft, keepDraft, restoreDraft } from './draft-storage.ts';
import { draftOf, isUnsaved, optionDraft } from './option-draft.ts';

const set: WorkSet = { id: 's', laid: { pattern: 'scattered', seed: '1', parameters: { count: 1 } } };
const mound: Work = {
  kind: 'mound',
  id: 'm',
  set: 's',
  year: 2028,
  x: 1,
  y: 2,
  radius: 1,
  strength: 1,
  halo: 0,
};
const option = (revision: number, works: Work[] = []) =>
  ({
    id: 'o-1',
    name: 'Option',
    wait: false,
    works,
    sets: works.length > 0 ? [set] : [],
    revision,
  }) as unknown as Option;
const add = { type: 'add', works: [mound], sets: [set] } as const;

beforeEach(() => {
  sessionStorage.clear();
});

describe('an unsaved drawing', () => {
  it('survives a reload on the revision that it was made on, with how it was laid and the way back', async () => {
    await keepDraft('o-1', optionDraft(draftOf(option(3)), add));
    const restored = restoreDraft(option(4));
    expect([restored.works, restored.sets]).toEqual([[mound], [set]]);
    expect([restored.revision, isUnsaved(restored)]).toEqual([3, true]);
    expect(optionDraft(restored, { type: 'undo' }).works).toEqual([]);
  });

  it('is forgotten once it is saved, or when it is what the server has anyway', async () => {
    const drawn = optionDraft(draftOf(option(3)), add);
    await keepDraft('o-1', drawn);
    expect(restoreDraft(option(4, [mound])).revision).toBe(4);
    await keepDraft('o-1', optionDraft(drawn, { type: 'saved', revision: 4, state: drawn }));
    expect(sessionStorage.length).toBe(0);
    await keepDraft('o-1', drawn);
    forgetDraft('o-1');
    expect(restoreDraft(option(4)).works).toEqual([]);
  });

  it('gives way to what the server has when it cannot be read', () => {
    sessionStorage.setItem('foothold.draft.o-1', '{"revision":3,"works":[{"kind":"tower"}]}');
    expect(restoreDraft(option(4, [mound])).works).toHaveLength(1);
    sessionStorage.setItem('foothold.draft.o-1', 'not JSON');
    expect(restoreDraft(option(4, [mound])).works).toHaveLength(1);
  });
});
