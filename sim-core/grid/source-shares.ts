import { areaCells } from '#sim-core/process/area-cells.ts';
import { areaShares, moundShares, type CellShares } from '#sim-core/process/area-shares.ts';
import { moundStrengths } from '#sim-core/process/mound-strengths.ts';
import type { LayerSource, RasterSource } from '#sim-core/spec/layer-source.ts';
import type { Grid } from './grid.ts';
import { ShareError, toShares, type CellValues } from './ground.ts';

/** Cells of a raster on the working grid, row-major. */
export interface RasterValues {
  readonly values: CellValues;
  readonly noData?: number | null;
}

/** Writes the shares of `out.length` cells from cell `first` on. @throws ShareError naming what is no share */
export type ShareReader = (first: number, out: Float32Array) => void;

/**
 * Makes a source ready to be read stretch by stretch, so that products and highests need no array of the whole site but
 * one byte a cell for a list of mounds or areas.
 *
 * @param rasterOf cells of the raster that a source names
 * @throws ShareError where a mound or an area reaches no cell
 */
export function shareReader(
  source: LayerSource,
  grid: Grid,
  rasterOf: (source: RasterSource) => RasterValues,
): ShareReader {
  if (typeof source === 'number') return (_, out) => out.fill(source);
  if ('product' in source) return combined(source.product, (a, b) => a * b);
  if ('highest' in source) return combined(source.highest, (a, b) => (b > a ? b : a));
  if ('mounds' in source) {
    const shared = source.edges === 'shared';
    return ofBytes(
      placesBytes(grid, 'Mound', source.mounds, (mound) =>
        shared ? inBytes(moundShares(mound, grid), mound.strength) : moundStrengths(mound, grid),
      ),
    );
  }
  if ('areas' in source) {
    const shared = source.edges === 'shared';
    return ofBytes(
      placesBytes(grid, 'Area', source.areas, ({ area, strength }) => {
        if (shared) return inBytes(areaShares(area, grid), strength);
        const { cells, share } = areaCells(area, grid);
        return {
          cells,
          strengths: new Uint8Array(cells.length).fill(Math.round(255 * strength * share)),
        };
      }),
    );
  }
  const { values, noData } = rasterOf(source);
  return (first, out) =>
    void toShares(values.subarray(first, first + out.length), { ...source, noData }, out, first);

  function combined(sources: LayerSource[], both: (a: number, b: number) => number): ShareReader {
    const [head, ...others] = sources.map((part) => shareReader(part, grid, rasterOf));
    let other = new Float32Array();
    return (first, out) => {
      head(first, out);
      if (other.length !== out.length) other = new Float32Array(out.length);
      for (const read of others) {
        read(first, other);
        for (let i = 0; i < out.length; i++) out[i] = both(out[i], other[i]);
      }
    };
  }
}

const inBytes = ({ cells, shares }: CellShares, strength: number) => ({
  cells,
  strengths: Uint8Array.from(shares, (share) => Math.round(255 * strength * share)),
});

const ofBytes =
  (bytes: Uint8Array): ShareReader =>
  (first, out) => {
    for (let i = 0; i < out.length; i++) out[i] = bytes[first + i] / 255;
  };

/** Strength k/255 of every cell, the strongest where places overlap. */
function placesBytes<T>(
  { width, height }: Grid,
  name: string,
  places: readonly T[],
  reach: (place: T) => { cells: Uint32Array; strengths: Uint8Array },
): Uint8Array {
  const bytes = new Uint8Array(width * height);
  places.forEach((place, n) => {
    const { cells, strengths } = reach(place);
    if (cells.length === 0)
      throw new ShareError(
        `${name} ${n + 1} reaches no cell of the grid: move it onto the site, or take it off.`,
      );
    for (let i = 0; i < cells.length; i++) if (strengths[i] > bytes[cells[i]]) bytes[cells[i]] = strengths[i];
  });
  return bytes;
}
