import { alignRaster } from '#rasters/align/align-raster.ts';
import { planAlignment } from '#rasters/align/plan-alignment.ts';
import { ownGrid } from '#rasters/align/suggest-grid.ts';
import { inspectRaster } from '#rasters/describe/inspect-raster.ts';
import type { RasterDescription } from '#rasters/describe/raster-description.ts';
import { RasterError } from './raster-error.ts';
import type { RasterSource } from './raster-source.ts';
import type { Raster } from './raster.ts';
import { defaultRasterLimits, type RasterLimits } from './tiff-layout.ts';

/**
 * Reads a GeoTIFF that can be a site's grid as it is: one band on square cells in a projected CRS in metres. Values are
 * those of the file, unless it names a scale or offset; rows run from the north, whichever way they run in the file. The
 * header is checked against the limits and the file's length before anything is decoded; then memory is the decoded band
 * and one strip or tile.
 * @throws RasterError whose code says what is wrong, with what was found, what was expected and how to mend it
 */
export async function readRaster(
  input: Uint8Array | RasterSource,
  limits: Partial<RasterLimits> = {},
): Promise<Raster> {
  const description = await inspectRaster(input, { ...defaultRasterLimits, ...limits });
  checkWorkingGrid(description);
  const plan = planAlignment(description, { band: 1, content: 'amounts', grid: ownGrid(description) });
  return alignRaster(input, plan, { limits });
}

const byUtm =
  'Reproject it to the UTM zone of the site, for example gdalwarp -t_srs EPSG:32631 IN.tif OUT.tif.';

/** @throws RasterError `raster-not-projected`, `raster-not-metric`, `raster-not-square`, `raster-bands` */
function checkWorkingGrid({
  crs,
  bands,
  cellWidth,
  cellHeight,
  cellMetres,
  metresTrue,
}: RasterDescription): void {
  const expected = 'a projected CRS in metres';
  if (crs.kind !== 'projected')
    throw new RasterError('raster-not-projected', {
      found: `degrees (a geographic CRS, ${crs.name})`,
      expected,
      remedy: byUtm,
    });
  if (crs.unit !== 'metre')
    throw new RasterError('raster-not-metric', {
      found: `coordinates in ${{ foot: 'feet', 'us-foot': 'US survey feet', degree: '', other: `units of ${crs.metresPerUnit} m` }[crs.unit]}`,
      expected,
      remedy: byUtm,
    });
  if (!metresTrue)
    throw new RasterError('raster-not-metric', {
      found: `EPSG:${crs.epsg}, whose metres are ${(cellMetres.width / cellWidth).toFixed(2)} m long on the ground here`,
      expected: `${expected} whose lengths are those on the ground`,
      remedy: byUtm,
    });
  if (Math.abs(cellWidth - cellHeight) > 1e-6 * cellWidth)
    throw new RasterError('raster-not-square', {
      found: `cells of ${cellWidth} × ${cellHeight} m`,
      expected: 'square cells',
      remedy: `Resample it with gdalwarp -tr ${cellWidth} ${cellWidth} IN.tif OUT.tif.`,
    });
  if (bands.length > 1)
    throw new RasterError('raster-bands', {
      found: `${bands.length} bands`,
      expected: 'one band',
      remedy: 'Pick the band that holds the layer, for example gdal_translate -b 1 IN.tif OUT.tif.',
    });
}
