import type { CellValues } from '#sim-core/grid/ground.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { RasterDataType } from './tiff-layout.ts';

/** A decoded raster of one band on a grid. */
export interface Raster {
  readonly grid: Grid;
  /** the name of the CRS in the EPSG register, else as the file gives it, else `EPSG:n` */
  readonly crsName: string;
  readonly dataType: RasterDataType;
  /** the value that means no data, as the data type holds it; NaN always means it too, and is never named here */
  readonly noData: number | null;
  /** width × height values, row-major from the north-west */
  readonly values: CellValues;
}

/** The arrays that hold the values of each data type. */
export const arrayTypes = {
  uint8: Uint8Array,
  int8: Int8Array,
  uint16: Uint16Array,
  int16: Int16Array,
  uint32: Uint32Array,
  int32: Int32Array,
  float32: Float32Array,
  float64: Float64Array,
} as const satisfies Record<RasterDataType, unknown>;
