import type { LayerPart } from '#contract/layers.ts';
import type { Progress } from '#app/lib/api-client.ts';
import { nextUpload, uploadQueue, type Upload, type UploadEvent } from './upload-queue.ts';

/** How one file is sent: settles when the server has it, rejects with what it said. */
export type SendUpload = (upload: {
  file: File;
  part: LayerPart;
  onProgress: (progress: Progress) => void;
  signal: AbortSignal;
}) => Promise<unknown>;

/** The uploads of one page: sends confirmed files one after the other, whatever is drawn meanwhile. */
export interface UploadStore {
  subscribe: (listener: () => void) => () => void;
  snapshot: () => readonly Upload[];
  tell: (event: Extract<UploadEvent, { type: 'dropped' | 'chose' | 'confirmed' }>) => void;
  /** takes a file off the list; one that is being sent is cancelled and leaves nothing behind */
  remove: (key: number) => void;
}

export function createUploadStore(send: SendUpload): UploadStore {
  let uploads: readonly Upload[] = [];
  let sending: { key: number; abort: AbortController } | undefined;
  const listeners = new Set<() => void>();
  const apply = (event: UploadEvent) => {
    uploads = uploadQueue(uploads, event);
    listeners.forEach((listener) => listener());
  };

  async function pump(): Promise<void> {
    const next = nextUpload(uploads);
    if (next?.part === undefined || sending !== undefined) return;
    const { key, file, part } = next;
    const abort = new AbortController();
    sending = { key, abort };
    apply({ type: 'sending', key, progress: { sent: 0, total: file.size } });
    try {
      await send({
        file,
        part,
        onProgress: (progress) => apply({ type: 'sending', key, progress }),
        signal: abort.signal,
      });
      apply({ type: 'removed', key });
    } catch (error) {
      if (!abort.signal.aborted) apply({ type: 'refused', key, error });
    } finally {
      sending = undefined;
    }
    await pump();
  }

  return {
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    snapshot: () => uploads,
    tell: (event) => {
      apply(event);
      void pump();
    },
    remove: (key) => {
      if (sending?.key === key) sending.abort.abort();
      apply({ type: 'removed', key });
    },
  };
}
