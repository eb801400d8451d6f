import { damaged, RasterError } from './raster-error.ts';
import { fieldNumbers, type TiffDirectory } from './tiff-directory.ts';

const tags = { pixelScale: 33550, tiePoints: 33922, transformation: 34264 } as const;

/** Where the cells lie, thought of as running from north to south. */
export interface Placement {
  /** outer corner of the north-western cell */
  readonly originX: number;
  readonly originY: number;
  /** sides of a cell, both positive */
  readonly cellWidth: number;
  readonly cellHeight: number;
  /** the first row of the file lies in the south */
  readonly southUp: boolean;
}

/** x = a·column + b·row + c, y = d·column + e·row + f. */
export type Affine = [a: number, b: number, c: number, d: number, e: number, f: number];

/** Axes count as straight when a row of ten thousand cells is off by less than a hundredth of a cell. */
const tolerance = 1e-6;

/**
 * Where the cells lie (GeoTIFF 1.1, OGC 19-008r4, section 7.2 and annex C): the corner is the outer one, so for
 * PixelIsPoint, whose coordinates belong to cell centres, it lies half a cell before the first centre.
 * @param height rows of the raster
 * @throws RasterError `raster-rotated`, `raster-not-georeferenced`, `raster-truncated`
 */
export function placementOf(
  [a, b, c, d, e, f]: Affine,
  { height, pixelIsPoint }: { height: number; pixelIsPoint: boolean },
): Placement {
  if (![a, b, c, d, e, f].every(Number.isFinite)) throw damaged('a georeference that is no number');
  if (Math.abs(b) > tolerance * Math.abs(a) || Math.abs(d) > tolerance * Math.abs(e))
    throw new RasterError('raster-rotated', {
      found: 'a grid that is rotated or sheared',
      expected: 'rows from west to east and columns from north to south',
      remedy: 'Straighten it with gdalwarp -tr 1 1 IN.tif OUT.tif.',
    });
  if (a === 0 || e === 0)
    throw new RasterError('raster-not-georeferenced', {
      found: 'cells without a size',
      expected: 'a cell size',
      remedy:
        'Say where it lies, for example gdal_translate -a_srs EPSG:32631 -a_ullr WEST NORTH EAST SOUTH IN.tif OUT.tif.',
    });
  if (a < 0)
    throw new RasterError('raster-rotated', {
      found: 'a grid that is turned over, its first column in the east',
      expected: 'the first column in the west',
      remedy: 'Turn it with gdalwarp IN.tif OUT.tif, which writes north up.',
    });
  const [x, y] = pixelIsPoint ? [c - a / 2, f - e / 2] : [c, f];
  return {
    originX: x,
    originY: e > 0 ? y + e * height : y,
    cellWidth: a,
    cellHeight: Math.abs(e),
    southUp: e > 0,
  };
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
      expected: 'a corner and a cell size',
      remedy: loose
        ? 'Rectify it first, for example gdalwarp -tps -t_srs EPSG:32631 IN.tif OUT.tif.'
        : 'Say where it lies, for example gdal_translate -a_srs EPSG:32631 -a_ullr WEST NORTH EAST SOUTH IN.tif OUT.tif.',
    });
  }
  if (scale[1] < 0)
    throw new RasterError('raster-rotated', {
      found: `cells ${scale[1]} high, which programs read in two ways: as south up or as a slip of the pen`,
      expected: 'a positive height, or a transformation matrix for a raster with south up',
      remedy: 'Write it again with gdalwarp IN.tif OUT.tif, and check that north is up.',
    });
  const [column, row, , x, y] = ties;
  return [scale[0], 0, x - column * scale[0], 0, -scale[1], y + row * scale[1]];
}
