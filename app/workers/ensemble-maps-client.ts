import { releaseProxy, transfer, wrap, type Remote } from 'comlink';
import type { EnsembleMapsFace } from './ensemble-maps-worker.ts';
import type { MapsInput } from '#rasters/ensemble/ensemble-maps.ts';

/** Maps of several ensembles, kept in workers of their own. */
export interface EnsembleMapsDesk {
  /** @returns replicates that are in from the state of an earlier sitting */
  begin(key: string, input: MapsInput, state: Blob | undefined): Promise<number[]>;
  /** The arrays are handed over: they are empty afterwards. */
  add(
    key: string,
    replicate: number,
    closing: Int16Array,
    frames: ReadonlyMap<number, Uint8Array>,
  ): Promise<void>;
  map(key: string, name: string): Promise<Uint8Array | Int16Array>;
  packedMap(key: string, name: string): Promise<Blob>;
  state(key: string): Promise<{ state: Blob; replicates: number }>;
  close(): void;
}

export interface MapsDeskParts {
  readonly createWorker?: () => Worker;
  /** as many as there are cores, unless said */
  readonly workers?: number;
}

const startWorker = () =>
  new Worker(new URL('./ensemble-maps-worker.ts', import.meta.url), {
    type: 'module',
    name: 'ensemble-maps',
  });

/**
 * Each ensemble stays with one worker; further ones are started as ensembles are begun, up to `workers`, and then share.
 * So packing what is to be saved takes all cores.
 */
export function createMapsDesk(parts: MapsDeskParts = {}): EnsembleMapsDesk {
  const { createWorker = startWorker, workers = navigator.hardwareConcurrency || 2 } = parts;
  const hands: { worker: Worker; remote: Remote<EnsembleMapsFace> }[] = [];
  const keeperOf = new Map<string, Remote<EnsembleMapsFace>>();
  let fail!: (why: Error) => void;
  const death = new Promise<never>((_, reject) => (fail = reject));
  death.catch(() => undefined);
  const ask = <T>(reply: Promise<T>): Promise<T> => Promise.race([reply, death]);

  function keeper(key: string): Remote<EnsembleMapsFace> {
    const known = keeperOf.get(key);
    if (known) return known;
    const turn = keeperOf.size % workers;
    if (hands.length === turn) {
      const worker = createWorker();
      worker.addEventListener('error', (event) => {
        fail(new Error(`A worker that keeps the maps stopped: ${event.message}`));
      });
      hands.push({ worker, remote: wrap<EnsembleMapsFace>(worker) });
    }
    const { remote } = hands[turn];
    keeperOf.set(key, remote);
    return remote;
  }

  return {
    begin: (key, input, state) => ask(keeper(key).begin(key, input, state)),
    add: (key, replicate, closing, frames) => {
      const buffers = [closing, ...frames.values()].map((map) => map.buffer as ArrayBuffer);
      return ask(keeper(key).add(key, replicate, closing, transfer(frames, buffers)));
    },
    map: (key, name) => ask(keeper(key).map(key, name) as Promise<Uint8Array | Int16Array>),
    packedMap: (key, name) => ask(keeper(key).packedMap(key, name)),
    state: (key) => ask(keeper(key).state(key)),
    close: () => {
      for (const { worker, remote } of hands) {
        remote[releaseProxy]();
        worker.terminate();
      }
      fail(new Error('The maps were closed'));
    },
  };
}
