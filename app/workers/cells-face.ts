import { transfer } from 'comlink';
import type { CellLimits } from '#rasters/cells/cell-header.ts';
import { sourceBytes } from '#sim-core/grid/build-ground.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { LayerSource, LayerSources } from '#sim-core/spec/run-spec.ts';
import { createGroundDesk, type TellShare } from './ground-desk.ts';
import type { PackedLayers } from './run-loop.ts';
import { unpackBlob } from './unpack-blob.ts';
import { unpackLayers } from './unpack-layers.ts';

const desk = createGroundDesk();
const cellsOf = ({ width, height }: Grid) => width * height;

/** Work on whole rasters that would hold up the page; what comes back is handed over, never copied. */
export const cellsFace = {
  unpack: async (packed: Blob, limits: CellLimits) => {
    const cells = await unpackBlob(packed, limits);
    return transfer(cells, [cells.values.buffer as ArrayBuffer]);
  },
  sourceBytes: async (layers: PackedLayers, source: LayerSource, grid: Grid) => {
    const bytes = sourceBytes(source, grid, await unpackLayers(layers, cellsOf(grid)));
    return transfer(bytes, [bytes.buffer as ArrayBuffer]);
  },
  engineGround: async (layers: PackedLayers, sources: LayerSources, grid: Grid, tell?: TellShare) => {
    const ground = await desk.exact(layers, sources, grid, tell);
    const maps = Object.values(ground).filter((part) => part instanceof Uint8Array);
    return transfer(
      ground,
      maps.map((map) => map.buffer as ArrayBuffer),
    );
  },
  coarseGround: async (
    layers: PackedLayers,
    sources: LayerSources,
    grid: Grid,
    parts: readonly (keyof LayerSources)[],
  ) => {
    const maps = await desk.coarse(layers, sources, grid, parts);
    return transfer(
      maps,
      Object.values(maps).map((map) => map.buffer as ArrayBuffer),
    );
  },
};
export type CellsFace = typeof cellsFace;
