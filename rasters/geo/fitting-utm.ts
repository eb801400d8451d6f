import { RasterError } from '#rasters/read/raster-error.ts';
import { findCrs } from './epsg-register.ts';

/**
 * Number of the UTM zone at a place: six degrees each from 180° W, with zone 32 widened over south-western Norway and
 * zones 31, 33, 35 and 37 over Svalbard (US Defense Mapping Agency 1989, The Universal Grids, DMA TM 8358.2; from memory).
 */
export function utmZone(longitude: number, latitude: number): number {
  const east = ((((longitude + 180) % 360) + 360) % 360) - 180;
  if (latitude >= 56 && latitude < 64 && east >= 3 && east < 12) return 32;
  if (latitude >= 72 && latitude < 84 && east >= 0 && east < 42)
    return east < 9 ? 31 : east < 21 ? 33 : east < 33 ? 35 : 37;
  return Math.floor((east + 180) / 6) + 1;
}

/** First codes of families of UTM zones in the EPSG register: code = base + zone. */
const families: readonly { readonly base: number; readonly south: boolean }[] = [
  { base: 26900, south: false }, // NAD83
  { base: 25800, south: false }, // ETRS89
  { base: 6329, south: false }, // NAD83(2011): zone 1 is EPSG:6330
  { base: 28300, south: true }, // GDA94 / MGA
  { base: 7800, south: true }, // GDA2020 / MGA
];

/**
 * EPSG code of the UTM zone that fits a place: of the same datum where the register has one, so that no shift is needed,
 * else of WGS 84 (EPSG:326zz north, 327zz south of the equator).
 * @param datum the register's name of the raster's datum
 * @throws RasterError `raster-crs` beyond 84° N and 80° S, where UTM ends
 */
export function fittingUtm(longitude: number, latitude: number, datum?: string): number {
  if (!(latitude <= 84 && latitude >= -80) || !Number.isFinite(longitude))
    throw new RasterError('raster-crs', {
      found: `a place at latitude ${latitude}`,
      expected: 'a place between 80° S and 84° N, where UTM zones lie',
      remedy:
        'Reproject the raster to a polar CRS in metres, for example gdalwarp -t_srs EPSG:3413 IN.tif OUT.tif.',
    });
  const zone = utmZone(longitude, latitude);
  const south = latitude < 0;
  const own = families.find(({ base, south: s }) => {
    const crs = s === south && datum ? findCrs(base + zone) : undefined;
    return crs?.datum === datum && / zone \d+/.test(crs?.name ?? '') && crs?.unit === 'metre';
  });
  return own ? own.base + zone : (south ? 32700 : 32600) + zone;
}
