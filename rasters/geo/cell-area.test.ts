import { expect, it } from 'vitest';
import { cellArea, degreeLengths, wgs84, type Ellipsoid } from './cell-area.ts';
import { ellipsoidOf } from './transformer.ts';

/** Sphere of the mean radius of WGS 84, (2a + b)/3 (Moritz 2000, Geodetic Reference System 1980). */
const sphere: Ellipsoid = { a: 6_371_008.7714, e2: 0 };

// Values of Snyder 1987, Map Projections: A Working Manual, eq. 3-12, which GeographicLib 2.1.2's Planimeter confirms to
// 0.1 m² (Karney 2013, Journal of Geodesy 87:43–55).
it.each([
  [0, 1, 1, 12_308_463_893.975],
  [30, 31, 1, 10_642_393_438.883],
  [31, 32, 1, 10_533_542_701.809],
  [45, 46, 1, 8_686_494_956.67],
  [60, 61, 1, 6_123_140_878.746],
  [0, 0.5, 0.5, 3_077_230_007.913],
])('the cell from %s° to %s°, %s° wide, on WGS 84', (south, north, degrees, area) => {
  expect(Math.abs(cellArea(south, north, degrees) - area)).toBeLessThan(0.1);
  expect(cellArea(-north, -south, degrees)).toBeCloseTo(area, 0);
});

it('a cell of one second from 31.4° N', () => {
  const second = 1 / 3600;
  expect(cellArea(31.4, 31.4 + second, second)).toBeCloseTo(813.633625, 6);
});

// R² Δλ (sin φ2 − sin φ1).
it.each([
  [0, 12_363_718_034.176],
  [30, 10_653_345_636.481],
  [31, 10_542_203_991.513],
  [45, 8_666_174_492.715],
  [60, 6_088_417_878.801],
])('the cell of one degree from %s° on a sphere', (south, area) => {
  expect(Math.abs(cellArea(south, south + 1, 1, sphere) - area)).toBeLessThan(0.1);
});

it('all cells together have the area of a sphere of GRS 80’s authalic radius (Moritz 2000)', () => {
  const grs80 = { a: 6_378_137, e2: (2 - 1 / 298.257222101) / 298.257222101 };
  expect(Math.sqrt(cellArea(-90, 90, 360, grs80) / (4 * Math.PI))).toBeCloseTo(6_371_007.181, 3);
});

// Radii of curvature (Snyder 1987, eqs. 4-18 to 4-21), computed apart with 50 digits.
it.each([
  [0, 110_574.2758, 111_319.4908],
  [31.4, 110_876.3647, 95_103.2901],
  [45, 111_131.7774, 78_846.8351],
  [60, 111_412.2875, 55_800.0016],
])('a degree at %s°', (latitude, north, east) => {
  const degree = degreeLengths(latitude);
  expect(degree.latitude).toBeCloseTo(north, 3);
  expect(degree.longitude).toBeCloseTo(east, 3);
});

it('the ellipsoid of a CRS is that of the register', () => {
  expect(ellipsoidOf(32617).a).toBe(wgs84.a);
  expect(ellipsoidOf(32617).e2).toBeCloseTo(wgs84.e2, 14);
  // Airy 1830 (EPSG ellipsoid 7001): 1/f = 299.3249646.
  expect(ellipsoidOf(27700).a).toBe(6_377_563.396);
  expect(ellipsoidOf(27700).e2).toBeCloseTo((2 - 1 / 299.3249646) / 299.3249646, 9);
});
