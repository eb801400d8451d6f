import { describe, expect, it, vi } from 'vitest';
import type { LayerPart } from '#contract/layers.ts';
import { createSendingStore, type SendFile } from './sending-store.ts';

const files = (...names: string[]) => names.map((name) => new File(['abc'], name));
const parts: LayerPart[] = ['habitat', 'cover', 'refuge'];
const partOf = (file: File) => parts.find((part) => file.name.startsWith(part));

function started(send: SendFile, ...names: string[]) {
  const store = createSendingStore(send);
  store.drop(files(...names), partOf);
  return store;
}

describe('createSendingStore', () => {
  it('sends one after the other, each with the part that it most likely plays, and lets go of what arrived', async () => {
    const order: string[] = [];
    const store = started(
      async ({ file, part }) => {
        order.push(`${part ?? 'no part'} starts`);
        await Promise.resolve();
        order.push(`${file.name} there`);
      },
      'habitat.tif',
      'survey.tif',
    );
    expect(store.snapshot().map(({ key, state }) => [key, state.kind])).toEqual([
      [1, 'sending'],
      [2, 'waiting'],
    ]);
    await vi.waitFor(() => expect(store.snapshot()).toEqual([]));
    expect(order).toEqual(['habitat starts', 'habitat.tif there', 'no part starts', 'survey.tif there']);
  });

  it('keeps a refused file with what the server said, and goes on with the next', async () => {
    const sent: string[] = [];
    const store = started(
      ({ file }) => {
        sent.push(file.name);
        return file.name === 'cover.tif' ? Promise.reject(new Error('too large')) : Promise.resolve();
      },
      'cover.tif',
      'refuge.tif',
    );
    await vi.waitFor(() => expect(sent).toHaveLength(2));
    await vi.waitFor(() => expect(store.snapshot()).toHaveLength(1));
    expect(store.snapshot()[0].state).toMatchObject({ kind: 'refused', error: { message: 'too large' } });
    store.drop(files('habitat.tif'), partOf);
    expect(store.snapshot().map(({ key }) => key)).toEqual([1, 2]);
  });

  it('cancels the file that is being sent and says nothing of it afterwards', async () => {
    let signal: AbortSignal | undefined;
    const store = started((sending) => {
      signal = sending.signal;
      return new Promise((_, reject) =>
        sending.signal.addEventListener('abort', () => reject(new DOMException('cancelled', 'AbortError'))),
      );
    }, 'habitat.tif');
    await vi.waitFor(() => expect(signal).toBeDefined());
    store.remove(store.snapshot()[0].key);
    expect(signal!.aborted).toBe(true);
    await Promise.resolve();
    expect(store.snapshot()).toEqual([]);
  });
});
