import { describe, expect, it, vi } from 'vitest';
import type { LayerPart } from '#contract/layers.ts';
import { createUploadStore, type SendUpload } from './upload-store.ts';

const files = (...names: string[]) => names.map((name) => new File(['abc'], name));
const parts: LayerPart[] = ['habitat', 'cover', 'refuge'];
const partOf = (file: File) => parts.find((part) => file.name.startsWith(part));

function started(send: SendUpload, ...names: string[]) {
  const store = createUploadStore(send);
  store.tell({ type: 'dropped', files: files(...names), guess: partOf });
  store.tell({ type: 'confirmed', keys: store.snapshot().map((u) => u.key) });
  return store;
}

describe('createUploadStore', () => {
  it('sends one after the other and takes what arrived off the list', async () => {
    const order: string[] = [];
    const store = started(
      async ({ file, part }) => {
        order.push(`${part} starts`);
        await Promise.resolve();
        order.push(`${file.name} there`);
      },
      'habitat.tif',
      'cover.tif',
    );
    await vi.waitFor(() => expect(store.snapshot()).toEqual([]));
    expect(order).toEqual(['habitat starts', 'habitat.tif there', 'cover starts', 'cover.tif there']);
  });

  it('keeps a refused file with what the server said, and goes on with the next', async () => {
    const sent: string[] = [];
    const store = started(
      ({ file }) => {
        sent.push(file.name);
        return file.name === 'cover.tif' ? Promise.reject(new Error('five bands')) : Promise.resolve();
      },
      'cover.tif',
      'refuge.tif',
    );
    await vi.waitFor(() => expect(sent).toHaveLength(2));
    await vi.waitFor(() => expect(store.snapshot()).toHaveLength(1));
    expect(store.snapshot()[0].state).toMatchObject({ kind: 'refused', error: { message: 'five bands' } });
  });

  it('cancels the file that is being sent and says nothing of it afterwards', async () => {
    let signal: AbortSignal | undefined;
    const store = started((upload) => {
      signal = upload.signal;
      return new Promise((_, reject) =>
        upload.signal.addEventListener('abort', () => reject(new DOMException('cancelled', 'AbortError'))),
      );
    }, 'habitat.tif');
    await vi.waitFor(() => expect(signal).toBeDefined());
    store.remove(store.snapshot()[0].key);
    expect(signal!.aborted).toBe(true);
    await Promise.resolve();
    expect(store.snapshot()).toEqual([]);
  });
});
