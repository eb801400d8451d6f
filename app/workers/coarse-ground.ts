import { sourceBytes, type RasterValues } from '#sim-core/grid/build-ground.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { LayerSource, LayerSources, RasterSource } from '#sim-core/spec/run-spec.ts';

/** Cells that a coarse picture is worked out for, at the most: more than a screen shows of a whole site. */
const coarseCells = 640_000;

/** Every how manieth cell stands for its neighbours in a coarse picture; 1 where the site is small enough as it is. */
export const coarseStride = ({ width, height }: Grid): number =>
  Math.ceil(Math.sqrt((width * height) / coarseCells));

export const coarseGrid = (grid: Grid, stride: number): Grid => ({
  ...grid,
  width: Math.ceil(grid.width / stride),
  height: Math.ceil(grid.height / stride),
  cellSize: grid.cellSize * stride,
});

/** One value of each square of `stride` cells, of the same type: that of its middle, or of the last one at an edge. */
export function thin<T extends RasterValues['values']>(values: T, grid: Grid, stride: number): T {
  const { width, height } = coarseGrid(grid, stride);
  const middle = stride >> 1;
  const out = new (values.constructor as new (length: number) => T)(width * height);
  for (let row = 0, i = 0; row < height; row++) {
    const from = Math.min(grid.height - 1, row * stride + middle) * grid.width;
    for (let column = 0; column < width; column++, i++)
      out[i] = values[from + Math.min(grid.width - 1, column * stride + middle)];
  }
  return out;
}

/** The opposite: each value over its square of the whole grid. */
export function spread(coarse: Uint8Array, grid: Grid, stride: number): Uint8Array {
  const { width } = coarseGrid(grid, stride);
  const out = new Uint8Array(grid.width * grid.height);
  for (let row = 0; row < grid.height; row++) {
    const start = row * grid.width;
    if (row % stride > 0) {
      out.copyWithin(start, start - grid.width, start);
      continue;
    }
    const from = (row / stride) * width;
    for (let column = 0; column < width; column++)
      out.fill(
        coarse[from + column],
        start + column * stride,
        start + Math.min(grid.width, (column + 1) * stride),
      );
  }
  return out;
}

/**
 * What the ground of a run looks like from afar: the maps asked for, each cell as the one in the middle of its square of
 * `coarseStride` cells. Places (mounds, areas) are drawn on the whole grid first, as most are smaller than a square.
 *
 * @param thinned a raster's values as `thin` gives them
 * @throws ShareError where a number does not become a share
 */
export function coarseGround<Part extends keyof LayerSources>(
  sources: LayerSources,
  grid: Grid,
  thinned: (source: RasterSource) => RasterValues,
  parts: readonly Part[],
): Record<Part, Uint8Array> {
  const stride = coarseStride(grid);
  const small = coarseGrid(grid, stride);
  const places = new Map<string, RasterValues>();
  const drawn = (source: LayerSource): LayerSource => {
    if (typeof source === 'number') return source;
    if ('product' in source) return { product: source.product.map(drawn) };
    if ('highest' in source) return { highest: source.highest.map(drawn) };
    if (!('mounds' in source) && !('areas' in source)) return source;
    const name = `places ${places.size}`;
    places.set(name, { values: thin(sourceBytes(source, grid, thinned), grid, stride) });
    return { layer: name, scale: 1 / 255 };
  };
  const rasterOf = (source: RasterSource) =>
    places.get('layer' in source ? source.layer : '') ?? thinned(source);
  const made = parts.map((part) => {
    const bytes = sourceBytes(drawn(sources[part]), small, rasterOf);
    return [part, spread(bytes, grid, stride)] as const;
  });
  return Object.fromEntries(made) as Record<Part, Uint8Array>;
}
