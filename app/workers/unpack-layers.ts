import type { RasterSource } from '#sim-core/spec/run-spec.ts';
import type { RasterValues } from '#sim-core/grid/build-ground.ts';
import type { PackedLayers } from './run-loop.ts';
import { unpackBlob } from './unpack-blob.ts';

/**
 * The rasters that sources name, decoded.
 * @param cells how many each must have
 * @throws CellValuesError where a layer is damaged; what is returned throws where a layer was not handed over
 */
export async function unpackLayers(
  layers: PackedLayers,
  cells: number,
): Promise<(source: RasterSource) => RasterValues> {
  const rasters = new Map<string, RasterValues>();
  for (const [hash, { packed, noData }] of layers)
    rasters.set(hash, { values: (await unpackBlob(packed, { cells })).values, noData });
  return (source) => {
    const raster = rasters.get('layer' in source ? source.layer : '');
    if (!raster) throw new Error('A layer is named that was not handed over.');
    return raster;
  };
}
