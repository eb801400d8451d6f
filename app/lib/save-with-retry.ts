import { ProblemError } from './api-client.ts';

export interface RetryParts {
  /** Waits so many milliseconds; rejects when the signal is aborted. */
  readonly wait: (milliseconds: number, signal: AbortSignal) => Promise<void>;
  readonly signal: AbortSignal;
  /** told when an attempt failed and another will follow, and with undefined once it went through */
  readonly onTrouble: (error: ProblemError | undefined) => void;
}

const firstPause = 1000;
const longestPause = 30_000;

/** Whether what was refused may pass by itself: no answer, a server that is busy or restarting, a session that ended. */
export const mayPass = (error: unknown): error is ProblemError =>
  error instanceof ProblemError &&
  (error.status === 0 || error.status === 401 || error.status === 429 || error.status >= 502);

/**
 * Sends until it goes through, waiting twice as long after each failure, up to half a minute. There is no last attempt:
 * a run waits for its server, and whoever started it can cancel.
 *
 * @throws ProblemError when the server refuses for good; whatever `wait` or `send` throws when aborted
 */
export async function saveWithRetry<T>(send: () => Promise<T>, parts: RetryParts): Promise<T> {
  let pause = firstPause;
  for (let failed = false; ; failed = true) {
    try {
      const reply = await send();
      if (failed) parts.onTrouble(undefined);
      return reply;
    } catch (error) {
      if (parts.signal.aborted || !mayPass(error)) throw error;
      parts.onTrouble(error);
      await parts.wait(pause, parts.signal);
      pause = Math.min(longestPause, pause * 2);
    }
  }
}

/** Waits by the clock. */
export function waitByClock(milliseconds: number, signal: AbortSignal): Promise<void> {
  return new Promise((resolve, reject) => {
    const stop = () => {
      clearTimeout(timer);
      reject(new DOMException('The run was cancelled.', 'AbortError'));
    };
    const timer = setTimeout(() => {
      signal.removeEventListener('abort', stop);
      resolve();
    }, milliseconds);
    if (signal.aborted) stop();
    else signal.addEventListener('abort', stop, { once: true });
  });
}

/** Why saving waits, for people. @param work what waits: `the run` */
export function troubleWords(error: ProblemError, work: string): string {
  if (error.status === 0)
    return `The server cannot be reached; ${work} waits and saves on as soon as it can.`;
  if (error.status === 401) return `You are signed out; sign in again and ${work} saves on.`;
  return `${error.message} ${work[0].toUpperCase()}${work.slice(1)} waits and tries again.`;
}
