import { transfer } from 'comlink';
import type { CellLimits } from '#rasters/cells/cell-header.ts';
import { unpackCellValues } from '#rasters/cells/unpack-cell-values.ts';
import { toShareBytes, type ShareMapping } from '#sim-core/grid/ground.ts';
import { sumShares } from './sum-shares.ts';

/** Work on whole rasters that would hold up the page; what goes in and comes back is handed over, never copied. */
export const cellsFace = {
  unpack: async (packed: Uint8Array<ArrayBuffer>, limits: CellLimits) => {
    const cells = await unpackCellValues(packed, limits);
    return transfer(cells, [cells.values.buffer as ArrayBuffer]);
  },
  shareBytes: async (packed: Uint8Array<ArrayBuffer>, limits: CellLimits, mapping: ShareMapping) => {
    const bytes = toShareBytes((await unpackCellValues(packed, limits)).values, mapping);
    return transfer(bytes, [bytes.buffer as ArrayBuffer]);
  },
  sumShares: async (
    packed: Uint8Array<ArrayBuffer>,
    limits: CellLimits,
    mapping: ShareMapping,
    capacity: Uint8Array | undefined,
  ) => sumShares((await unpackCellValues(packed, limits)).values, mapping, capacity),
};
export type CellsFace = typeof cellsFace;
