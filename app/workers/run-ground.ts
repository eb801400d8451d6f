import { buildGround } from '#sim-core/index.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import { isPacked, type RunInput } from './run-loop.ts';
import { unpackLayers } from './unpack-layers.ts';

/**
 * The ground that a run stands on, from the layers that its spec names.
 * @throws CellValuesError where a layer is damaged; RunProblem where its numbers do not become shares
 */
export async function groundOf({ spec, grid, ground }: RunInput): Promise<Ground> {
  if (!isPacked(ground)) return ground;
  return buildGround(spec.layers, grid, await unpackLayers(ground, grid.width * grid.height));
}
