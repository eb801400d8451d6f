/** How long work says how far it is, and is told to stop. */
export interface Progress {
  /** told the share that is done, 0..1, now and then and at the end */
  readonly onProgress?: (share: number) => void;
  readonly signal?: AbortSignal;
}

const longestMs = 25;

/**
 * Gives the way to say how far work is. Each call tells the share, throws the signal's reason when it is aborted, and,
 * now and then, lets whatever waits for this thread have its turn, so that it can be told to stop.
 */
export function pacer({ onProgress, signal }: Progress): (share: number) => Promise<void> {
  let last = performance.now();
  return async (share) => {
    onProgress?.(share);
    if (performance.now() - last > longestMs) {
      await new Promise((resolve) => setTimeout(resolve));
      last = performance.now();
    }
    signal?.throwIfAborted();
  };
}
