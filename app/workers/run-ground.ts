import { buildGround } from '#sim-core/index.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import type { LayerRasters, RunInput } from './run-loop.ts';

/**
 * The ground that a run stands on, from the layers that its spec names.
 * @throws RunProblem where the numbers of a layer do not become shares
 */
export function groundOf({ spec, grid, ground }: RunInput): Ground {
  if (!isRasters(ground)) return ground;
  return buildGround(spec.layers, grid.width * grid.height, (source) => {
    const raster = ground.get('layer' in source ? source.layer : '');
    if (!raster) throw new Error('The run names a layer that was not handed over.');
    return raster;
  });
}

const isRasters = (ground: RunInput['ground']): ground is LayerRasters => ground instanceof Map;
