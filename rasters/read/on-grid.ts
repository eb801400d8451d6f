import { gridDifferences, type Grid } from '#sim-core/grid/grid.ts';
import { RasterError } from './raster-error.ts';
import type { Raster } from './raster.ts';

/**
 * Checks that a raster has the very cells of the working grid.
 * @throws RasterError `grid-mismatch` naming everything that differs
 */
export function validateOnGrid({ grid: found }: Pick<Raster, 'grid'>, grid: Grid): void {
  const differences = gridDifferences(found, grid);
  if (differences.length === 0) return;
  const { originX: west, originY: north, cellSize, width, height, epsg } = grid;
  const [east, south] = [west + width * cellSize, north - height * cellSize];
  throw new RasterError('grid-mismatch', {
    found: differences.join('; '),
    expected: 'the cells of the site’s grid',
    remedy: `Bring it onto the grid with gdalwarp -t_srs EPSG:${epsg} -te ${west} ${south} ${east} ${north} -tr ${cellSize} ${cellSize} -r near IN.tif OUT.tif.`,
  });
}
