import type { LayerPart } from '#contract/layers.ts';
import type { Progress } from '#app/lib/api-client.ts';
import { nextToSend, sendingQueue, type Sending, type SendingEvent } from './sending-queue.ts';

/** How one file is sent: settles when the server has it, rejects with what it said. */
export type SendFile = (sending: {
  file: File;
  part: LayerPart | undefined;
  onProgress: (progress: Progress) => void;
  signal: AbortSignal;
}) => Promise<unknown>;

/** The files of one page on their way: sent one after the other, whatever is drawn meanwhile. */
export interface SendingStore {
  subscribe: (listener: () => void) => () => void;
  snapshot: () => readonly Sending[];
  drop: (files: readonly File[], guess: (file: File) => LayerPart | undefined) => void;
  /** takes a file off the list; one that is being sent is cancelled and leaves nothing behind */
  remove: (key: number) => void;
}

export function createSendingStore(send: SendFile): SendingStore {
  let sendings: readonly Sending[] = [];
  let current: { key: number; abort: AbortController } | undefined;
  const listeners = new Set<() => void>();
  const apply = (event: SendingEvent) => {
    sendings = sendingQueue(sendings, event);
    listeners.forEach((listener) => listener());
  };

  async function pump(): Promise<void> {
    const next = nextToSend(sendings);
    if (next === undefined || current !== undefined) return;
    const { key, file, part } = next;
    const abort = new AbortController();
    current = { key, abort };
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
      current = undefined;
    }
    await pump();
  }

  return {
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    snapshot: () => sendings,
    drop: (files, guess) => {
      apply({ type: 'dropped', files, guess });
      void pump();
    },
    remove: (key) => {
      if (current?.key === key) current.abort.abort();
      apply({ type: 'removed', key });
    },
  };
}
