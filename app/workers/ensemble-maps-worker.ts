import { expose, transfer } from 'comlink';
import { encodeCellValues } from '#rasters/cells/cell-values.ts';
import { createEnsembleMaps, type EnsembleMaps, type MapsInput } from '#rasters/ensemble/ensemble-maps.ts';

const ensembles = new Map<string, { readonly maps: EnsembleMaps; readonly input: MapsInput }>();
const find = (key: string) => {
  const found = ensembles.get(key);
  if (!found) throw new Error('These maps were not begun.');
  return found;
};
const blob = (bytes: Uint8Array) => new Blob([bytes as Uint8Array<ArrayBuffer>]);

/** Keeps the maps of several ensembles off the page's thread. */
const face = {
  /** @param state of an earlier sitting; what cannot be read is begun anew. @returns replicates that are in */
  begin: async (key: string, input: MapsInput, state: Blob | undefined): Promise<number[]> => {
    const from = state && new Uint8Array(await state.arrayBuffer());
    let maps: EnsembleMaps;
    try {
      maps = createEnsembleMaps(input, from);
    } catch {
      maps = createEnsembleMaps(input);
    }
    ensembles.set(key, { maps, input });
    return maps.replicates();
  },
  add: (key: string, replicate: number, closing: Int16Array, frames: ReadonlyMap<number, Uint8Array>) => {
    find(key).maps.add(replicate, closing, frames);
  },
  /** A map's values, handed over. */
  map: (key: string, name: string) => {
    const values = find(key).maps.map(name);
    return transfer(values, [values.buffer as ArrayBuffer]);
  },
  /** A map in the binary of `rasters/cells/cell-values.ts`, ready to be stored. */
  packedMap: (key: string, name: string): Blob => {
    const { maps, input } = find(key);
    const { width, height } = input;
    return blob(encodeCellValues({ width, height, values: maps.map(name) }, 'quick'));
  },
  state: (key: string): { state: Blob; replicates: number } => {
    const { maps } = find(key);
    return { state: blob(maps.state()), replicates: maps.replicates().length };
  },
};
export type EnsembleMapsFace = typeof face;

expose(face);
