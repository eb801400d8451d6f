import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { CellValues } from '#sim-core/grid/ground.ts';

/** A small grid in UTM 17 N, its corner on round numbers. */
export const gridOf = (width: number, height: number, more: Partial<Grid> = {}): Grid => ({
  width,
  height,
  cellSize: 1,
  originX: 473_000,
  originY: 3_474_000,
  epsg: 32617,
  ...more,
});

/** A GeoTIFF of values on a grid; NaN means no data in floats. */
export const fileOf = (grid: Grid, values: CellValues, noData?: number): Uint8Array =>
  encodeGeoTiff({ grid, values, noData }, { blocks: grid.width > 300 ? 'tiles' : 'strips' });
