import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Site } from '#contract/sites.ts';
import type { Upload, UploadChoices } from '#contract/uploads.ts';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { readRaster } from '#rasters/read/read-raster.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { binaryReply } from '#server/testing/binary-reply.ts';
import {
  cover,
  geoTiff,
  makeSite,
  sendUpload,
  smallGrid,
  storedFiles,
  uploadLayer,
} from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let other: TestTeam;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Tide team');
  other = await makeTeam(server, 'Others');
});
afterAll(() => server.close());

const sha256 = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');
const path = (id: string, rest = '') => `/api/teams/${team.teamId}/uploads/${id}${rest}`;
const settled = async ({ id }: Upload): Promise<Upload> => {
  await server.services.background.idle();
  return (await team.agents.modeller.get(path(id)).expect(200)).body as Upload;
};
const choose = (upload: Upload, choices: Partial<UploadChoices>) =>
  team.agents.modeller.put(path(upload.id, '/choices')).send({ ...upload.choices, ...choices });
const siteOf = async (id: string) => (await team.agents.modeller.get(`/api/sites/${id}`)).body as Site;

describe('a raster on the cells of the site', () => {
  it('becomes a layer by itself, byte for byte, when its part was said', async () => {
    const { modeller } = team.agents;
    const site = await makeSite(modeller, team.teamId);
    const file = geoTiff(Float32Array.from({ length: 24 }, (_, i) => i / 30));
    const sent = await sendUpload(modeller, team.teamId, file, {
      siteId: site.id,
      part: 'exposure',
      place: 'when-clear',
      fileName: 'waves.tif',
    });
    expect(['waiting', 'reading']).toContain(sent.state);
    const done = await settled(sent);
    expect(done).toMatchObject({ state: 'done', fileName: 'waves.tif', problem: null });
    const layer = (await siteOf(site.id)).layers.find(({ part }) => part === 'exposure')!;
    expect(layer).toMatchObject({
      id: done.layerId,
      hash: sha256(file),
      bytes: file.length,
      grid: smallGrid,
      source: {
        fileName: 'waves.tif',
        hash: sha256(file),
        uploadedBy: 'Tide team: modeller',
        epsg: 32631,
        band: 1,
        bands: 1,
      },
      alignment: { method: 'copy', reprojectedFrom: null, cropped: 0, padded: 0 },
      unit: 'share',
    });
    await modeller.delete(path(sent.id)).expect(204);
    await modeller.get(`/api/sites/${site.id}/layer-values/${layer.hash}`).expect(200);
  });

  it('waits to be asked otherwise, with a picture of it, and can be dismissed without a trace', async () => {
    const { modeller } = team.agents;
    const site = await makeSite(modeller, team.teamId);
    const before = storedFiles(server);
    const sent = await sendUpload(
      modeller,
      team.teamId,
      geoTiff(Float32Array.from({ length: 24 }, (_, i) => i / 40)),
      {
        siteId: site.id,
      },
    );
    const read = await settled(sent);
    expect(read).toMatchObject({
      state: 'choices',
      decisions: ['part'],
      facts: { minimum: 0, noDataShare: 0 },
      plan: { sameCells: true, method: 'copy' },
      outline: [
        [412_200, 5_301_900],
        [412_212, 5_301_900],
        [412_212, 5_301_892],
        [412_200, 5_301_892],
      ],
    });
    const { body } = await binaryReply(modeller.get(path(sent.id, '/thumbnail'))).expect(200);
    expect(decodeCellValues(body as Buffer)).toMatchObject({ width: 6, height: 4 });
    expect((await modeller.post(path(sent.id, '/place')).expect(400)).body.fields).toMatchObject([
      { field: 'part' },
    ]);
    const said = (await choose(read, { part: 'refuge' }).expect(200)).body as Upload;
    expect(said).toMatchObject({ state: 'choices', decisions: [] });
    const again = await settled(
      await sendUpload(modeller, team.teamId, cover(), { siteId: site.id, part: 'refuge' }),
    );
    expect(again).toMatchObject({ state: 'choices', decisions: [] });
    await modeller.delete(path(again.id)).expect(204);
    await modeller.delete(path(sent.id)).expect(204);
    expect(storedFiles(server)).toEqual(before);
  });

  it('is refused for a part that its values cannot play, and taken for another', async () => {
    const { modeller } = team.agents;
    const site = await makeSite(modeller, team.teamId);
    const heights = geoTiff(Float32Array.from({ length: 24 }, (_, i) => i / 4 - 1.5));
    const sent = await sendUpload(modeller, team.teamId, heights, {
      siteId: site.id,
      part: 'cover',
      place: 'when-clear',
    });
    const read = await settled(sent);
    expect(read).toMatchObject({
      state: 'choices',
      decisions: ['values'],
      problem: { code: 'raster-values' },
    });
    await modeller.post(path(sent.id, '/place')).expect(422);
    const vertical = { datum: 'NAVD88', unit: 'us-foot' } as const;
    const chosen = (await choose(read, { part: 'elevation', vertical, note: 'lidar' }).expect(200))
      .body as Upload;
    expect(chosen).toMatchObject({ decisions: [], problem: null });
    await modeller.post(path(sent.id, '/place')).expect(200);
    expect(await settled(sent)).toMatchObject({ state: 'done' });
    expect((await siteOf(site.id)).layers.find(({ part }) => part === 'elevation')).toMatchObject({
      minimum: -1.5,
      vertical,
      note: 'lidar',
    });
  });
});

describe('heights that seem to be in feet', () => {
  const inFeet = (unit: string) =>
    geoTiff(
      Float32Array.from({ length: 24 }, (_, i) => i / 4 - 1.5),
      { unit },
    );

  it('are asked about before they are placed, whatever was agreed to beforehand', async () => {
    const { modeller } = team.agents;
    const site = await makeSite(modeller, team.teamId);
    const sent = await sendUpload(modeller, team.teamId, inFeet('US survey foot'), {
      siteId: site.id,
      part: 'elevation',
      place: 'when-clear',
    });
    const read = await settled(sent);
    expect(read).toMatchObject({
      state: 'choices',
      decisions: ['heights'],
      heights: { unit: 'us-foot', because: 'its unit is “US survey foot”' },
    });
    expect((await modeller.post(path(sent.id, '/place')).expect(400)).body.fields).toMatchObject([
      { field: 'vertical' },
    ]);
    expect((await choose(read, { part: 'exposure' }).expect(200)).body.decisions).not.toContain('heights');
    const vertical = { datum: '', unit: 'foot' } as const;
    const said = (await choose(read, { vertical }).expect(200)).body as Upload;
    expect(said.decisions).toEqual([]);
    await modeller.post(path(sent.id, '/place')).expect(200);
    await settled(sent);
    expect((await siteOf(site.id)).layers.find(({ part }) => part === 'elevation')).toMatchObject({
      vertical,
    });
  });

  it('are not asked about in metres, and are refused where one call leaves no place to say it', async () => {
    const { modeller } = team.agents;
    const site = await makeSite(modeller, team.teamId);
    const sent = await sendUpload(modeller, team.teamId, inFeet('m'), {
      siteId: site.id,
      part: 'elevation',
      place: 'when-clear',
    });
    expect(await settled(sent)).toMatchObject({ state: 'done' });
    const before = storedFiles(server);
    const { body } = await uploadLayer(modeller, site.id, 'elevation', inFeet('ft')).expect(400);
    expect(body.fields).toMatchObject([
      { field: 'file', message: expect.stringContaining('seem to be in feet') as string },
    ]);
    await expect.poll(() => storedFiles(server)).toEqual(before);
  });
});

describe('a raster on other cells', () => {
  it('is described with what will be done and lost, then aligned and written as a raster of its own', async () => {
    const { modeller } = team.agents;
    const site = await makeSite(modeller, team.teamId);
    // Cells of 1 m, the western four metres of the site and four more beyond it.
    const grid = { ...smallGrid, cellSize: 1, originX: smallGrid.originX - 4, width: 8, height: 8 };
    const file = geoTiff(
      Float32Array.from({ length: 64 }, (_, i) => (i % 8) / 10),
      { grid },
    );
    const sent = await sendUpload(modeller, team.teamId, file, {
      siteId: site.id,
      part: 'refuge',
      place: 'when-clear',
    });
    const read = await settled(sent);
    expect(read).toMatchObject({
      state: 'choices',
      decisions: ['resampling', 'crop', 'pad'],
      plan: { method: 'area-weighted', cropped: { cells: 32, share: 0.5 }, padded: { cells: 16 } },
    });
    expect((await choose(read, { method: 'majority' }).expect(400)).body.fields).toMatchObject([
      { field: 'method' },
    ]);
    await modeller.post(path(sent.id, '/place')).expect(200);
    expect(await settled(sent)).toMatchObject({ state: 'done' });
    const layer = (await siteOf(site.id)).layers.find(({ part }) => part === 'refuge')!;
    expect(layer).toMatchObject({
      grid: smallGrid,
      noDataShare: 16 / 24,
      alignment: { method: 'area-weighted', cropped: 32, padded: 16 },
      source: { hash: sha256(file), width: 8, cellWidth: 1 },
    });
    expect(layer.hash).not.toBe(sha256(file));
    // What a run stands on is a GeoTIFF on the site's cells: columns 4 and 5 of the file, then 6 and 7, averaged.
    const { body } = await binaryReply(
      modeller.get(`/api/sites/${site.id}/layer-files/${layer.hash}`),
    ).expect(200);
    expect(sha256(body as Buffer)).toBe(layer.hash);
    const raster = await readRaster(body as Buffer);
    expect(raster.grid).toEqual(smallGrid);
    [0.45, 0.65].forEach((value, i) => expect(raster.values[i]).toBeCloseTo(value, 6));
    expect(raster.values[2]).toBeNaN();
    const source = await binaryReply(
      modeller.get(`/api/sites/${site.id}/layer-files/${sha256(file)}`),
    ).expect(200);
    expect(Buffer.compare(source.body as Buffer, file)).toBe(0);
  });

  it('that lies elsewhere says so and cannot be placed', async () => {
    const { modeller } = team.agents;
    const site = await makeSite(modeller, team.teamId);
    const file = geoTiff(new Float32Array(24).fill(0.5), { grid: { ...smallGrid, originX: 500_000 } });
    const read = await settled(
      await sendUpload(modeller, team.teamId, file, { siteId: site.id, part: 'cover' }),
    );
    expect(read).toMatchObject({ state: 'choices', plan: null, problem: { code: 'raster-elsewhere' } });
    expect((await modeller.post(path(read.id, '/place')).expect(422)).body.code).toBe('raster-elsewhere');
  });
});

describe('a first raster', () => {
  it('makes a site on the grid that it leads to, or on another that was chosen', async () => {
    const { modeller } = team.agents;
    const sent = await sendUpload(modeller, team.teamId, cover(), { part: 'cover' });
    const read = await settled(sent);
    expect(read).toMatchObject({
      siteId: null,
      state: 'choices',
      suggestedGrid: { grid: smallGrid, asInFile: true },
    });
    await modeller.post(path(sent.id, '/place')).expect(409);
    const coarse = (await choose(read, { grid: { epsg: 32631, cellSize: 4 } }).expect(200)).body as Upload;
    expect(coarse).toMatchObject({ plan: { method: 'area-weighted' }, decisions: ['resampling'] });
    const site = (await modeller.post(path(sent.id, '/site')).send({ name: 'New marsh' }).expect(200))
      .body as Site;
    expect(site).toMatchObject({
      name: 'New marsh',
      layers: [],
      options: 1,
      grid: { cellSize: 4, width: 3, height: 2 },
    });
    expect(await settled(sent)).toMatchObject({ state: 'done', siteId: site.id });
    expect((await siteOf(site.id)).layers).toMatchObject([{ part: 'cover', grid: { cellSize: 4 } }]);
    await modeller.post(path(sent.id, '/site')).send({ name: 'Again' }).expect(409);
  });
});

describe('uploads', () => {
  it('that are no rasters are refused with the reason, until they are dismissed', async () => {
    const { modeller } = team.agents;
    const site = await makeSite(modeller, team.teamId);
    const sent = await sendUpload(modeller, team.teamId, Buffer.from('no raster at all, but long enough'), {
      siteId: site.id,
    });
    const refused = await settled(sent);
    expect(refused).toMatchObject({ state: 'refused', problem: { code: 'not-a-geotiff' } });
    for (const said of ['found', 'expected', 'remedy'] as const)
      expect(refused.problem?.[said]).toMatch(/\w{3}/);
    await modeller.post(path(sent.id, '/retry')).expect(409);
    await modeller.delete(path(sent.id)).expect(204);
    const { body } = await modeller.get(`/api/teams/${team.teamId}/uploads?siteId=${site.id}`).expect(200);
    expect(body.uploads).toEqual([]);
  });

  it('belong to their team, and to a site of it', async () => {
    const { modeller } = team.agents;
    const site = await makeSite(modeller, team.teamId);
    const sent = await settled(
      await sendUpload(modeller, team.teamId, cover(), { siteId: site.id, part: 'cover' }),
    );
    const foreign = other.agents.modeller;
    await foreign.get(path(sent.id)).expect(404);
    await foreign.get(`/api/teams/${other.teamId}/uploads/${sent.id}`).expect(404);
    await foreign.post(`/api/teams/${other.teamId}/uploads/${sent.id}/place`).expect(404);
    await foreign.get(`/api/teams/${other.teamId}/uploads?siteId=${site.id}`).expect(404);
    const before = storedFiles(server);
    await foreign
      .post(`/api/teams/${other.teamId}/uploads`)
      .field('siteId', site.id)
      .attach('file', geoTiff(new Float32Array(24).fill(0.1)), 'x.tif')
      .expect(404);
    await expect.poll(() => storedFiles(server)).toEqual(before);
  });
});
