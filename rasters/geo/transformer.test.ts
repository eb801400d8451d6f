import { describe, expect, it } from 'vitest';
import { toOwnDegrees, transformer } from './transformer.ts';

const shifted = [
  {
    operation: 'EPSG:1314',
    to: 27700,
    point: [0.5, 51.4],
    result: [574_000.863518831, 169_739.50673537],
    accuracy: 2,
  },
  {
    operation: 'EPSG:1777',
    to: 31467,
    point: [8.5, 53.9],
    result: [3_467_204.45590468, 5_974_461.37678871],
    accuracy: 3,
  },
  {
    operation: 'EPSG:1564',
    to: 27200,
    point: [174.8, -41.3],
    result: [2_660_721.9519312, 5_988_090.1917118],
    accuracy: 4,
  },
  {
    operation: 'the register for Amersfoort',
    to: 28992,
    point: [3.9, 51.5],
    result: [51_578.4634955786, 391_098.439011469],
    accuracy: 1,
  },
  {
    operation: 'EPSG:1188',
    to: 2236,
    point: [-81.28, 30.4],
    result: [567_893.794310004, 2_205_509.32301313],
    accuracy: 4,
  },
];

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

describe('UTM', () => {
  // Computed with PROJ 9.1.1 (transverse Mercator of Karney 2011, Journal of Geodesy 85:475–485).
  it.each([
    [31.4, -81.28, 32617, 473_381.6815, 3_473_967.2453],
    [37.25, -76.4, 32618, 375_839.1814, 4_123_524.5505],
    [46.6, -123.95, 32610, 427_238.641, 5_161_153.4212],
    [37.6, -122.1, 32610, 579_445.7004, 4_161_816.4272],
    [51.5, 3.9, 32631, 562_470.891, 5_705_813.1638],
    [-33.9, 151.2, 32756, 333_568.941, 6_247_473.3368],
    [0, 3, 32631, 500_000, 0],
    [0, 0, 32631, 166_021.4431, 0],
  ])('%s°, %s° in EPSG:%s', (latitude, longitude, epsg, x, y) => {
    const [gotX, gotY] = transformer(4326, epsg).forward(longitude, latitude);
    expect(gotX).toBeCloseTo(x, 3);
    expect(gotY).toBeCloseTo(y, 3);
    const [backX, backY] = transformer(epsg, 4326).forward(gotX, gotY);
    expect(backX).toBeCloseTo(longitude, 9);
    expect(backY).toBeCloseTo(latitude, 9);
  });
});

describe('from datum to datum', () => {
  // gdaltransform (GDAL 3.6.2) with the same parameters: -s_srs EPSG:4326 -t_srs '+proj=… +towgs84=…'.
  it.each(shifted)('$to: as PROJ with the parameters of $operation', ({ to, point, result, accuracy }) => {
    const { forward, inverse, datumShift } = transformer(4326, to);
    const [x, y] = forward(point[0], point[1]);
    expect(Math.abs(x - result[0])).toBeLessThan(0.001);
    expect(Math.abs(y - result[1])).toBeLessThan(0.001);
    const [longitude, latitude] = inverse(x, y);
    expect(longitude).toBeCloseTo(point[0], 7);
    expect(latitude).toBeCloseTo(point[1], 7);
    expect(datumShift).toMatchObject({ from: 'WGS 1984', accuracy });
  });

  it('stays where it is on one datum, whose grid file is then not needed', () => {
    // NAD27 to NAD27 / UTM zone 17N: no shift, though the register knows none without its grid.
    expect(transformer(4267, 26717).datumShift).toBeNull();
    expect(transformer(3857, 32631).datumShift).toBeNull();
  });

  it('adds up what both shifts are worth', () => {
    expect(transformer(26917, 25832).datumShift).toEqual({
      from: 'North American Datum 1983',
      to: 'European Terrestrial Reference System 1989',
      accuracy: 5,
    });
  });

  it.each([
    [4267, 32617, /North American Datum 1927.*no shift/],
    [32617, 4267, /North American Datum 1927.*no shift/],
    [2048, 32735, /do not run east and north/],
    [8441, 32738, /cannot be computed here/],
    [1, 32617, /register.*does not hold/],
    [5703, 32617, /register.*does not hold/],
  ])('EPSG:%s to EPSG:%s is refused with the way out', (from, to, words) => {
    expect(() => transformer(from, to)).toThrow(words);
    expect(() => transformer(from, to)).toThrow(/gdalwarp -t_srs/);
  });
});

it('gives no point where there is none', () => {
  expect(transformer(4326, 32617).forward(NaN, 3)).toEqual([NaN, NaN]);
});
