import { checkAxes, findCrs } from '#rasters/geo/epsg-register.ts';
import { geoKeys, userDefined, type GeoKeys } from '#rasters/read/geo-keys.ts';
import { RasterError } from '#rasters/read/raster-error.ts';
import type { CrsDescription } from './raster-description.ts';
import { utmByName } from './utm-by-name.ts';

/** Units of GeoTIFF 1.1 (OGC 19-008r4), section 7.5, as the EPSG register numbers them. */
const units = { metre: 9001, foot: 9002, usFoot: 9003, degree: 9102, supplierDegree: 9122 } as const;
const unitNames: Readonly<Record<number, string>> = {
  9001: 'metres',
  9002: 'feet',
  9003: 'US survey feet',
  9005: 'Clarke’s feet',
  9036: 'kilometres',
};
const lengths: Readonly<Record<number, number>> = { 9001: 1, 9002: 0.3048, 9003: 12 / 39.37, 9036: 1000 };
const byUtm =
  'Reproject it to the UTM zone of the site, for example gdalwarp -t_srs EPSG:32631 IN.tif OUT.tif.';

/**
 * The CRS that the GeoKeys name. A projected CRS that is spelled out without a code is taken for a UTM zone when it is
 * called one, and refused otherwise.
 * @throws RasterError `raster-not-georeferenced`, `raster-not-projected`, `raster-crs`
 */
export function describeCrs(keys: GeoKeys | undefined): CrsDescription {
  const projected = keys?.number(geoKeys.projected);
  const geographic = keys?.number(geoKeys.geographic);
  const model = keys?.number(geoKeys.modelType) ?? (projected ? 1 : geographic ? 2 : 0);
  if (!keys || model === 0)
    throw new RasterError('raster-not-georeferenced', {
      found: 'no coordinate reference system',
      expected: 'a coordinate reference system with an EPSG code',
      remedy: 'Say what it is, for example gdal_translate -a_srs EPSG:32631 IN.tif OUT.tif.',
    });
  if (model === 1) return describeProjected(keys, projected);
  if (model === 2) return describeGeographic(keys, geographic);
  throw new RasterError('raster-not-projected', {
    found: `a CRS of model type ${model}, which is neither projected nor in degrees`,
    expected: 'a projected or geographic CRS',
    remedy: byUtm,
  });
}

const hasCode = (code: number | undefined): code is number =>
  code !== undefined && code >= 1024 && code !== userDefined;

function describeProjected(keys: GeoKeys, code: number | undefined): CrsDescription {
  const name = cleanName(keys.text(geoKeys.projectedCitation) ?? keys.text(geoKeys.citation));
  const epsg = hasCode(code) ? code : utmByName(name, keys.number(geoKeys.centralMeridian));
  if (epsg === undefined)
    throw new RasterError('raster-not-projected', {
      found: `a projected CRS without an EPSG code${name ? ` (${name})` : ''}`,
      expected: 'a CRS with an EPSG code',
      remedy: `If it is one under another name, say so with gdal_translate -a_srs EPSG:n IN.tif OUT.tif. ${byUtm}`,
    });
  const said = keys.number(geoKeys.linearUnit);
  const length = said === userDefined ? keys.number(geoKeys.linearUnitSize) : lengths[said ?? 0];
  const known = findCrs(epsg);
  if (!known) return describeUnknown(epsg, name, said, length);
  checkAxes(known);
  if (known.kind !== 'projected') throw contradiction(epsg, known.name, 'a projected CRS', 'degrees');
  if (said !== undefined && !(length !== undefined && sameLength(length, known.metresPerUnit ?? 0)))
    throw contradiction(
      epsg,
      known.name,
      `coordinates in ${unitName(said, length)}`,
      known.unit === 'other' ? `units of ${known.metresPerUnit} m` : unitWords[known.unit],
    );
  const { kind, unit, metresPerUnit } = known;
  return { epsg, name: known.name, kind, unit, metresPerUnit };
}

const unitWords = { metre: 'metres', foot: 'feet', 'us-foot': 'US survey feet', degree: 'degrees' } as const;
const unitName = (code: number, length: number | undefined): string =>
  unitNames[code] ?? (length === undefined ? `unit ${code}` : `units of ${length} m`);

/** Ten metres in ten thousand kilometres: the lengths of the two feet differ by twice as much. */
const sameLength = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-6 * b;

/** A code that the register does not hold can still be a site's own, as long as its coordinates are metres. */
function describeUnknown(
  epsg: number,
  name: string | undefined,
  said: number | undefined,
  length: number | undefined,
): CrsDescription {
  if (length !== 1)
    throw new RasterError('raster-crs', {
      found: `EPSG:${epsg}, which the register here does not hold, ${said === undefined ? 'without its unit' : `in ${unitName(said, length)}`}`,
      expected: 'a known EPSG code, or one in metres',
      remedy: byUtm,
    });
  return { epsg, name: name ?? `EPSG:${epsg}`, kind: 'projected', unit: 'metre', metresPerUnit: 1 };
}

function describeGeographic(keys: GeoKeys, code: number | undefined): CrsDescription {
  const name = cleanName(keys.text(geoKeys.geographicCitation) ?? keys.text(geoKeys.citation));
  const known = hasCode(code) ? findCrs(code) : undefined;
  if (!known || known.kind !== 'geographic')
    throw new RasterError('raster-crs', {
      found: `degrees on a datum without a known EPSG code${name ? ` (${name})` : ''}`,
      expected: 'a geographic CRS with an EPSG code',
      remedy: 'If it is WGS 84, say so with gdal_translate -a_srs EPSG:4326 IN.tif OUT.tif.',
    });
  const unit = keys.number(geoKeys.angularUnit) ?? units.degree;
  if (unit !== units.degree && unit !== units.supplierDegree)
    throw contradiction(known.epsg, known.name, `coordinates in angular unit ${unit}`, 'degrees');
  return { epsg: known.epsg, name: known.name, kind: 'geographic', unit: 'degree', metresPerUnit: null };
}

const contradiction = (epsg: number, name: string, says: string, holds: string): RasterError =>
  new RasterError('raster-crs', {
    found: `${name} (EPSG:${epsg}), whose coordinates are ${holds}, and in the same file ${says}`,
    expected: 'one unit',
    remedy: 'Find out which is true and write it again with gdal_translate -a_srs EPSG:n IN.tif OUT.tif.',
  });

/** A citation as one clean line: up to its first bar, without control characters, 100 characters at most. */
function cleanName(citation: string | undefined): string | undefined {
  const line = citation
    ?.split('|')[0]
    .replace(/^PCS Name = /, '')
    .replace(/[\p{C}\p{Z}]+/gu, ' ')
    .trim()
    .slice(0, 100);
  // GDAL's word for a CRS that has no name.
  return line === '' || line === 'unknown' ? undefined : line;
}
