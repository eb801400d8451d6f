import { expect, it } from 'vitest';
import type { GeoKeys } from '#rasters/read/geo-keys.ts';
import { heightUnitOf } from './height-unit.ts';

const keys = (of: Record<number, number>): GeoKeys => ({ number: (key) => of[key], text: () => undefined });

it.each([
  // GeoTIFF 1.1 (OGC 19-008r4): VerticalUnitsGeoKey 4099 with EPSG units, VerticalGeoKey 4096 with EPSG systems.
  [{ 4099: 9001 }, 'metre'],
  [{ 4099: 9002 }, 'foot'],
  [{ 4099: 9003, 4096: 5703 }, 'us-foot'],
  [{ 4096: 6360 }, 'us-foot'],
  [{ 4096: 8228 }, 'foot'],
  [{ 4096: 5703 }, 'metre'],
  [{ 4096: 32_767 }, null],
  [{ 3072: 32_631 }, null],
] as const)('reads the vertical keys %j as %s', (of, unit) => {
  expect(heightUnitOf(keys(of))).toBe(unit);
});

it('says nothing of a file without keys', () => {
  expect(heightUnitOf(undefined)).toBeNull();
});
