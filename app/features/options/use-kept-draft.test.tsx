import { cleanup, renderHook } from '@testing-library/react';
import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import type { Work } from '#contract/works.ts';
import { draftOf, optionDraft } from './option-draft.ts';
import { useKeptDraft } from './use-kept-draft.ts';

const mound: Work = { kind: 'mound', id: 'm', year: 2028, x: 1, y: 2, radius: 1, strength: 1, halo: 0 };
const saved = draftOf({ works: [], sets: [], revision: 1 });
const drawn = optionDraft(saved, { type: 'add', works: [mound] });
const kept = () => sessionStorage.getItem('foothold.draft.o');

beforeEach(() => {
  sessionStorage.clear();
  vi.useFakeTimers();
});
afterEach(() => {
  cleanup();
  vi.useRealTimers();
});

it('keeps a drawing once it rests, and not at every step', () => {
  const writes = vi.spyOn(Storage.prototype, 'setItem');
  const { rerender } = renderHook(({ draft }) => useKeptDraft('o', draft), {
    initialProps: { draft: drawn },
  });
  rerender({ draft: optionDraft(drawn, { type: 'change', works: [{ ...mound, x: 5 }] }) });
  expect(kept()).toBeNull();
  vi.advanceTimersByTime(1000);
  expect(kept()).toContain('"x":5');
  expect(writes).toHaveBeenCalledTimes(1);
});

it('keeps what waits when the page is hidden or the option is left', () => {
  renderHook(() => useKeptDraft('o', drawn));
  window.dispatchEvent(new Event('pagehide'));
  expect(kept()).toContain('"id":"m"');
  sessionStorage.clear();
  const { unmount } = renderHook(() => useKeptDraft('o', drawn));
  unmount();
  expect(kept()).toContain('"id":"m"');
});

it('brings nothing back that was forgotten after it was kept', () => {
  const { unmount } = renderHook(() => useKeptDraft('o', drawn));
  vi.advanceTimersByTime(1000);
  sessionStorage.clear();
  unmount();
  expect(kept()).toBeNull();
});
