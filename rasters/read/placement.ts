import { damaged, RasterError } from './raster-error.ts';
import { fieldNumbers, type TiffDirectory } from './tiff-directory.ts';

const tags = { pixelScale: 33550, tiePoints: 33922, transformation: 34264 } as const;

export interface Placement {
  readonly cellSize: number;
  /** outer corner of the north-western cell */
  readonly originX: number;
  readonly originY: number;
}

/** x = a·column + b·row + c, y = d·column + e·row + f. */
export type Affine = [a: number, b: number, c: number, d: number, e: number, f: number];

/** Cells count as square, and axes as straight, when a row of ten thousand cells is off by less than a hundredth of a cell. */
const tolerance = 1e-6;

/**
 * Where the cells lie (GeoTIFF 1.1, OGC 19-008r4, section 7.2 and annex C): the corner is the outer one, so for
 * PixelIsPoint, whose coordinates belong to cell centres, it lies half a cell to the north-west.
 * @throws RasterError `raster-not-square`, `raster-rotated`, `raster-truncated`
 */
export function placementOf([a, b, c, d, e, f]: Affine, pixelIsPoint: boolean): Placement {
  if (![a, b, c, d, e, f].every(Number.isFinite)) throw damaged('a georeference that is no number');
  if (Math.abs(b) > tolerance * Math.abs(a) || Math.abs(d) > tolerance * Math.abs(e))
    throw new RasterError('raster-rotated', {
      found: 'a grid that is rotated or sheared',
      expected: 'rows from west to east and columns from north to south',
      remedy: 'Straighten it with gdalwarp -tr 1 1 IN.tif OUT.tif.',
    });
  if (a <= 0 || e >= 0)
    throw new RasterError(a === 0 || e === 0 ? 'raster-not-georeferenced' : 'raster-rotated', {
      found:
        a === 0 || e === 0 ? 'cells without a size' : 'a grid that is turned over (south up or east first)',
      expected: 'the first row in the north and the first column in the west',
      remedy: 'Turn it with gdalwarp IN.tif OUT.tif, which writes north up.',
    });
  if (Math.abs(a + e) > tolerance * a)
    throw new RasterError('raster-not-square', {
      found: `cells of ${a} × ${-e} m`,
      expected: 'square cells',
      remedy: `Resample it with gdalwarp -tr ${a} ${a} IN.tif OUT.tif.`,
    });
  const shift = pixelIsPoint ? a / 2 : 0;
  return { cellSize: a, originX: c - shift, originY: f + shift };
}

/**
 * How columns and rows of the file become coordinates.
 * @throws RasterError `raster-not-georeferenced`, `raster-truncated`
 */
export async function readAffine(directory: TiffDirectory): Promise<Affine> {
  const matrix = await fieldNumbers(directory, tags.transformation, 16);
  if (matrix) {
    if (matrix.length !== 16) throw damaged(`a transformation of ${matrix.length} numbers where 16 belong`);
    return [matrix[0], matrix[1], matrix[3], matrix[4], matrix[5], matrix[7]];
  }
  const scale = await fieldNumbers(directory, tags.pixelScale, 3);
  const ties = await fieldNumbers(directory, tags.tiePoints, 60_000);
  if (!scale || !ties || scale.length < 2 || ties.length < 6) {
    const loose = ties && ties.length > 6;
    throw new RasterError('raster-not-georeferenced', {
      found: loose ? `${Math.floor(ties.length / 6)} ground control points and no grid` : 'no georeference',
      expected: 'a corner and a cell size in a projected CRS in metres',
      remedy: loose
        ? 'Rectify it first, for example gdalwarp -tps -t_srs EPSG:32631 IN.tif OUT.tif.'
        : 'Say where it lies, for example gdal_translate -a_srs EPSG:32631 -a_ullr WEST NORTH EAST SOUTH IN.tif OUT.tif.',
    });
  }
  const [column, row, , x, y] = ties;
  return [scale[0], 0, x - column * scale[0], 0, -scale[1], y + row * scale[1]];
}
