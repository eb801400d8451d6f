import * as database from 'idb-keyval';
import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import type { Option } from '#contract/options.ts';
import type { Work } from '#contract/works.ts';
import { draftOf, optionDraft } from './option-draft.ts';

const stored = new Map<string, unknown>();
vi.mock('idb-keyval', () => ({
  get: vi.fn((key: string) => Promise.resolve(stored.get(key))),
  set: vi.fn((key: string, value: unknown) => Promise.resolve(void stored.set(key, structuredClone(value)))),
  del: vi.fn((key: string) => Promise.resolve(void stored.delete(key))),
  keys: vi.fn(() => Promise.resolve([...stored.keys()])),
}));

const mounds = (count: number): Work[] =>
  Array.from({ length: count }, (_, i) => ({
    ...{ kind: 'mound', id: `m${i}`, year: 2028, x: i, y: 2, radius: 1, strength: 1, halo: 0 },
  }));
const option = {
  id: 'o-1',
  name: 'Option',
  wait: false,
  works: [],
  sets: [],
  revision: 3,
} as unknown as Option;
const large = optionDraft(draftOf(option), { type: 'add', works: mounds(50) });
/** A page that was loaded anew. */
const page = async () => {
  vi.resetModules();
  return import('./draft-storage.ts');
};

beforeEach(() => {
  sessionStorage.clear();
  stored.clear();
  // The tab takes 1,000 letters a thing.
  const put = Object.getOwnPropertyDescriptor(Storage.prototype, 'setItem')!.value as Storage['setItem'];
  vi.spyOn(Storage.prototype, 'setItem').mockImplementation(function (this: Storage, key, value) {
    if (value.length > 1000) throw new DOMException('full', 'QuotaExceededError');
    put.call(this, key, value);
  });
});
afterEach(() => vi.restoreAllMocks());

it('keeps a drawing in the database where the tab has no room, and brings it back after a reload', async () => {
  expect(await (await page()).keepDraft('o-1', large)).toBe(true);
  const later = await page();
  await later.loadLargeDrafts();
  expect(later.restoreDraft(option).works).toEqual(large.works);
  await later.keepDraft('o-1', draftOf(option));
  expect([stored.size, sessionStorage.length]).toEqual([0, 0]);
});

it('says so where the database refuses it too', async () => {
  vi.mocked(database.set).mockRejectedValueOnce(new Error('no room'));
  expect(await (await page()).keepDraft('o-1', large)).toBe(false);
});

it('never brings back what was saved while it was still being written', async () => {
  const { keepDraft } = await page();
  const slow = keepDraft('o-1', large);
  await keepDraft('o-1', draftOf(option));
  await slow;
  expect([sessionStorage.length, stored.size]).toEqual([0, 0]);
});

it('sweeps what tabs left long ago, and nothing of late', async () => {
  stored.set('draft/1000/old', {});
  stored.set(`draft/${Date.now()}/new`, {});
  await (await page()).loadLargeDrafts();
  expect([...stored.keys()].map((key) => key.split('/')[2])).toEqual(['new']);
});
