import { createRequire } from 'node:module';
import { RasterError } from '#rasters/read/raster-error.ts';
import type { CrsDefinition } from './crs-definition.ts';

/** What epsg-index has on one code. */
interface Entry {
  readonly kind: string;
  readonly name: string;
  readonly wkt: string | null;
  readonly proj4: string | null;
  /** north, west, south, east */
  readonly bbox: readonly number[] | null;
  readonly accuracy: number | null;
}

const load = createRequire(import.meta.url);
const known = new Map<number, CrsDefinition | undefined>();

/**
 * A two-dimensional CRS by its EPSG code, from the copy of the register that ships with the product (one small file a
 * code, read once), or undefined where it has no such CRS. For Node alone: the register is no matter for browsers.
 */
export function findCrs(epsg: number): CrsDefinition | undefined {
  if (!known.has(epsg)) known.set(epsg, readEntry(epsg));
  return known.get(epsg);
}

/** As `findCrs`. @throws RasterError `raster-crs` where the register has no such CRS */
export function crsDefinition(epsg: number): CrsDefinition {
  const found = findCrs(epsg);
  if (!found)
    throw new RasterError('raster-crs', {
      found: `EPSG:${epsg}, which the register that ships with the product does not hold`,
      expected: 'the code of a projected or geographic CRS in two dimensions',
      remedy:
        'Reproject the raster to the UTM zone of the site, for example gdalwarp -t_srs EPSG:32631 IN.tif OUT.tif.',
    });
  return found;
}

/** @throws RasterError `raster-crs` where coordinates do not run east and north: programs write such files in two ways */
export function checkAxes({ epsg, name, eastNorth }: CrsDefinition): void {
  if (eastNorth) return;
  throw new RasterError('raster-crs', {
    found: `${name} (EPSG:${epsg}), whose axes do not run east and north`,
    expected: 'eastings and northings',
    remedy:
      'Reproject it to the UTM zone of the site, for example gdalwarp -t_srs EPSG:32631 IN.tif OUT.tif.',
  });
}

function readEntry(epsg: number): CrsDefinition | undefined {
  // Only EPSG's own range fits a GeoKey (GeoTIFF 1.1, OGC 19-008r4, section 7.3); the files above it are other registers'.
  if (!Number.isInteger(epsg) || epsg < 1024 || epsg > 32766) return undefined;
  let entry: Entry;
  try {
    entry = load(`epsg-index/s/${epsg}.json`) as Entry;
  } catch {
    return undefined;
  }
  const kind = kinds[entry.kind];
  const datum = /DATUM\["([^"]+)"/.exec(entry.wkt ?? '')?.[1];
  if (!kind || !datum || !entry.proj4) return undefined;
  return {
    epsg,
    name: entry.name,
    kind,
    ...unitOf(kind, entry.proj4),
    datum,
    use: useOf(entry.bbox),
    eastNorth: !/\+axis=(?!enu)/.test(entry.proj4),
    proj4: entry.proj4,
    accuracy: entry.accuracy,
  };
}

const kinds: Readonly<Record<string, CrsDefinition['kind'] | undefined>> = {
  'CRS-PROJCRS': 'projected',
  'CRS-GEOGCRS': 'geographic',
  'CRS-GEOG3DCRS': 'geographic',
};

/** Lengths of feet from the EPSG register (units 9002 and 9003). */
const foot = 0.3048;
const usFoot = 12 / 39.37;

function unitOf(kind: CrsDefinition['kind'], proj4: string): Pick<CrsDefinition, 'unit' | 'metresPerUnit'> {
  if (kind === 'geographic') return { unit: 'degree', metresPerUnit: null };
  const [name, size] = [/\+units=(\S+)/.exec(proj4)?.[1], Number(/\+to_meter=(\S+)/.exec(proj4)?.[1] ?? 1)];
  if (name === 'ft' || size === foot) return { unit: 'foot', metresPerUnit: foot };
  if (name === 'us-ft' || Math.abs(size - usFoot) < 1e-9) return { unit: 'us-foot', metresPerUnit: usFoot };
  if (name === 'km') return { unit: 'other', metresPerUnit: 1000 };
  return size === 1 ? { unit: 'metre', metresPerUnit: 1 } : { unit: 'other', metresPerUnit: size };
}

function useOf(bbox: Entry['bbox']): CrsDefinition['use'] {
  if (bbox?.length !== 4) return null;
  const [north, west, south, east] = bbox;
  return { west, south, east, north };
}
