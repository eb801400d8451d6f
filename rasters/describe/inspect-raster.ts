import { geoKeys, readGeoKeys } from '#rasters/read/geo-keys.ts';
import { parseNoData } from '#rasters/read/no-data.ts';
import { placementOf, readAffine } from '#rasters/read/placement.ts';
import { toSource, type RasterSource } from '#rasters/read/raster-source.ts';
import { fieldText, readTiffDirectory, type TiffDirectory } from '#rasters/read/tiff-directory.ts';
import {
  compressions,
  largestSource,
  readTiffLayout,
  type CompressionName,
  type RasterLimits,
  type TiffLayout,
} from '#rasters/read/tiff-layout.ts';
import { describeCrs } from './describe-crs.ts';
import { readGdalMetadata } from './gdal-metadata.ts';
import { groundSize } from './ground-size.ts';
import { heightUnitOf } from './height-unit.ts';
import type { BandDescription, RasterDescription } from './raster-description.ts';

const tags = { metadata: 42112, noData: 42113 } as const;
const longestMetadata = 1_048_576;
const reducedCopy = 1;

/**
 * Says what a GeoTIFF holds without decoding a cell: memory is the header and the table of its strips or tiles, which is
 * checked against the length of the file. Refused is only what cannot be used at all; what can be mended is described.
 * @throws RasterError with what was found, what was expected and how to mend it
 */
export async function inspectRaster(
  input: Uint8Array | RasterSource,
  limits: Partial<RasterLimits> = {},
): Promise<RasterDescription> {
  return (await openRaster(toSource(input), limits)).description;
}

/** A file's description with how its cells are kept, for those who go on to read them. @throws RasterError */
export async function openRaster(
  source: RasterSource,
  limits: Partial<RasterLimits> = {},
): Promise<{ description: RasterDescription; layout: TiffLayout }> {
  const directory = await readTiffDirectory(source);
  const layout = await readTiffLayout(directory, { ...largestSource, ...limits });
  const { width, height } = layout;
  const affine = await readAffine(directory);
  const keys = await readGeoKeys(directory);
  const crs = describeCrs(keys);
  const pixelIsPoint = keys?.number(geoKeys.rasterType) === 2;
  const { southUp, ...corner } = placementOf(affine, { height, pixelIsPoint });
  const rectangle = { width, height, ...corner };
  const description: RasterDescription = {
    ...rectangle,
    bands: await describeBands(directory, layout),
    crs,
    heightUnit: heightUnitOf(keys),
    ...groundSize(rectangle, crs),
    southUp,
    pixelIsPoint,
    compression: nameOf(layout.compression),
    tiled: layout.tiled,
    bigTiff: directory.big,
    overviews: directory.laterKinds.filter((kind) => (kind & reducedCopy) !== 0).length,
  };
  return { description, layout };
}

async function describeBands(directory: TiffDirectory, layout: TiffLayout): Promise<BandDescription[]> {
  const { bands, dataType, alphaBand } = layout;
  const noData = parseNoData(await fieldText(directory, tags.noData, 1024), dataType);
  const metadata = readGdalMetadata(await fieldText(directory, tags.metadata, longestMetadata));
  return Array.from({ length: bands }, (_, i) => ({
    index: i + 1,
    role: i + 1 === alphaBand ? 'alpha' : 'data',
    dataType,
    noData,
    ...metadata(i + 1),
  }));
}

function nameOf(code: TiffLayout['compression']): CompressionName {
  const found = Object.entries(compressions).find(([, c]) => c === code);
  return (found?.[0] ?? 'none') as CompressionName;
}
