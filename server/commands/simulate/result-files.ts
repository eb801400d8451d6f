import { coverPrecision, coverValues, noCover } from '#server/files/cover-map.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import { cannotClose, engineVersion, type RunResult } from '#sim-core/index.ts';
import type { GroundOnFile } from './read-ground.ts';

/** A GeoTIFF of cover, Float32, with the no data of the product's own where the closing years say that nothing grows. */
export const coverMap = (
  { grid, crsName }: GroundOnFile,
  bandName: string,
  cover: Float32Array,
  closing: Int16Array,
): Uint8Array =>
  encodeGeoTiff({
    grid,
    crsName,
    values: coverValues(cover.length, (cell) => cover[cell], closing),
    bandName,
    unit: 'share',
    noData: noCover,
    description: coverPrecision.exact,
  });

/** A GeoTIFF of closing years, Int16. */
export const closingMap = (
  { grid, crsName }: GroundOnFile,
  bandName: string,
  values: Int16Array,
): Uint8Array => encodeGeoTiff({ grid, crsName, values, bandName, unit: 'year', noData: cannotClose });

/**
 * The summary as JSON text.
 *
 * @param outcome what the runs came to
 * @param result of any of the runs, for what is the same for all
 * @param spec as it was read
 */
export const summaryText = (
  outcome: object,
  { referenceArea, kernel, warnings }: RunResult,
  { grid, crsName, files }: GroundOnFile,
  spec: object,
): string =>
  `${JSON.stringify(
    {
      engineVersion,
      ...outcome,
      referenceArea,
      kernel,
      warnings,
      grid: { ...grid, crsName },
      layers: files,
      spec,
    },
    null,
    2,
  )}\n`;
