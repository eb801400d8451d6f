import { geoKeys, type GeoKeys } from '#rasters/read/geo-keys.ts';

export type HeightUnitFound = 'metre' | 'foot' | 'us-foot';

/** Units of GeoTIFF 1.1 (OGC 19-008r4), section 7.5, as the EPSG register numbers them. */
const byUnit: Readonly<Record<number, HeightUnitFound>> = { 9001: 'metre', 9002: 'foot', 9003: 'us-foot' };
/**
 * Vertical systems of the EPSG register, by name: NAVD88 in metres, feet and US survey feet, NGVD29 in metres and US survey feet,
 * EVRF2000 and ODN in metres (from memory; others say nothing here unless the unit stands beside them).
 */
const bySystem: Readonly<Record<number, HeightUnitFound>> = {
  5703: 'metre',
  8228: 'foot',
  6360: 'us-foot',
  7968: 'metre',
  5702: 'us-foot',
  5730: 'metre',
  5701: 'metre',
};

/** What a file's vertical system counts heights in, where it has one that is known; else null. */
export function heightUnitOf(keys: GeoKeys | undefined): HeightUnitFound | null {
  const unit = byUnit[keys?.number(geoKeys.verticalUnit) ?? 0];
  return unit ?? bySystem[keys?.number(geoKeys.vertical) ?? 0] ?? null;
}
