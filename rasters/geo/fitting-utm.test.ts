import { describe, expect, it } from 'vitest';
import { fittingUtm, utmZone } from './fitting-utm.ts';
import { crsDefinition } from './epsg-register.ts';

// Zones of six degrees from 180° W, and those of Norway and Svalbard (US Defense Mapping Agency 1989, DMA TM 8358.2; from memory).
it.each([
  [-180, 0, 1],
  [-174.001, 0, 1],
  [-174, 0, 2],
  [179.999, 0, 60],
  [180, 0, 1],
  [278.72, 31.4, 17],
  [5, 60, 32],
  [5, 55.9, 31],
  [2.9, 60, 31],
  [5, 64, 31],
  [8, 75, 31],
  [9, 75, 33],
  [20.9, 75, 33],
  [21, 75, 35],
  [33, 75, 37],
  [41.9, 75, 37],
  [42, 75, 38],
  [-5, 75, 30],
])('%s°, %s° lies in zone %s', (longitude, latitude, zone) => {
  expect(utmZone(longitude, latitude)).toBe(zone);
});

describe('the code', () => {
  it.each([
    [-81.28, 31.4, 'WGS_1984', 32617],
    [151.2, -33.9, 'WGS_1984', 32756],
    [3.9, 51.5, undefined, 32631],
    [-81.28, 31.4, 'North_American_Datum_1983', 26917],
    [-81.28, 31.4, 'NAD83_National_Spatial_Reference_System_2011', 6346],
    [10, 54, 'European_Terrestrial_Reference_System_1989', 25832],
    [151.2, -33.9, 'Geocentric_Datum_of_Australia_1994', 28356],
    [151.2, -33.9, 'Geocentric_Datum_of_Australia_2020', 7856],
    // Zones that the register does not have on this datum.
    [100, 31.4, 'North_American_Datum_1983', 32647],
    [-81.28, -31.4, 'North_American_Datum_1983', 32717],
    [-0.1, 51.5, 'Ordnance_Survey_of_Great_Britain_1936', 32630],
  ])('at %s°, %s° on %s is %s', (longitude, latitude, datum, epsg) => {
    expect(fittingUtm(longitude, latitude, datum)).toBe(epsg);
    expect(crsDefinition(epsg)).toMatchObject({ kind: 'projected', unit: 'metre' });
  });

  it('covers the place that was asked for', () => {
    for (let longitude = -177; longitude < 180; longitude += 6)
      for (const latitude of [-79, -10, 10, 50]) {
        const { use } = crsDefinition(fittingUtm(longitude, latitude));
        expect(use && use.west <= longitude && longitude <= use.east).toBe(true);
        expect(use && use.south <= latitude && latitude <= use.north).toBe(true);
      }
  });

  it('is refused beyond 84° N and 80° S', () => {
    expect(() => fittingUtm(0, 84.1)).toThrow(/between 80° S and 84° N/);
    expect(() => fittingUtm(0, -80.1)).toThrow(/polar/);
    expect(() => fittingUtm(NaN, 0)).toThrow(/UTM/);
  });
});
