import type { CellValues } from '#sim-core/grid/ground.ts';
import { arrayTypes } from '#rasters/read/raster.ts';
import type { RasterDataType } from '#rasters/read/tiff-layout.ts';

/** Values of a grid while they are being made; what is not put is missing. */
export interface OutputCells {
  readonly put: (index: number, value: number) => void;
  readonly miss: (index: number) => void;
  /** the values with the number that means no data, null where only NaN does */
  readonly result: { dataType: RasterDataType; values: CellValues; noData: number | null };
}

/** The next type that holds all numbers of a type and one more, to mean no data. */
const wider: Partial<Record<RasterDataType, { dataType: RasterDataType; noData: number | null }>> = {
  uint8: { dataType: 'int16', noData: -32_768 },
  int8: { dataType: 'int16', noData: -32_768 },
  uint16: { dataType: 'int32', noData: -2_147_483_648 },
  int16: { dataType: 'int32', noData: -2_147_483_648 },
  uint32: { dataType: 'float64', noData: null },
  int32: { dataType: 'float64', noData: null },
};

/**
 * Cells of a data type. Whole numbers without a value for no data become those of the next wider type, once, at the
 * first cell that is missing; floating-point ones hold NaN there, or the value that the file uses.
 */
export function outputCells(cells: number, type: RasterDataType, fileNoData: number | null): OutputCells {
  let dataType = type;
  let values: CellValues = new arrayTypes[type](cells);
  let noData = fileNoData;
  let missing = fileNoData ?? NaN;
  return {
    put(index, value) {
      values[index] = value;
    },
    miss(index) {
      const more = noData === null ? wider[dataType] : undefined;
      if (more) {
        ({ dataType, noData } = more);
        missing = noData ?? NaN;
        values = arrayTypes[dataType].from(values);
      }
      values[index] = missing;
    },
    get result() {
      return { dataType, values, noData };
    },
  };
}
