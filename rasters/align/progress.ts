/** How long work says how far it is, and is told to stop. */
export interface Progress {
  /** told the share that is done, 0..1, now and then and at the end */
  readonly onProgress?: (share: number) => void;
  readonly signal?: AbortSignal;
}

/** Lets whatever waits for this thread have its turn, so that it can be told to stop. @throws the signal's reason */
export async function pause({ signal }: Progress): Promise<void> {
  await new Promise((resolve) => setTimeout(resolve));
  signal?.throwIfAborted();
}
