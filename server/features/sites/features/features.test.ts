import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { FeatureImportReply } from '#contract/features.ts';
import { layerSources } from '#contract/layer-sources.ts';
import type { Site } from '#contract/sites.ts';
import { sourceBytes } from '#sim-core/grid/build-ground.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { makeSite, storedFiles } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server);
  site = await makeSite(team.agents.modeller, team.teamId);
});
afterAll(() => server.close());

const send = (content: string, fields: Record<string, string>, fileName = 'places.txt') => {
  const request = team.agents.modeller.post(`/api/sites/${site.id}/feature-imports`);
  for (const [name, value] of Object.entries(fields)) void request.field(name, value);
  return request.attach('file', Buffer.from(content), fileName);
};
const replyOf = ({ body }: { body: unknown }) => body as FeatureImportReply;
const featuresNow = async () =>
  ((await team.agents.trainer.get(`/api/sites/${site.id}`).expect(200)).body as Site).features;

describe('points from a table', () => {
  const table =
    'Name;Easting;Northing;radius (m);strength\r\nReef;412203,5;5301895;1,5;0,8\r\nFar;500000;5301895;;\r\nOdd;412204;5301896;2;1,2\r\n';

  it('are shown first, each that cannot be taken with its reason, and nothing is stored', async () => {
    const before = storedFiles(server);
    const reply = replyOf(await send(table, { kind: 'refuge', halo: '3' }).expect(200));
    expect(reply).toMatchObject({
      good: 1,
      bad: 2,
      importId: null,
      crsName: expect.stringContaining('EPSG:32631') as string,
    });
    expect(reply.features).toEqual([
      {
        row: 2,
        kind: 'refuge',
        name: 'Reef',
        shape: { shape: 'disc', x: 412_203.5, y: 5_301_895, radius: 1.5 },
        strength: 0.8,
        halo: 3,
      },
    ]);
    expect(reply.problems.map(({ row }) => row)).toEqual([3, 4]);
    expect(reply.problems[0].message).toContain('x 412200 to 412212, y 5301892 to 5301900');
    expect(reply.problems[1].message).toContain('Found strength 1.2; expected a number from 0 to 1');
    expect(await featuresNow()).toEqual([]);
    await expect.poll(() => storedFiles(server)).toEqual(before);
  });

  it('are taken all or not at all, unless only the good ones are asked for', async () => {
    const { modeller } = team.agents;
    const refused = await send(table, { kind: 'refuge', take: 'all' }).expect(400);
    expect(refused.body.fields.map(({ field }: { field: string }) => field)).toEqual(['rows.3', 'rows.4']);
    expect(await featuresNow()).toEqual([]);
    const { importId } = replyOf(
      await send(table, { kind: 'refuge', take: 'good' }, 'reefs.csv').expect(200),
    );
    const [reef] = await featuresNow();
    expect(reef).toMatchObject({
      name: 'Reef',
      halo: 0,
      source: { importId, row: 2, fileName: 'reefs.csv', importedBy: 'A team: modeller' },
    });
    const at = `/api/sites/${site.id}/features/${reef.id}`;
    await modeller.patch(at).send({ radius: 4, halo: 2, name: 'North reef' }).expect(200);
    expect(await featuresNow()).toMatchObject([
      { name: 'North reef', shape: { radius: 4, x: 412_203.5 }, halo: 2, strength: 0.8 },
    ]);
    expect((await modeller.patch(at).send({ radius: null }).expect(400)).body.fields).toMatchObject([
      { field: 'radius' },
    ]);
    const other = await makeSite(modeller, team.teamId);
    await modeller.delete(`/api/sites/${other.id}/features/${reef.id}`).expect(404);
    await modeller.delete(`/api/sites/${other.id}/feature-imports/${importId}`).expect(404);
    await modeller.delete(at).expect(200);
    expect(await featuresNow()).toEqual([]);
    await modeller.delete(`/api/sites/${site.id}/feature-imports/${importId}`).expect(200);
  });
});

describe('areas from GeoJSON', () => {
  const polygon = (ring: number[][], properties = {}) => ({
    type: 'Feature',
    properties,
    geometry: { type: 'Polygon', coordinates: [ring] },
  });
  const collection = (features: object[], crs?: string) =>
    JSON.stringify({
      type: 'FeatureCollection',
      ...(crs && { crs: { type: 'name', properties: { name: crs } } }),
      features,
    });

  it('in the CRS that an old file names, or in degrees, come to lie on the site', async () => {
    const ring = [
      [412_202, 5_301_894],
      [412_206, 5_301_894],
      [412_206, 5_301_898],
      [412_202, 5_301_894],
    ];
    const named = collection(
      [polygon(ring, { name: 'South paddock', strength: 0.5 })],
      'urn:ogc:def:crs:EPSG::32631',
    );
    const kept = replyOf(await send(named, { kind: 'fence', take: 'all' }).expect(200));
    expect(kept).toMatchObject({
      good: 1,
      bad: 0,
      features: [
        { name: 'South paddock', strength: 0.5, shape: { shape: 'polygon', ring: ring.slice(0, 3) } },
      ],
    });
    // 412203 m E, 5301896 m N of EPSG:32631 by GDAL 3.6: gdaltransform -s_srs EPSG:32631 -t_srs EPSG:4326
    const degrees = collection([
      {
        type: 'Feature',
        properties: null,
        geometry: { type: 'Point', coordinates: [1.826_090_429_655_94, 47.864_399_614_594_1] },
      },
      {
        type: 'Feature',
        properties: { radius: 'wide' },
        geometry: { type: 'Point', coordinates: [1.826_090_429_655_94, 47.864_399_614_594_1] },
      },
      {
        type: 'Feature',
        properties: {},
        geometry: {
          type: 'LineString',
          coordinates: [
            [0, 0],
            [1, 1],
          ],
        },
      },
    ]);
    const reply = replyOf(await send(degrees, { kind: 'allowed', radius: '1.5' }).expect(200));
    expect(reply).toMatchObject({
      good: 1,
      bad: 2,
      features: [{ kind: 'allowed', strength: 1, shape: { shape: 'disc', radius: 1.5 } }],
    });
    const { x, y } = reply.features[0].shape as { x: number; y: number };
    expect(x).toBeCloseTo(412_203, 2);
    expect(y).toBeCloseTo(5_301_896, 2);
    expect(reply.problems.map(({ message }) => message).join(' ')).toMatch(/radius "wide".*LineString/);
    await team.agents.modeller.delete(`/api/sites/${site.id}/feature-imports/${kept.importId}`).expect(200);
  });

  it('may have holes, and several outlines in one feature: as many areas of one row, as large as they are', async () => {
    const box = (west: number, south: number, east: number, north: number) => [
      [west, south],
      [east, south],
      [east, north],
      [west, north],
      [west, south],
    ];
    const [x, y] = [412_200, 5_301_892];
    const file = collection(
      [
        {
          type: 'Feature',
          properties: { name: 'Pans' },
          geometry: {
            type: 'MultiPolygon',
            coordinates: [
              [box(x, y, x + 6, y + 6), box(x + 1, y + 1, x + 4, y + 3)],
              [box(x + 8, y + 1, x + 11, y + 4)],
            ],
          },
        },
        {
          type: 'Feature',
          properties: {},
          geometry: { type: 'Polygon', coordinates: [box(x, y, x + 6, y + 6), [[x, y]]] },
        },
      ],
      'EPSG:32631',
    );
    const reply = replyOf(await send(file, { kind: 'refuge', take: 'good' }).expect(200));
    expect(reply).toMatchObject({ good: 2, bad: 1, problems: [{ row: 2 }] });
    expect(reply.problems[0].message).toContain('Found 1 corners');
    const features = await featuresNow();
    expect(features.map(({ name, source, edges }) => [name, source.row, edges])).toEqual([
      ['Pans', 1, 'shared'],
      ['Pans', 1, 'shared'],
    ]);
    const now = (await team.agents.trainer.get(`/api/sites/${site.id}`).expect(200)).body as Site;
    const refuge = sourceBytes(layerSources(now).refuge, now.grid, () => {
      throw new Error('no raster');
    });
    const squareMetres = refuge.reduce((sum, byte) => sum + (byte / 255) * 4, 0);
    // 36 − 6 and 9 m², each cell held to 1/255.
    expect(Math.abs(squareMetres - 39)).toBeLessThan(0.2);
    await team.agents.modeller.delete(`/api/sites/${site.id}/feature-imports/${reply.importId}`).expect(200);
  });

  it('that are no such file are refused at the file', async () => {
    for (const content of ['{"type":', '{"type":"Topology"}', 'a,b\n1,2\n', '']) {
      const { body } = await send(content, { kind: 'fence', take: 'all' }).expect(400);
      expect(body.fields).toMatchObject([{ field: 'file' }]);
    }
    await send('x,y\n', { kind: 'roof' }).expect(400);
  });

  it('are no more than a site may hold', async () => {
    const corners = (n: number) =>
      Array.from({ length: n }, (_, i) => [
        412_206 + Math.cos((6.28 * i) / n),
        5_301_896 + Math.sin((6.28 * i) / n),
      ]);
    const three = collection(
      [9_000, 9_000, 9_000].map((n) => polygon(corners(n))),
      'EPSG:32631',
    );
    expect((await send(three, { kind: 'allowed', take: 'all' }).expect(400)).body.fields).toMatchObject([
      { field: 'file', message: expect.stringContaining('3 features with 27000 corners') as string },
    ]);
    expect(await featuresNow()).toEqual([]);
  });
});
