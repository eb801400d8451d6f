import type { RasterValues } from '#sim-core/grid/build-ground.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { LayerSources, RasterSource } from '#sim-core/spec/run-spec.ts';
import { coarseGround, coarseStride, thin } from './coarse-ground.ts';
import { engineGround, type EngineGround } from './engine-ground.ts';
import type { PackedLayers } from './run-loop.ts';
import { unpackBlob } from './unpack-blob.ts';

/** Told how far the work is, 0..1; answers whether it is still wanted. */
export type TellShare = (share: number) => boolean | Promise<boolean>;

/** The work was left, because nobody waits for it any more. */
export class GroundLeft extends Error {
  override name = 'GroundLeft';
}

/** How long decoded layers are kept after their last use, ms: while somebody drags a curve, not longer. */
const keptFor = 20_000;
/** How long work goes on before it looks up, ms. */
const lookUpAfter = 60;

/**
 * Ground from packed layers, again and again while a draft of it changes. Layers are decoded once and kept for a while;
 * of each a thinned copy stays, so that a coarse picture of the next draft is there at once. Exact work looks up from
 * time to time, so that a coarse picture is never kept waiting, and it can be left.
 */
export function createGroundDesk() {
  const whole = new Map<string, Promise<RasterValues>>();
  const thinned = new Map<string, RasterValues>();
  let letGo: ReturnType<typeof setTimeout> | undefined;

  /** Keeps what these layers need and no others. */
  function keepOnly(layers: PackedLayers) {
    for (const kept of [whole, thinned])
      for (const hash of kept.keys()) if (!layers.has(hash)) kept.delete(hash);
    clearTimeout(letGo);
    letGo = setTimeout(() => whole.clear(), keptFor);
  }

  function decoded(layers: PackedLayers, hash: string, { width, height }: Grid): Promise<RasterValues> {
    const { packed, noData } = layers.get(hash)!;
    const raster =
      whole.get(hash) ??
      unpackBlob(packed, { cells: width * height }).then(({ values }) => ({ values, noData }));
    whole.set(hash, raster);
    raster.catch(() => whole.delete(hash));
    return raster;
  }

  const reader = (rasters: ReadonlyMap<string, RasterValues>) => (source: RasterSource) => {
    const raster = rasters.get('layer' in source ? source.layer : '');
    if (!raster) throw new Error('A layer is named that was not handed over.');
    return raster;
  };

  return {
    /** @throws GroundLeft where it is not wanted any more; CellValuesError; RunProblem */
    async exact(
      layers: PackedLayers,
      sources: LayerSources,
      grid: Grid,
      tell: TellShare = () => true,
    ): Promise<EngineGround> {
      keepOnly(layers);
      const rasters = new Map<string, RasterValues>();
      for (const hash of layers.keys()) {
        rasters.set(hash, await decoded(layers, hash, grid));
        if (!(await tell(0))) throw new GroundLeft();
      }
      let before = performance.now();
      const ground = await engineGround(sources, grid, reader(rasters), async (done, cells) => {
        if (performance.now() - before < lookUpAfter) return;
        if (!(await tell(done / cells))) throw new GroundLeft();
        before = performance.now();
      });
      keepOnly(layers);
      return ground;
    },
    /** @throws CellValuesError; ShareError */
    async coarse<Part extends keyof LayerSources>(
      layers: PackedLayers,
      sources: LayerSources,
      grid: Grid,
      parts: readonly Part[],
    ): Promise<Record<Part, Uint8Array>> {
      keepOnly(layers);
      for (const hash of layers.keys()) {
        if (thinned.has(hash)) continue;
        const { values, noData } = await decoded(layers, hash, grid);
        thinned.set(hash, { values: thin(values, grid, coarseStride(grid)), noData });
      }
      return coarseGround(sources, grid, reader(thinned), parts);
    },
  };
}
