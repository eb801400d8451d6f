import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { LayerSource, LayerSources, RasterSource } from '#sim-core/spec/layer-source.ts';
import type { Grid } from './grid.ts';
import { constantBytes, groundLayers, ShareError, toShareBytes, toShares } from './ground.ts';
import type { Ground, GroundLayer } from './ground.ts';
import { shareReader, type RasterValues } from './source-shares.ts';

export type { RasterValues };

/** Cells that are read in one go where sources are put together. */
const stretch = 262_144;

/**
 * Shares of every cell from one source, held in 8 bits: round(255 × the Float32 share), rounded once, at the end.
 *
 * @throws ShareError where a number does not become a share, or a mound or an area reaches no cell
 */
export function sourceBytes(
  source: LayerSource,
  grid: Grid,
  rasterOf: (source: RasterSource) => RasterValues,
): Uint8Array {
  const cells = grid.width * grid.height;
  if (typeof source === 'number') return constantBytes(cells, source);
  if ('file' in source || 'layer' in source) {
    const { values, noData } = rasterOf(source);
    return toShareBytes(values, { ...source, noData });
  }
  const bytes = new Uint8Array(cells);
  const read = shareReader(source, grid, rasterOf);
  const shares = new Float32Array(Math.min(stretch, cells));
  for (let first = 0; first < cells; first += stretch) {
    const some = shares.subarray(0, Math.min(stretch, cells - first));
    read(first, some);
    for (let i = 0; i < some.length; i++) bytes[first + i] = Math.round(some[i] * 255);
  }
  return bytes;
}

/** The same as Float32 shares. @throws ShareError as `sourceBytes` */
export function sourceShares(
  source: LayerSource,
  grid: Grid,
  rasterOf: (source: RasterSource) => RasterValues,
): Float32Array {
  const cells = grid.width * grid.height;
  if (typeof source === 'object' && ('file' in source || 'layer' in source)) {
    const { values, noData } = rasterOf(source);
    return toShares(values, { ...source, noData });
  }
  const shares = new Float32Array(cells);
  const read = shareReader(source, grid, rasterOf);
  for (let first = 0; first < cells; first += stretch) read(first, shares.subarray(first, first + stretch));
  return shares;
}

/**
 * The ground of a run from its layer sources.
 *
 * @param rasterOf cells of the raster that a source names
 * @throws RunProblem at each layer whose numbers do not become shares
 */
export function buildGround(
  layers: LayerSources,
  grid: Grid,
  rasterOf: (source: RasterSource, layer: GroundLayer) => RasterValues,
): Ground {
  const problems: FieldProblem[] = [];
  type Make<T> = (source: LayerSource, grid: Grid, rasterOf: (source: RasterSource) => RasterValues) => T;
  const held = <T>(layer: GroundLayer, make: Make<T>, none: T): T => {
    try {
      return make(layers[layer], grid, (source) => rasterOf(source, layer));
    } catch (error) {
      if (!(error instanceof ShareError)) throw error;
      problems.push({ field: `layers.${layer}`, message: error.message });
      return none;
    }
  };
  const [capacity, vigour, exposure, refuge, fence] = groundLayers
    .filter((layer) => layer !== 'cover')
    .map((layer) => held(layer, sourceBytes, new Uint8Array()));
  const cover = held('cover', sourceShares, new Float32Array());
  if (problems.length > 0) throw new RunProblem(problems);
  return { capacity, vigour, exposure, refuge, fence, cover };
}
