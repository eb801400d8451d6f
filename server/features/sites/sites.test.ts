import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Site } from '#contract/sites.ts';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { binaryReply } from '#server/testing/binary-reply.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import {
  classes,
  cover,
  geoTiff,
  habitat,
  makeSite,
  smallGrid,
  storedFiles,
  uploadLayer,
  uploadSite,
} from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');
const siteOf = (reply: { body: unknown }) => reply.body as Site;

beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Marsh team');
});
afterAll(() => server.close());

describe('a site made from a GeoTIFF', () => {
  it('takes its grid from the raster and starts with Wait, a default plant and a default outlook', async () => {
    const { modeller } = team.agents;
    const site = siteOf(await uploadSite(modeller, team.teamId, 'habitat', habitat()).expect(200));
    expect(site).toMatchObject({
      teamId: team.teamId,
      name: 'Trial Marsh',
      invented: false,
      grid: smallGrid,
      crsName: 'WGS 84 / UTM zone 31N',
      parts: ['habitat'],
      options: 1,
      runs: 0,
      plantSet: false,
      plant: { rates: defaultRates },
      outlookSet: false,
      outlook: { surveyYear: new Date().getUTCFullYear(), years: 34, stepsPerYear: 1 },
    });
    expect(site.layers).toMatchObject([
      {
        part: 'habitat',
        source: { fileName: 'habitat.tif', uploadedBy: 'Marsh team: modeller' },
        hash: sha256(habitat()),
        bytes: habitat().length,
        dataType: 'uint8',
        noData: 0,
        noDataShare: 1 / 24,
        minimum: 1,
        maximum: 2,
        classCounts: [
          { value: 1, cells: 12 },
          { value: 2, cells: 11 },
        ],
        classes: null,
      },
    ]);
    const { body } = await modeller.get(`/api/sites/${site.id}/options`).expect(200);
    expect(body.options).toMatchObject([{ name: 'Wait', wait: true, works: [] }]);
    const list = await team.agents.trainer.get(`/api/teams/${team.teamId}/sites`).expect(200);
    expect(list.body.sites).toContainEqual(expect.objectContaining({ id: site.id, parts: ['habitat'] }));
  });

  it('can be renamed, given a plant and an outlook, and read again', async () => {
    const { modeller } = team.agents;
    const { id } = await makeSite(modeller, team.teamId);
    await modeller.patch(`/api/sites/${id}`).send({ name: 'Renamed' }).expect(200);
    const plant = { name: 'Cord grass', rates: { ...defaultRates, lateralSpread: 0.7 } };
    await modeller.put(`/api/sites/${id}/plant`).send(plant).expect(200);
    const outlook = {
      surveyYear: 2024,
      years: 3,
      stepsPerYear: 1,
      boundary: 'mirror',
      droughtIndex: [0, -3, 1.5],
    };
    await modeller.put(`/api/sites/${id}/outlook`).send(outlook).expect(200);
    const site = siteOf(await modeller.get(`/api/sites/${id}`).expect(200));
    expect(site).toMatchObject({ name: 'Renamed', plant, plantSet: true, outlook, outlookSet: true });
  });

  it('names the rate or the year that is wrong', async () => {
    const { modeller } = team.agents;
    const { id, outlook, plant } = await makeSite(modeller, team.teamId);
    const wrong = { ...plant, rates: { ...plant.rates, lateralSpread: -1 } };
    const reply = await modeller.put(`/api/sites/${id}/plant`).send(wrong).expect(400);
    expect(reply.body.fields).toMatchObject([{ field: 'rates.lateralSpread' }]);
    const short = { ...outlook, droughtIndex: [0] };
    const refused = await modeller.put(`/api/sites/${id}/outlook`).send(short).expect(400);
    expect(refused.body.fields).toMatchObject([{ field: 'droughtIndex' }]);
  });
});

describe('layers', () => {
  it('come back decoded, by the hash of the file, for good', async () => {
    const { modeller, trainer } = team.agents;
    const { id } = await makeSite(modeller, team.teamId);
    const path = `/api/sites/${id}/layer-values/${sha256(cover())}`;
    const reply = await binaryReply(trainer.get(path)).expect(200);
    expect(decodeCellValues(reply.body as Buffer)).toEqual({
      width: 6,
      height: 4,
      values: Float32Array.from({ length: 24 }, (_, i) => i / 25),
    });
    expect(reply.headers['cache-control']).toBe('private, max-age=31536000, immutable');
    await trainer.get(path).set('If-None-Match', reply.headers.etag).expect(304);
    await trainer.get(`/api/sites/${id}/layer-values/${'0'.repeat(64)}`).expect(404);
  });

  it('can be read in another unit only where their values allow it', async () => {
    const { modeller } = team.agents;
    const { id } = await makeSite(modeller, team.teamId);
    const percent = geoTiff(Uint8Array.from({ length: 24 }, (_, i) => i * 4));
    const site = siteOf(await uploadLayer(modeller, id, 'refuge', percent).expect(200));
    const layer = site.layers.find((l) => l.part === 'refuge')!;
    expect(layer.unit).toBe('percent');
    const path = `/api/sites/${id}/layers/${layer.id}`;
    expect(siteOf(await modeller.patch(path).send({ unit: 'byte' }).expect(200)).layers).toContainEqual(
      expect.objectContaining({ part: 'refuge', unit: 'byte' }),
    );
    const refused = await modeller.patch(path).send({ unit: 'share' }).expect(400);
    expect(refused.body.fields[0]).toMatchObject({
      field: 'unit',
      message: expect.stringContaining('from 0 to 92'),
    });
    const habitatLayer = site.layers.find((l) => l.part === 'habitat')!;
    await modeller.patch(`/api/sites/${id}/layers/${habitatLayer.id}`).send({ unit: 'byte' }).expect(400);
  });

  it('take a class table with a row for every class, on habitat alone', async () => {
    const { modeller } = team.agents;
    const { id, layers } = await makeSite(modeller, team.teamId);
    expect(layers.find((l) => l.part === 'habitat')?.classes).toEqual(classes);
    const put = (part: string, rows: unknown) =>
      modeller
        .put(`/api/sites/${id}/layers/${layers.find((l) => l.part === part)!.id}/classes`)
        .send({ classes: rows });
    expect((await put('habitat', classes.slice(0, 1)).expect(400)).body.fields).toEqual([
      { field: 'classes', message: 'Without a row: class 2 (11 cells)' },
    ]);
    expect((await put('habitat', [...classes, classes[0]]).expect(400)).body.fields).toMatchObject([
      { field: 'classes' },
    ]);
    expect(
      (await put('habitat', [{ ...classes[0], capacity: 1.5 }, classes[1]]).expect(400)).body.fields,
    ).toMatchObject([{ field: 'classes.0.capacity' }]);
    await put('cover', classes).expect(400);
  });

  it('are replaced part by part, and one that is taken out of the history leaves no file behind', async () => {
    const { modeller } = team.agents;
    const { id } = await makeSite(modeller, team.teamId);
    const other = geoTiff(Float32Array.from({ length: 24 }, (_, i) => (i * 7) / 1000));
    const before = siteOf(await uploadLayer(modeller, id, 'refuge', other).expect(200));
    const newest = geoTiff(Float32Array.from({ length: 24 }, (_, i) => (i * 3) / 1000));
    const after = siteOf(await uploadLayer(modeller, id, 'refuge', newest).expect(200));
    expect(after.layers.map((l) => l.part)).toEqual(before.layers.map((l) => l.part));
    expect(after.layers.find((l) => l.part === 'refuge')?.hash).toBe(sha256(newest));
    const idOf = (of: Site) => of.layers.find((l) => l.part === 'refuge')!.id;
    const remove = (layerId: string) => modeller.delete(`/api/sites/${id}/layers/${layerId}`).expect(200);
    await modeller.get(`/api/sites/${id}/layer-values/${sha256(other)}`).expect(200);
    await remove(idOf(before));
    expect(storedFiles(server).blobs).not.toContain(sha256(other));
    await modeller.get(`/api/sites/${id}/layer-values/${sha256(other)}`).expect(404);
    expect(siteOf(await remove(idOf(after))).parts).not.toContain('refuge');
    expect(storedFiles(server).blobs).toContain(sha256(newest));
    await remove(idOf(after));
    expect(storedFiles(server).blobs).not.toContain(sha256(newest));
  });

  it('share a file with another site without losing it', async () => {
    const { modeller } = team.agents;
    const shared = geoTiff(Uint8Array.from({ length: 24 }, (_, i) => i % 3));
    const [one, two] = [
      siteOf(await uploadSite(modeller, team.teamId, 'habitat', shared)),
      siteOf(await uploadSite(modeller, team.teamId, 'habitat', shared)),
    ];
    await modeller.delete(`/api/sites/${one.id}`).expect(204);
    await modeller.get(`/api/sites/${one.id}`).expect(404);
    await modeller.get(`/api/sites/${two.id}/layer-values/${sha256(shared)}`).expect(200);
    await modeller.delete(`/api/sites/${two.id}`).expect(204);
    expect(storedFiles(server).blobs).not.toContain(sha256(shared));
  });
});

it('a deleted site leaves neither file nor row behind', async () => {
  const alone = await testServer();
  const { agents, teamId } = await makeTeam(alone);
  const { id } = await makeSite(agents.modeller, teamId);
  expect(storedFiles(alone).blobs).toHaveLength(4);
  await agents.modeller.delete(`/api/sites/${id}`).expect(204);
  expect(storedFiles(alone)).toEqual({ arrivals: [], blobs: [] });
  for (const table of ['site', 'layer', 'option'])
    expect(await alone.services.dataSource.query(`SELECT * FROM "${table}"`)).toEqual([]);
  await alone.close();
});
