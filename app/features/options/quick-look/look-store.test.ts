// @vitest-environment node
import { expect, it, vi } from 'vitest';
import type { Action } from '#sim-core/spec/run-spec.ts';
import type { QuickLookHandle, QuickLookListener } from '#app/workers/quick-look-client.ts';
import type { Look, QuickLookStart } from '#app/workers/quick-look-desk.ts';
import { createLookStore } from './look-store.ts';

const look = (closable: number): Look => ({
  years: Int16Array.of(2030),
  texels: new Uint8Array(1),
  summary: { closable, closedBy: [], half: undefined, eighty: undefined, ninety: undefined },
});
const works: Action[] = [{ kind: 'mound', year: 2027, x: 1, y: 1, radius: 1, strength: 1, halo: 0 }];

function begin() {
  let listener!: QuickLookListener;
  const handle = {
    setWorks: vi.fn<QuickLookHandle['setWorks']>(),
    lay: vi.fn<QuickLookHandle['lay']>(),
    close: vi.fn<() => void>(),
  };
  const start = vi.fn((_: QuickLookStart, heard: QuickLookListener) => {
    listener = heard;
    return handle;
  });
  const store = createLookStore({} as QuickLookStart, start);
  return { store, handle, start, hear: () => listener };
}

it('opens the ground when somebody listens, and closes it when nobody does any more', () => {
  const { store, handle, start, hear } = begin();
  store.setWorks(works);
  expect(start).not.toHaveBeenCalled();
  const changed = vi.fn();
  const leave = store.subscribe(changed);
  expect(handle.setWorks).toHaveBeenCalledWith(works);
  hear().onLook(look(5), works);
  expect([changed.mock.calls.length, store.read().look?.summary.closable]).toEqual([1, 5]);
  leave();
  expect(handle.close).toHaveBeenCalledOnce();
  expect(store.read().look).toBeUndefined();
});

it('keeps what there would be without works, and the lines of a look shortly before', () => {
  const { store, hear } = begin();
  store.subscribe(() => undefined);
  hear().onLook(look(1), []);
  hear().onLines([{ year: 2030, lines: [], label: undefined }]);
  hear().onLook(look(2), works);
  expect(store.read()).toMatchObject({ wait: { closable: 1 }, look: { summary: { closable: 2 } } });
  expect(store.read().lines).toHaveLength(1);
});

it('asks once for the same works, and says when nothing comes any more', async () => {
  const { store, handle, hear } = begin();
  await expect(store.layer.lay({ pattern: { kind: 'apart', distance: 5 }, seed: 'a' })).rejects.toThrow(
    'not open',
  );
  store.subscribe(() => undefined);
  store.setWorks(works);
  store.setWorks(works);
  expect(handle.setWorks).toHaveBeenCalledTimes(1);
  hear().onFailure(new Error('out of memory'));
  expect(store.read().error).toMatchObject({ message: 'out of memory' });
});
