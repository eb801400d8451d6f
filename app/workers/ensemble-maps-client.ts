import { releaseProxy, transfer, wrap } from 'comlink';
import type { EnsembleMapsFace } from './ensemble-maps-worker.ts';
import type { MapsInput } from '#rasters/ensemble/ensemble-maps.ts';

/** Maps of several ensembles, kept in a worker of their own. */
export interface EnsembleMapsDesk {
  /** @returns replicates that are in from the state of an earlier sitting */
  begin(key: string, input: MapsInput, state: Blob | undefined): Promise<number[]>;
  /** The arrays are handed over: they are empty afterwards. */
  add(
    key: string,
    replicate: number,
    closing: Int16Array,
    covers: ReadonlyMap<number, Float32Array>,
  ): Promise<void>;
  map(key: string, name: string): Promise<Uint8Array | Int16Array>;
  packedMap(key: string, name: string): Promise<Blob>;
  state(key: string): Promise<{ state: Blob; replicates: number }>;
  close(): void;
}

export function createMapsDesk(): EnsembleMapsDesk {
  const worker = new Worker(new URL('./ensemble-maps-worker.ts', import.meta.url), {
    type: 'module',
    name: 'ensemble-maps',
  });
  const remote = wrap<EnsembleMapsFace>(worker);
  let fail!: (why: Error) => void;
  const death = new Promise<never>((_, reject) => (fail = reject));
  death.catch(() => undefined);
  worker.addEventListener('error', (event) => {
    fail(new Error(`The worker that keeps the maps stopped: ${event.message}`));
  });
  const ask = <T>(reply: Promise<T>): Promise<T> => Promise.race([reply, death]);
  return {
    begin: (key, input, state) => ask(remote.begin(key, input, state)),
    add: (key, replicate, closing, covers) => {
      const buffers = [closing, ...covers.values()].map((map) => map.buffer as ArrayBuffer);
      return ask(remote.add(key, replicate, closing, transfer(covers, buffers)));
    },
    map: (key, name) => ask(remote.map(key, name) as Promise<Uint8Array | Int16Array>),
    packedMap: (key, name) => ask(remote.packedMap(key, name)),
    state: (key) => ask(remote.state(key)),
    close: () => {
      remote[releaseProxy]();
      worker.terminate();
      fail(new Error('The maps were closed'));
    },
  };
}
