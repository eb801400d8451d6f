import { damaged, RasterError } from './raster-error.ts';
import { isKnownMetric, isWorldMercator } from './metric-crs.ts';
import { fieldNumbers, fieldText, type TiffDirectory } from './tiff-directory.ts';

/** GeoTIFF 1.1 (OGC 19-008r4), sections 7.1 and 7.2, and annex B. */
const tags = { directory: 34735, doubles: 34736, text: 34737 } as const;
const keys = {
  modelType: 1024,
  rasterType: 1025,
  citation: 1026,
  geographic: 2048,
  geographicCitation: 2049,
  projected: 3072,
  projectedCitation: 3073,
  linearUnit: 3076,
  linearUnitSize: 3077,
} as const;
const userDefined = 32767;
const longestText = 65_536;

const linearUnits: Readonly<Record<number, string>> = {
  9002: 'feet',
  9003: 'US survey feet',
  9005: 'Clarke’s feet',
  9036: 'kilometres',
};

export interface RasterCrs {
  readonly epsg: number;
  /** the citation in the file, or `EPSG:n` */
  readonly name: string;
  /** whether coordinates in the file belong to cell centres (PixelIsPoint) */
  readonly pixelIsPoint: boolean;
}

/**
 * The CRS that the GeoKeys name: projected, in metres, with an EPSG code.
 * @throws RasterError `raster-not-georeferenced`, `raster-not-projected`, `raster-not-metric`, `raster-truncated`
 */
export async function readCrs(directory: TiffDirectory): Promise<RasterCrs> {
  const geo = await readGeoKeys(directory);
  const projected = geo?.number(keys.projected);
  const model = geo?.number(keys.modelType) ?? (projected ? 1 : geo?.number(keys.geographic) ? 2 : 0);
  if (!geo || model === 0)
    throw new RasterError('raster-not-georeferenced', {
      found: 'no coordinate reference system',
      expected: 'a projected CRS in metres',
      remedy: 'Say what it is, for example gdal_translate -a_srs EPSG:32631 IN.tif OUT.tif.',
    });
  const name = cleanName(
    geo.text(keys.projectedCitation) ?? geo.text(keys.citation) ?? geo.text(keys.geographicCitation),
  );
  const reproject =
    'Reproject it to the UTM zone of the site, for example gdalwarp -t_srs EPSG:32631 IN.tif OUT.tif.';
  if (model !== 1)
    throw new RasterError('raster-not-projected', {
      found:
        model === 2
          ? `degrees (a geographic CRS${name ? `, ${name}` : ''})`
          : `a CRS of model type ${model}, which is not projected`,
      expected: 'a projected CRS in metres',
      remedy: reproject,
    });
  if (!projected || projected === userDefined || projected < 1024)
    throw new RasterError('raster-not-projected', {
      found: `a projected CRS without an EPSG code${name ? ` (${name})` : ''}`,
      expected: 'a projected CRS in metres with an EPSG code',
      remedy: `If it is one under another name, say so with gdal_translate -a_srs EPSG:n IN.tif OUT.tif. ${reproject}`,
    });
  checkMetres(geo, projected, reproject);
  return {
    epsg: projected,
    name: name ?? `EPSG:${projected}`,
    pixelIsPoint: geo.number(keys.rasterType) === 2,
  };
}

function checkMetres(geo: GeoKeys, epsg: number, reproject: string): void {
  const unit = geo.number(keys.linearUnit);
  const size = geo.number(keys.linearUnitSize);
  const refuse = (found: string, remedy = reproject): RasterError =>
    new RasterError('raster-not-metric', { found, expected: 'a projected CRS in metres', remedy });
  if (isWorldMercator(epsg))
    throw refuse(`EPSG:${epsg}, a Mercator of the whole world, whose metres grow with latitude`);
  if (unit === 9001 || (unit === userDefined && size === 1)) return;
  if (unit !== undefined)
    throw refuse(
      `coordinates in ${linearUnits[unit] ?? `unit ${unit === userDefined ? `of ${size} m` : unit}`}`,
    );
  if (!isKnownMetric(epsg))
    throw refuse(
      `EPSG:${epsg} without its unit`,
      `If its unit is the metre, write the file again with gdal_translate IN.tif OUT.tif, which adds the unit. ${reproject}`,
    );
}

interface GeoKeys {
  number(key: number): number | undefined;
  text(key: number): string | undefined;
}

async function readGeoKeys(directory: TiffDirectory): Promise<GeoKeys | undefined> {
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

/** A citation as one clean line: up to its first bar, without control characters, 100 characters at most. */
function cleanName(citation: string | undefined): string | undefined {
  const line = citation
    ?.split('|')[0]
    .replace(/^PCS Name = /, '')
    .replace(/[\p{C}\p{Z}]+/gu, ' ')
    .trim()
    .slice(0, 100);
  return line === '' ? undefined : line;
}
