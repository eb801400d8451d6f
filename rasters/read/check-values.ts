import type { CellValues } from '#sim-core/grid/ground.ts';
import { RasterError } from './raster-error.ts';

/**
 * Checks what was read.
 * @param width of the raster, for the place in the complaint
 * @throws RasterError `raster-values` at an infinite value, `raster-empty` where no cell holds a value
 */
export function checkValues(values: CellValues, noData: number | null, width: number): void {
  let valid = 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    if (value === noData || Number.isNaN(value)) continue;
    if (!Number.isFinite(value)) throw infiniteValue(i % width, Math.floor(i / width));
    valid++;
  }
  if (valid === 0)
    throw new RasterError('raster-empty', {
      found: 'no cell with a value: all are no data',
      expected: 'at least one valid cell',
      remedy: 'Check that the right file, band and no-data value were exported (gdalinfo -stats).',
    });
}

/** The refusal of an infinite value in a column and row of the file, both counted from 0. */
export const infiniteValue = (column: number, row: number): RasterError =>
  new RasterError('raster-values', {
    found: `an infinite value in column ${column + 1} of row ${row + 1}`,
    expected: 'finite values, and NaN or the no-data value where there is none',
    remedy:
      'Mend the calculation that made it, or mark such cells as no data (gdal_calc, gdal_translate -a_nodata).',
  });
