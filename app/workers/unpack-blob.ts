import type { CellArray, CellLimits } from '#rasters/cells/cell-header.ts';
import { unpackCellValues } from '#rasters/cells/unpack-cell-values.ts';

/** Cell values of a blob. @throws CellValuesError saying what was found and what was expected */
export const unpackBlob = async (packed: Blob, limits: CellLimits): Promise<CellArray> =>
  unpackCellValues(new Uint8Array(await packed.arrayBuffer()), limits);
