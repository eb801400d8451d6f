import { transfer } from 'comlink';
import type { CellLimits } from '#rasters/cells/cell-header.ts';
import { toShareBytes, type ShareMapping } from '#sim-core/grid/ground.ts';
import { sumShares } from './sum-shares.ts';
import { unpackBlob } from './unpack-blob.ts';

/** Work on whole rasters that would hold up the page; what comes back is handed over, never copied. */
export const cellsFace = {
  unpack: async (packed: Blob, limits: CellLimits) => {
    const cells = await unpackBlob(packed, limits);
    return transfer(cells, [cells.values.buffer as ArrayBuffer]);
  },
  shareBytes: async (packed: Blob, limits: CellLimits, mapping: ShareMapping) => {
    const bytes = toShareBytes((await unpackBlob(packed, limits)).values, mapping);
    return transfer(bytes, [bytes.buffer as ArrayBuffer]);
  },
  sumShares: async (
    packed: Blob,
    limits: CellLimits,
    mapping: ShareMapping,
    capacity: Uint8Array | undefined,
  ) => sumShares((await unpackBlob(packed, limits)).values, mapping, capacity),
};
export type CellsFace = typeof cellsFace;
