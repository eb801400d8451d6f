/** Frames of runs, row-major round(255·C), the least recently shown dropped first. */
export interface FrameCache {
  /** the frame when it is at hand; counts as shown */
  peek(runId: string, year: number): Uint8Array | undefined;
  /** Keeps a frame that came by another way, such as from a run that is growing. */
  put(runId: string, year: number, frame: Uint8Array): void;
  /** @throws whatever the fetch throws; a failed fetch is tried afresh the next time */
  load(runId: string, year: number): Promise<Uint8Array>;
  /** Fetches what is not at hand yet, in the order given and one at a time; a later call replaces the rest of it. */
  prefetch(runId: string, years: readonly number[]): void;
  /** how many frames of a size the cache holds: what is worth fetching ahead */
  capacity(cells: number): number;
  /** one cell through the years whose frames are at hand, ascending; none of them counts as shown by this */
  history(runId: string, first: number, last: number, cell: number): { year: number; byte: number }[];
  drop(runId: string): void;
  /** Calls back whenever a frame has come in; returns how to end that. */
  readonly subscribe: (listener: () => void) => () => void;
  /** how many frames have come in so far, so that a change is seen */
  readonly version: () => number;
}

export type FetchFrame = (runId: string, year: number) => Promise<Uint8Array>;

/** A few frames are kept whatever their size, or playing would fetch each one twice. */
const fewest = 4;

/** @param budget bytes that the kept frames may take together */
export function createFrameCache(fetchFrame: FetchFrame, budget: number): FrameCache {
  // A Map keeps the order of insertion, so the first key is the one that was shown longest ago.
  const kept = new Map<string, Uint8Array>();
  const coming = new Map<string, Promise<Uint8Array>>();
  const listeners = new Set<() => void>();
  let bytes = 0;
  /** counts what has come in */
  let held = 0;
  let wave = 0;

  const keyOf = (runId: string, year: number) => `${runId}/${year}`;
  const forget = (key: string) => {
    bytes -= kept.get(key)?.byteLength ?? 0;
    kept.delete(key);
  };
  const keep = (key: string, frame: Uint8Array) => {
    held++;
    forget(key);
    kept.set(key, frame);
    bytes += frame.byteLength;
    for (const oldest of kept.keys()) {
      if (bytes <= budget || kept.size <= fewest) break;
      forget(oldest);
    }
    listeners.forEach((listener) => listener());
  };

  function peek(runId: string, year: number): Uint8Array | undefined {
    const key = keyOf(runId, year);
    const frame = kept.get(key);
    if (frame) {
      kept.delete(key);
      kept.set(key, frame);
    }
    return frame;
  }

  function load(runId: string, year: number): Promise<Uint8Array> {
    const present = peek(runId, year);
    if (present) return Promise.resolve(present);
    const key = keyOf(runId, year);
    const under = coming.get(key);
    if (under) return under;
    const fetched = fetchFrame(runId, year)
      .then((frame) => {
        keep(key, frame);
        return frame;
      })
      .finally(() => coming.delete(key));
    coming.set(key, fetched);
    return fetched;
  }

  async function fetchAhead(runId: string, years: readonly number[], mine: number) {
    for (const year of years) {
      if (mine !== wave) return;
      if (kept.has(keyOf(runId, year))) continue;
      // What fails ahead of time is fetched, and reported, when it is shown.
      await load(runId, year).catch(() => undefined);
    }
  }

  return {
    peek,
    put: (runId, year, frame) => {
      keep(keyOf(runId, year), frame);
    },
    load,
    prefetch: (runId, years) => {
      void fetchAhead(runId, years, ++wave);
    },
    capacity: (cells) => Math.max(fewest, Math.floor(budget / cells)),
    history: (runId, first, last, cell) => {
      const found: { year: number; byte: number }[] = [];
      for (let year = first; year <= last; year++) {
        const byte = kept.get(keyOf(runId, year))?.[cell];
        if (byte !== undefined) found.push({ year, byte });
      }
      return found;
    },
    subscribe: (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    version: () => held,
    drop: (runId) => {
      for (const key of [...kept.keys()]) if (key.startsWith(`${runId}/`)) forget(key);
    },
  };
}

/**
 * Stored years worth fetching ahead of a playhead, the next ones in the direction of play first, then those behind: all
 * of them where the cache holds a whole run, so that a cell can be read through it; else a few.
 * @param room frames that the cache holds
 */
export function yearsAround(stored: readonly number[], year: number, room: number): number[] {
  const after = stored.filter((y) => y > year);
  const before = stored.filter((y) => y < year).reverse();
  if (stored.length <= room) return [...after, ...before];
  const ahead = Math.max(1, Math.min(12, Math.floor((room - 1) * 0.7)));
  const behind = Math.max(0, Math.min(6, room - 2 - ahead));
  return [...after.slice(0, ahead), ...before.slice(0, behind)];
}
