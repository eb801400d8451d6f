import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { FieldProblem } from '#sim-core/spec/problems.ts';
import type { LayerSource, LayerSources } from '#sim-core/spec/run-spec.ts';
import { constantBytes, groundLayers, ShareError, toShareBytes, toShares } from './ground.ts';
import type { CellValues, Ground, GroundLayer, ShareMapping } from './ground.ts';

/** Cells of a raster on the working grid, row-major. */
export interface RasterValues {
  readonly values: CellValues;
  readonly noData?: number | null;
}

/** A layer source that is a raster. */
export type RasterSource = Exclude<LayerSource, number>;

/**
 * The ground of a run from its layer sources.
 *
 * @param cells width × height
 * @param rasterOf cells of the raster that a source names
 * @throws RunProblem at each layer whose numbers do not become shares
 */
export function buildGround(
  layers: LayerSources,
  cells: number,
  rasterOf: (source: RasterSource, layer: GroundLayer) => RasterValues,
): Ground {
  const problems: FieldProblem[] = [];
  const held = <T extends Float32Array | Uint8Array>(
    layer: GroundLayer,
    constant: (share: number) => T,
    ofRaster: (values: CellValues, mapping: ShareMapping) => T,
  ): T => {
    const source = layers[layer];
    if (typeof source === 'number') return constant(source);
    try {
      const { values, noData } = rasterOf(source, layer);
      return ofRaster(values, { ...source, noData });
    } catch (error) {
      if (!(error instanceof ShareError)) throw error;
      problems.push({ field: `layers.${layer}`, message: error.message });
      return constant(0);
    }
  };
  const [capacity, vigour, exposure, refuge, fence] = groundLayers
    .filter((layer) => layer !== 'cover')
    .map((layer) => held(layer, (share) => constantBytes(cells, share), toShareBytes));
  const cover = held('cover', (share) => new Float32Array(cells).fill(share), toShares);
  if (problems.length > 0) throw new RunProblem(problems);
  return { capacity, vigour, exposure, refuge, fence, cover };
}
