import type { CellValues } from '#sim-core/grid/ground.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { decodeBlock } from './decode-block.ts';
import { readCrs } from './geo-keys.ts';
import { placementOf, readAffine } from './placement.ts';
import { RasterError } from './raster-error.ts';
import { readAhead, readBytes, toSource, type RasterSource } from './raster-source.ts';
import { fieldText, readTiffDirectory } from './tiff-directory.ts';
import {
  defaultRasterLimits,
  readTiffLayout,
  type RasterDataType,
  type RasterLimits,
  type TiffLayout,
} from './tiff-layout.ts';

/** A decoded raster of one band. */
export interface Raster {
  readonly grid: Grid;
  /** the name of the CRS as the file gives it, or `EPSG:n` */
  readonly crsName: string;
  readonly dataType: RasterDataType;
  /** the value that means no data, as the data type holds it; NaN always means it too, and is never named here */
  readonly noData: number | null;
  /** width × height values, row-major from the north-west, as they stand in the file */
  readonly values: CellValues;
}

const noDataTag = 42113; // GDAL_NODATA
const arrays = {
  uint8: Uint8Array,
  int8: Int8Array,
  uint16: Uint16Array,
  int16: Int16Array,
  uint32: Uint32Array,
  int32: Int32Array,
  float32: Float32Array,
  float64: Float64Array,
} as const;

/**
 * Reads a GeoTIFF of one band on square, north-up cells in a projected CRS in metres. The header is checked against the
 * limits and the file's length before anything is decoded; then memory is the decoded band and one strip or tile.
 * @throws RasterError whose code says what is wrong, with what was found, what was expected and how to mend it
 */
export async function readRaster(
  input: Uint8Array | RasterSource,
  limits: Partial<RasterLimits> = {},
): Promise<Raster> {
  const source = toSource(input);
  const directory = await readTiffDirectory(source);
  const layout = await readTiffLayout(directory, { ...defaultRasterLimits, ...limits });
  const { width, height, dataType } = layout;
  const affine = await readAffine(directory);
  const crs = await readCrs(directory);
  const placement = placementOf(affine, crs.pixelIsPoint);
  const noData = parseNoData(await fieldText(directory, noDataTag, 1024), dataType);
  const values = await readValues(readAhead(source), layout, noData);
  checkValues(values, noData, width);
  return {
    grid: { width, height, ...placement, epsg: crs.epsg },
    crsName: crs.name,
    dataType,
    noData,
    values,
  };
}

/** @throws RasterError `raster-values` at an infinite value, `raster-empty` where no cell holds a value */
function checkValues(values: CellValues, noData: number | null, width: number): void {
  let valid = 0;
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    if (value === noData || Number.isNaN(value)) continue;
    if (!Number.isFinite(value))
      throw new RasterError('raster-values', {
        found: `an infinite value in column ${(i % width) + 1} of row ${Math.floor(i / width) + 1}`,
        expected: 'finite values, and NaN or the no-data value where there is none',
        remedy:
          'Mend the calculation that made it, or mark such cells as no data (gdal_calc, gdal_translate -a_nodata).',
      });
    valid++;
  }
  if (valid === 0)
    throw new RasterError('raster-empty', {
      found: 'no cell with a value: all are no data',
      expected: 'at least one valid cell',
      remedy: 'Check that the right file, band and no-data value were exported (gdalinfo -stats).',
    });
}

async function readValues(
  source: RasterSource,
  layout: TiffLayout,
  noData: number | null,
): Promise<CellValues> {
  const { width, height, dataType, bytesPerCell, blockWidth, blockHeight, blocksAcross } = layout;
  const values = new arrays[dataType](width * height);
  const target = new Uint8Array(values.buffer);
  for (let block = 0, top = 0; top < height; top += blockHeight) {
    const rows = Math.min(blockHeight, height - top);
    for (let column = 0; column < blocksAcross; column++, block++) {
      const left = column * blockWidth;
      const columns = Math.min(blockWidth, width - left);
      if (layout.byteCounts[block] === 0) {
        // A block left out of a sparse file holds no data, or zero where the file has no such value.
        for (let row = top; row < top + rows; row++)
          values.fill(noData ?? 0, row * width + left, row * width + left + columns);
        continue;
      }
      const packed = await readBytes(
        source,
        layout.offsets[block],
        layout.byteCounts[block],
        'a strip or tile',
      );
      const bytes = await decodeBlock(packed, layout.tiled ? blockHeight : rows, layout);
      for (let row = 0; row < rows; row++) {
        const from = row * blockWidth * bytesPerCell;
        target.set(
          bytes.subarray(from, from + columns * bytesPerCell),
          ((top + row) * width + left) * bytesPerCell,
        );
      }
    }
  }
  return values;
}

/** The no-data value as the data type holds it, or null where there is none or no cell can have it. */
function parseNoData(text: string | undefined, dataType: RasterDataType): number | null {
  const said = text?.trim();
  if (!said) return null;
  const value = Number(said);
  if (Number.isNaN(value)) return null;
  const held = arrays[dataType].of(value)[0];
  return Number.isFinite(held) && (held === value || dataType === 'float32') ? held : null;
}
