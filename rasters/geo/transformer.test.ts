import { describe, expect, it } from 'vitest';
import { toOwnDegrees } from './transformer.ts';

const dms = (degrees: number, minutes = 0, seconds = 0) => degrees + minutes / 60 + seconds / 3600;

describe('published points', () => {
  const guidance = 'IOGP Geomatics Guidance Note 7-2 (373-7-2)';
  it.each([
    // The exact projection differs from the printed result by 6 and 8 mm.
    [guidance, 'transverse Mercator, §3.2.5', 27700, dms(0, 30), dms(50, 30), 577_274.99, 69_740.5, 0.01],
    [
      'Ordnance Survey, A guide to coordinate systems in Great Britain',
      'transverse Mercator',
      27700,
      dms(1, 43, 4.5177),
      dms(52, 39, 27.2531),
      651_409.903,
      313_177.27,
      0.001,
    ],
    [guidance, 'web Mercator', 3857, -dms(100, 20), dms(24, 22, 54.433), -11_169_055.58, 2_800_000, 0.01],
    [guidance, 'Lambert azimuthal equal area', 3035, 5, 50, 3_962_799.45, 2_999_718.85, 0.01],
    [guidance, 'Lambert conic, two parallels', 32040, -96, 28.5, 2_963_503.91, 254_759.8, 0.01],
    [
      guidance,
      'Lambert conic, one parallel',
      24200,
      -dms(76, 56, 37.26),
      dms(17, 55, 55.8),
      255_966.58,
      142_493.51,
      0.01,
    ],
    ['Snyder 1987, Map Projections, p. 292', 'Albers', 5069, -75, 35, 1_885_472.7, 1_535_925, 0.05],
  ])('%s: %s', (_, __, epsg, longitude, latitude, x, y, tolerance) => {
    const { forward, inverse } = toOwnDegrees(epsg);
    const [gotX, gotY] = inverse(longitude, latitude);
    expect(Math.abs(gotX - x)).toBeLessThan(tolerance);
    expect(Math.abs(gotY - y)).toBeLessThan(tolerance);
    // A millimetre: the inverse of the equal-area projections is a series.
    const [backX, backY] = forward(gotX, gotY);
    expect(backX).toBeCloseTo(longitude, 8);
    expect(backY).toBeCloseTo(latitude, 8);
  });
});
