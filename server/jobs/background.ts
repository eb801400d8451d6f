import type { Logger } from 'pino';
import type { TaskProgress } from './raster-pool.ts';

/** How far a piece of work is. */
export interface WorkProgress {
  /** 0..1 */
  share: number;
  /** null until there is something to judge by */
  secondsLeft: number | null;
}

/** Long work that goes on behind the requests, one piece after the other. What is to be done is remembered by rows. */
export interface Background {
  /**
   * Does `work` after everything that was asked for before it. What waits under the same id is dropped for it. The work
   * writes down its own failures; what it throws beyond that is logged.
   */
  start(id: string, work: (progress: Required<TaskProgress>) => Promise<void>): void;
  /** How far a piece of work is that is under way; undefined for one that waits or is unknown. */
  progressOf(id: string): WorkProgress | undefined;
  /** Drops a piece of work that waits, or stops one under way; resolves when it has ended. */
  cancel(id: string): Promise<void>;
  /** Resolves when nothing is left to do. */
  idle(): Promise<void>;
  /** Stops what is under way, by a signal whose reason is `closing`, and takes no more. */
  close(): Promise<void>;
}

/** Why work is stopped when the server ends: it is to be taken up again at the next start. */
export const closing = new Error('The server is closing');
const cancelled = new Error('Cancelled');

interface Piece {
  id: string;
  work: (progress: Required<TaskProgress>) => Promise<void>;
}

/** Below this share the time left would be a guess. */
const leastShare = 0.03;

export function createBackground(log: Logger): Background {
  const waiting: Piece[] = [];
  let closed = false;
  let present:
    { id: string; abort: AbortController; began: number; share: number; ended: Promise<void> } | undefined;
  let last: Promise<void> = Promise.resolve();

  async function next(): Promise<void> {
    const piece = waiting.shift();
    if (!piece) return;
    const abort = new AbortController();
    const own = { id: piece.id, abort, began: performance.now(), share: 0, ended: Promise.resolve() };
    const onProgress = (share: number) => {
      own.share = Math.max(own.share, Math.min(1, share));
    };
    present = own;
    own.ended = (async () => {
      try {
        await piece.work({ signal: abort.signal, onProgress });
      } catch (error) {
        if (!abort.signal.aborted) log.error({ err: error, work: piece.id }, 'work in the background failed');
      }
    })();
    await own.ended;
    present = undefined;
  }

  return {
    start(id, work) {
      if (closed) return;
      drop(waiting, id);
      waiting.push({ id, work });
      last = last.then(next);
    },
    progressOf(id) {
      if (present?.id !== id) return undefined;
      const { share, began } = present;
      const seconds = (performance.now() - began) / 1000;
      return { share, secondsLeft: share < leastShare ? null : (seconds * (1 - share)) / share };
    },
    async cancel(id) {
      drop(waiting, id);
      if (present?.id !== id) return;
      present.abort.abort(cancelled);
      await present.ended;
    },
    async idle() {
      for (let seen; seen !== last;) {
        seen = last;
        await seen;
      }
    },
    async close() {
      closed = true;
      waiting.length = 0;
      present?.abort.abort(closing);
      await last;
    },
  };
}

function drop(waiting: Piece[], id: string): void {
  const at = waiting.findIndex((piece) => piece.id === id);
  if (at >= 0) waiting.splice(at, 1);
}
