import { act, cleanup, renderHook, waitFor } from '@testing-library/react';
import { afterEach, beforeEach, expect, it, vi } from 'vitest';
import type { QuickLookStart } from '#app/workers/quick-look-desk.ts';
import { startSuggest } from '#app/workers/suggest-client.ts';
import { useSuggest } from './use-suggest.ts';

vi.mock('#app/workers/suggest-client.ts', () => ({ startSuggest: vi.fn(), startGainMap: vi.fn() }));

const mound = { radius: 1.5, strength: 1, halo: 1, clumps: 9 };
const input = { optionId: 'o-1', start: {} as QuickLookStart, drawn: [], mound, year: 2027, each: 500 };
const found = { footholds: [{ x: 1, y: 2, gain: 0.5 }, { x: 3, y: 4, gain: 0.2 }], knee: 1 }; // prettier-ignore
let answer: (result: typeof found) => void;

beforeEach(() => {
  sessionStorage.clear();
  vi.mocked(startSuggest).mockReset();
  vi.mocked(startSuggest).mockImplementation(() => ({
    result: new Promise((resolve) => (answer = resolve as never)),
    cancel: () => undefined,
  }));
});
afterEach(cleanup);
const show = (more: Partial<typeof input> = {}) => renderHook(() => useSuggest({ ...input, ...more }));

it('comes back with the page once it is finished, with as many as were taken, until it is dismissed', async () => {
  const { result, unmount } = show();
  act(() => result.current.suggest());
  answer(found);
  await waitFor(() => expect(result.current.works).toHaveLength(4));
  act(() => result.current.take(1));
  unmount();
  const { result: later } = show({ mound: { ...mound, radius: 9 } });
  expect(later.current.works).toHaveLength(2);
  expect(later.current.works[0]).toMatchObject({ kind: 'mound', radius: 1.5, x: 1, y: 2 });
  expect(startSuggest).toHaveBeenCalledOnce();
  act(() => later.current.forget());
  expect([later.current.works, sessionStorage.length]).toEqual([[], 0]);
});

it('begins again by itself with the same inputs when the page was left while it was at work', async () => {
  const { result, unmount } = show();
  act(() => result.current.setPen({ by: 'count', count: '7', budget: '' }));
  act(() => result.current.suggest());
  unmount();
  const { result: later } = show({ mound: { ...mound, radius: 9 }, year: 2040 });
  await waitFor(() => expect([later.current.job.running, later.current.again]).toEqual([true, true]));
  const [before, after] = vi.mocked(startSuggest).mock.calls.map(([request]) => request);
  expect(after).toEqual(before);
  expect(after).toMatchObject({ foothold: { radius: 1.5, year: 2027 }, amount: { count: 7 } });
});

it('leaves nothing when it is cancelled, not even what an earlier one came to or an answer on its way', async () => {
  const { result, unmount } = show();
  act(() => result.current.suggest());
  answer(found);
  await waitFor(() => expect(result.current.works).toHaveLength(4));
  act(() => result.current.suggest());
  expect(result.current.works).toEqual([]);
  act(() => result.current.job.cancel());
  await act(async () => {
    answer(found);
    await Promise.resolve();
  });
  expect([result.current.works, result.current.job.running, sessionStorage.length]).toEqual([[], false, 0]);
  unmount();
  expect(show().result.current.job.running).toBe(false);
  expect(startSuggest).toHaveBeenCalledTimes(2);
});
