import { buildGround } from '#sim-core/index.ts';
import type { RasterValues } from '#sim-core/grid/build-ground.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import { unpackBlob } from './unpack-blob.ts';
import { isPacked, type RunInput } from './run-loop.ts';

/**
 * The ground that a run stands on, from the layers that its spec names.
 * @throws CellValuesError where a layer is damaged; RunProblem where its numbers do not become shares
 */
export async function groundOf({ spec, grid, ground }: RunInput): Promise<Ground> {
  if (!isPacked(ground)) return ground;
  const cells = grid.width * grid.height;
  const rasters = new Map<string, RasterValues>();
  for (const [hash, { packed, noData }] of ground)
    rasters.set(hash, { values: (await unpackBlob(packed, { cells })).values, noData });
  return buildGround(spec.layers, cells, (source) => {
    const raster = rasters.get('layer' in source ? source.layer : '');
    if (!raster) throw new Error('The run names a layer that was not handed over.');
    return raster;
  });
}
