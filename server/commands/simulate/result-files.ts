import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import { cannotClose, engineVersion, type RunResult } from '#sim-core/index.ts';
import type { GroundOnFile } from './read-ground.ts';

/** A GeoTIFF of cover, Float32. */
export const coverMap = (
  { grid, crsName }: GroundOnFile,
  bandName: string,
  values: Float32Array,
): Uint8Array => encodeGeoTiff({ grid, crsName, values, bandName, unit: 'share' });

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
