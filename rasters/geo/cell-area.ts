const radians = Math.PI / 180;

export interface Ellipsoid {
  /** semi-major axis, m */
  readonly a: number;
  /** squared eccentricity */
  readonly e2: number;
}

/** WGS 84: 1/f = 298.257223563 (NIMA TR8350.2, third edition). */
export const wgs84: Ellipsoid = { a: 6_378_137, e2: (2 - 1 / 298.257223563) / 298.257223563 };

/**
 * Area of a cell between two meridians and two parallels on an ellipsoid, m²:
 * (a²/2) Δλ [q(φ2) − q(φ1)] with q = (1 − e²) [s/(1 − e²s²) − (1/2e) ln((1 − es)/(1 + es))], s = sin φ
 * (Snyder 1987, Map Projections: A Working Manual, eq. 3-12).
 * @param south, north latitudes in degrees
 * @param degrees width in degrees of longitude
 */
export function cellArea(
  south: number,
  north: number,
  degrees: number,
  ellipsoid: Ellipsoid = wgs84,
): number {
  const { a } = ellipsoid;
  return ((a * a) / 2) * degrees * radians * (authalic(north, ellipsoid) - authalic(south, ellipsoid));
}

function authalic(latitude: number, { e2 }: Ellipsoid): number {
  const s = Math.sin(latitude * radians);
  const e = Math.sqrt(e2);
  if (e === 0) return 2 * s;
  return (1 - e2) * (s / (1 - e2 * s * s) - Math.log((1 - e * s) / (1 + e * s)) / (2 * e));
}

/**
 * Length of a degree of latitude and of longitude at a latitude on an ellipsoid, m: the radii of curvature in the
 * meridian and in the prime vertical (Snyder 1987, eqs. 4-18 to 4-21).
 */
export function degreeLengths(
  latitude: number,
  { a, e2 }: Ellipsoid = wgs84,
): { latitude: number; longitude: number } {
  const sin = Math.sin(latitude * radians);
  const w = 1 - e2 * sin * sin;
  return {
    latitude: ((a * (1 - e2)) / w ** 1.5) * radians,
    longitude: (a / Math.sqrt(w)) * Math.cos(latitude * radians) * radians,
  };
}
