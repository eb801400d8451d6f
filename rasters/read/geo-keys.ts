import { damaged } from './raster-error.ts';
import { fieldNumbers, fieldText, type TiffDirectory } from './tiff-directory.ts';

/** GeoTIFF 1.1 (OGC 19-008r4), sections 7.1 and 7.2, and annex B. */
const tags = { directory: 34735, doubles: 34736, text: 34737 } as const;
export const geoKeys = {
  modelType: 1024,
  rasterType: 1025,
  citation: 1026,
  geographic: 2048,
  geographicCitation: 2049,
  angularUnit: 2054,
  projected: 3072,
  projectedCitation: 3073,
  linearUnit: 3076,
  linearUnitSize: 3077,
  centralMeridian: 3080,
  vertical: 4096,
  verticalUnit: 4099,
} as const;
/** Says that other keys spell out what has no code. */
export const userDefined = 32767;
const longestText = 65_536;

/** The keys of a GeoTIFF's georeference by their numbers. */
export interface GeoKeys {
  number(key: number): number | undefined;
  text(key: number): string | undefined;
}

/** Reads the GeoKeys, or gives undefined where there are none. @throws RasterError `raster-truncated` */
export async function readGeoKeys(directory: TiffDirectory): Promise<GeoKeys | undefined> {
  const rows = await fieldNumbers(directory, tags.directory, longestText);
  if (!rows) return undefined;
  if (rows.length < 4 || rows.length < 4 + 4 * rows[3]) throw damaged('GeoKeys that are not whole');
  const doubles = (await fieldNumbers(directory, tags.doubles, longestText)) ?? [];
  const text = (await fieldText(directory, tags.text, longestText)) ?? '';
  const values = new Map<number, number | string>();
  for (let i = 4; i < 4 + 4 * rows[3]; i += 4) {
    const [key, place, count, at] = rows.slice(i, i + 4);
    if (place === 0) values.set(key, at);
    else if (place === tags.doubles && doubles[at] !== undefined) values.set(key, doubles[at]);
    else if (place === tags.text) values.set(key, text.slice(at, at + count));
  }
  return {
    number: (key) => {
      const value = values.get(key);
      return typeof value === 'number' ? value : undefined;
    },
    text: (key) => {
      const value = values.get(key);
      return typeof value === 'string' ? value : undefined;
    },
  };
}
