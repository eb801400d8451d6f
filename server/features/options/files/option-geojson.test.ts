import { fileURLToPath } from 'node:url';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { z } from 'zod';
import type { Work, WorkSet } from '#contract/works.ts';
import { optionGeoJsonSchema } from './geojson-format.ts';
import { readGeoJson } from './read-geojson.ts';
import { optionGeoJson } from './write-geojson.ts';

const site = { width: 600, height: 400, cellSize: 2, originX: 412_200, originY: 5_301_900, epsg: 32631 };
const sets: WorkSet[] = [{ id: 's1', laid: { pattern: 'scattered', seed: 'x', parameters: { count: 2 } } }];
const ring: [number, number][] = [[412_300, 5_301_800], [412_320.5, 5_301_800], [412_310, 5_301_820.125]]; // prettier-ignore
const works: Work[] = [
  { id: 'a', kind: 'mound', year: 2027, x: 412_203.123, y: 5_301_890.456, radius: 1.5, strength: 0.8, halo: 1, name: 'North', set: 's1' },
  { id: 'b', kind: 'planting', year: 2028, area: { shape: 'polygon', ring }, cover: 0.4 },
  { id: 'c', kind: 'clumps', year: 2027, points: [[412_400, 5_301_700], [412_401.001, 5_301_700]], each: 6 },
  { id: 'd', kind: 'fence', year: 2027, until: 2030, area: { shape: 'disc', x: 412_500, y: 5_301_600, radius: 12 }, strength: 1 },
  { id: 'e', kind: 'loss', year: 2029, area: { shape: 'polygon', ring }, share: 0.25 },
]; // prettier-ignore
const option = { name: 'Both banks', note: 'Ask first.', works, sets };
const read = (file: unknown) => readGeoJson(JSON.stringify(file), site, 2027);
const collection = (...features: unknown[]) => ({ type: 'FeatureCollection', features });
const feature = (geometry: object, properties: object = {}) => ({ type: 'Feature', geometry, properties });
/** Longitude and latitude on the site. */
const [lon, lat] = (() => {
  const [first] = optionGeoJson(option, site.epsg, 'wgs84').features;
  return first.geometry.coordinates as [number, number];
})();

describe('an option as GeoJSON', () => {
  it.each(['wgs84', 'site'] as const)('comes back as it was: %s', (crs) => {
    const file = optionGeoJson(option, site.epsg, crs);
    const { found, name, note, sets: back } = read(file);
    expect([name, note, back]).toEqual(['Both banks', 'Ask first.', sets]);
    expect(found.works).toEqual(works);
    expect([found.problems, [...found.assumed]]).toEqual([[], []]);
  });

  it('comes back to the millimetre from anywhere on a site, by degrees', () => {
    const millimetres = (from: number, to: number) => fc.integer({ min: from * 1000, max: to * 1000 - 1 });
    fc.assert(
      fc.property(millimetres(412_200, 413_400), millimetres(5_301_101, 5_301_900), (x, y) => {
        const mound: Work = { ...(works[0] as Extract<Work, { kind: 'mound' }>), x: x / 1000, y: y / 1000 };
        const { found } = read(optionGeoJson({ ...option, works: [mound] }, site.epsg, 'wgs84'));
        expect(found.works).toEqual([mound]);
      }),
      { numRuns: 200 },
    );
  });

  it('has its places where they are', () => {
    // The false easting of a UTM zone, 500 000 m, is its central meridian (EPSG Guidance Note 7-2): 3° east for zone 31.
    const grid = { ...site, originX: 499_900 };
    const mound = { ...works[0], x: 500_000 } as Work;
    const [at] = optionGeoJson({ ...option, works: [mound] }, grid.epsg, 'wgs84').features;
    expect(at.geometry.coordinates[0]).toBe(3);
    expect(at.geometry.coordinates[1]).toBeCloseTo(47.87, 1);
  });

  it('keeps to RFC 7946 and to its own schema: outlines closed and anticlockwise', () => {
    const clockwise = { ...works[1], area: { shape: 'polygon', ring: [ring[0], ring[2], ring[1]] } } as Work;
    const file = optionGeoJson({ ...option, works: [...works.slice(2), clockwise] }, site.epsg, 'site');
    expect(optionGeoJsonSchema.parse(file)).toEqual(file);
    expect(file.features.at(-1)!.geometry).toEqual({ type: 'Polygon', coordinates: [[...ring, ring[0]]] });
    expect(optionGeoJson(option, site.epsg, 'wgs84')).not.toHaveProperty('crs');
  });

  it('keeps holes, clockwise as RFC 7946 has them', () => {
    const [x, y] = ring[0];
    const hole: [number, number][] = [
      [x + 0.5, y + 0.5],
      [x + 1, y + 0.5],
      [x + 1, y + 1],
    ];
    const holed = { ...works[1], area: { shape: 'polygon', ring, holes: [hole] } } as Work;
    const file = optionGeoJson({ ...option, works: [...works.slice(2), holed] }, site.epsg, 'site');
    expect(optionGeoJsonSchema.parse(file)).toEqual(file);
    const [, inner] = file.features.at(-1)!.geometry.coordinates as [number, number][][];
    expect(inner).toEqual([hole[0], hole[2], hole[1], hole[0]]);
    const [back] = read(file).found.works.filter(({ id }) => id === holed.id);
    expect(back).toMatchObject({ area: { holes: [[hole[0], hole[2], hole[1]]] } });
  });

  it('is told to others by docs/option-geojson.schema.json; vitest --update writes it anew', async () => {
    const schema = z.toJSONSchema(optionGeoJsonSchema, { io: 'input' });
    const file = fileURLToPath(new URL('../../../../docs/option-geojson.schema.json', import.meta.url));
    await expect(`${JSON.stringify(schema, null, 2)}\n`).toMatchFileSnapshot(file);
  });
});

describe('GeoJSON of others', () => {
  it('may hold bare points: mounds of the usual size, in the first year', () => {
    const { found, crsName } = read(collection(feature({ type: 'Point', coordinates: [lon, lat, 3.5] })));
    expect(found.works).toMatchObject([
      { kind: 'mound', x: 412_203.123, y: 5_301_890.456, radius: 1.5, strength: 1, halo: 0, year: 2027 },
    ]);
    expect([...found.assumed.keys()]).toEqual([
      'the year 2027',
      'a radius of 1.5 m',
      'full strength',
      'no halo',
    ]);
    expect(crsName).toBe('WGS 84, EPSG:4326');
  });

  it('may hold several outlines in one feature: as many works, of which the first keeps the id', () => {
    const triangle = (x: number) => [[x, 5_301_895], [x + 3, 5_301_895], [x, 5_301_898], [x, 5_301_895]]; // prettier-ignore
    const file = {
      ...collection({
        id: 'west',
        ...feature(
          { type: 'MultiPolygon', coordinates: [[triangle(412_201)], [triangle(412_206)]] },
          { kind: 'planting', cover: 0.5, year: 2028 },
        ),
      }),
      crs: { type: 'name', properties: { name: `urn:ogc:def:crs:EPSG::${site.epsg}` } },
    };
    const { found } = read(file);
    expect(found.problems).toEqual([]);
    expect(found.works).toMatchObject([
      { kind: 'planting', cover: 0.5, area: { ring: triangle(412_201).slice(0, 3) } },
      { kind: 'planting', cover: 0.5, area: { ring: triangle(412_206).slice(0, 3) } },
    ]);
    expect(new Set(found.works.map(({ id }) => id)).size).toBe(2);
  });

  it.each([
    [feature({ type: 'LineString', coordinates: [[lon, lat]] }), /Found the geometry LineString/],
    [feature({ type: 'Polygon', coordinates: [[[lon, lat]]] }), /needs a property `kind`/],
    [feature({ type: 'Polygon', coordinates: [[[lon, lat]], []] }, { kind: 'fence' }), /area\.ring/],
    [feature({ type: 'Polygon', coordinates: [] }, { kind: 'fence' }), /no outline/],
    [feature({ type: 'Point', coordinates: ['3', lat] }), /needs two numbers/],
    [feature({ type: 'Point', coordinates: [lon + 1, lat] }), /Easting .* lies off the site; expected 412200 to/],
    [feature({ type: 'Point', coordinates: [lon, lat] }, { kind: 'dam' }), /kind/],
    [feature({ type: 'Point', coordinates: [lon, lat] }, { radius: -1 }), /radius/],
    [feature({ type: 'Point', coordinates: [lon, lat] }, { depth: 1 }), /depth: There is no such field/],
    [feature({ type: 'Polygon', coordinates: [[[0, 0], [1, 0], [0, 1], [0, 0]]] }, { kind: 'loss', share: 1 }), /This loss lies off the site/],
    [{ type: 'Feature', geometry: null }, /no geometry/],
    ['nonsense', /object/],
  ])('is refused feature by feature, and the others are kept', (bad, message) => {
    const { found } = read(collection(bad, feature({ type: 'Point', coordinates: [lon, lat] })));
    expect(found.works).toHaveLength(1);
    expect(found.problems).toHaveLength(1);
    expect(found.problems[0]).toMatchObject({ row: 1, message: expect.stringMatching(message) as string });
  }); // prettier-ignore

  it('gets ids of its own where they are missing, taken or unfit', () => {
    const point = feature({ type: 'Point', coordinates: [lon, lat] }, { set: 'not there' });
    const ids = [undefined, 'a', 'a', 7, 'too long to be an id of ours'];
    const { found } = read(collection(...ids.map((id) => ({ ...point, id }))));
    expect(found.works).toHaveLength(5);
    expect(found.works[1].id).toBe('a');
    expect(new Set(found.works.map((work) => work.id)).size).toBe(5);
    expect(found.works.every((work) => work.set === undefined)).toBe(true);
  });

  it('may name another CRS by its member of old', () => {
    const crs = (name: unknown) => ({ ...collection(), crs: { type: 'name', properties: { name } } });
    expect(read(crs('urn:ogc:def:crs:OGC:1.3:CRS84')).crsName).toBe('WGS 84, EPSG:4326');
    expect(read(crs('EPSG:32630')).crsName).toBe('WGS 84 / UTM zone 30N, EPSG:32630');
    expect(() => read(crs('local grid'))).toThrow(
      /names “local grid”; expected one such as urn:ogc:def:crs:EPSG::32631/,
    );
    expect(() => read(crs('EPSG:999999'))).toThrow(/EPSG:999999/);
  });

  it.each([
    ['{', /no JSON/],
    ['{"type":"Feature"}', /Expected a FeatureCollection/],
    ['{"type":"FeatureCollection"}', /list of features/],
  ])('is refused as a whole when it is none: %s', (content, message) => {
    expect(() => readGeoJson(content, site, 2027)).toThrow(message);
  });
});
