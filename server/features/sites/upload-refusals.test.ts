import { execFileSync } from 'node:child_process';
import { request as httpRequest } from 'node:http';
import { readFileSync } from 'node:fs';
import type { AddressInfo } from 'node:net';
import { join } from 'node:path';
import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { Problem } from '#contract/problem.ts';
import { makeTeam, testPassword, type TestTeam } from '#server/testing/people.ts';
import {
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
let siteId: string;
let before: Awaited<ReturnType<typeof everything>>;

/** All files and all rows that an upload could leave behind. */
const everything = async () => ({
  ...storedFiles(server),
  sites: await server.services.dataSource.query(`SELECT "id" FROM "site"`),
  layers: await server.services.dataSource.query(`SELECT "id", "hash", "replacedAt" FROM "layer"`),
  options: await server.services.dataSource.query(`SELECT "id" FROM "option"`),
});

beforeAll(async () => {
  server = await testServer({ uploadLimitBytes: 200_000 });
  team = await makeTeam(server);
  siteId = (await makeSite(team.agents.modeller, team.teamId)).id;
});
beforeEach(async () => {
  before = await everything();
});
afterAll(() => server.close());

/** Sends a file both ways and expects the same refusal, in three parts, with nothing left behind. */
async function refused(file: Buffer, code: string, part: 'cover' | 'habitat' = 'cover'): Promise<Problem> {
  const { modeller } = team.agents;
  const asSite = await uploadSite(modeller, team.teamId, part, file);
  const asLayer = await uploadLayer(modeller, siteId, part, file);
  for (const reply of [asSite, asLayer]) {
    expect(reply.type).toBe('application/problem+json');
    expect(reply.body).toMatchObject({ code, status: 422, type: `/problems/${code}` });
    for (const said of ['found', 'expected', 'remedy']) expect(reply.body[said]).toMatch(/\w{3}/);
  }
  expect(await everything()).toEqual(before);
  return asSite.body as Problem;
}

const values = Float32Array.from({ length: 24 }, (_, i) => i / 25);

/** A copy of a TIFF of this project's writer whose entry of a tag has been changed. */
function withEntry(file: Buffer, tag: number, change: (copy: Buffer, at: number) => void): Buffer {
  const copy = Buffer.from(file);
  const directory = copy.readUInt32LE(4);
  for (let i = 0; i < copy.readUInt16LE(directory); i++) {
    const at = directory + 2 + 12 * i;
    if (copy.readUInt16LE(at) !== tag) continue;
    change(copy, at);
    return copy;
  }
  throw new Error(`No tag ${tag}`);
}

/** With the SHORT or LONG value of a tag overwritten. */
const withTag = (file: Buffer, tag: number, value: number) =>
  withEntry(file, tag, (copy, at) => {
    if (copy.readUInt16LE(at + 2) === 3) copy.writeUInt16LE(value, at + 8);
    else copy.writeUInt32LE(value, at + 8);
  });

/** With a tag that nobody knows in the place of one. */
const renamed = (file: Buffer, tag: number) =>
  withEntry(file, tag, (copy, at) => void copy.writeUInt16LE(65_000, at));

describe('a file that cannot be a layer is refused with what was found, expected and how to mend it', () => {
  it('no GeoTIFF', async () => {
    const png = Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex');
    expect((await refused(png, 'not-a-geotiff')).found).toContain('PNG');
    await refused(Buffer.from('no raster at all, but long enough to be something'), 'not-a-geotiff');
  });

  it('cut short', async () => {
    await refused(cover().subarray(0, cover().length - 40), 'raster-truncated');
    await refused(cover().subarray(0, 150), 'raster-truncated');
  });

  it('claiming 100,000 × 100,000 pixels', async () => {
    const huge = withTag(withTag(cover(), 256, 100_000), 257, 100_000);
    expect((await refused(huge, 'raster-too-large')).found).toContain('100000 × 100000');
  });

  it('without a valid cell', async () => {
    await refused(geoTiff(new Float32Array(24).fill(-1), { noData: -1 }), 'raster-empty');
  });

  it('with five bands', async () => {
    expect((await refused(withTag(cover(), 277, 5), 'raster-bands')).found).toContain('5 bands');
  });

  it('without a georeference, or with one in degrees', async () => {
    await refused(renamed(renamed(cover(), 33550), 33922), 'raster-not-georeferenced');
    const degrees = readFileSync(join(import.meta.dirname, '../../../rasters/fixtures/mend-degrees.tif'));
    await refused(degrees, 'raster-not-projected');
  });

  it('with cover that is no share', async () => {
    const metres = geoTiff(values.map((v) => v * 1000));
    expect((await refused(metres, 'raster-values')).found).toContain('values from 0 to 920');
    const hole = geoTiff(values.map((v, i) => (i === 3 ? -9999 : v)));
    expect((await refused(hole, 'raster-values')).remedy).toContain('-a_nodata -9999');
    const infinite = geoTiff(values.map((v, i) => (i === 3 ? Infinity : v)));
    expect((await refused(infinite, 'raster-values')).expected).toContain('finite');
  });

  it('with habitat that is no classes', async () => {
    await refused(geoTiff(values), 'raster-values', 'habitat');
    const wide = { ...smallGrid, width: 20, height: 15 };
    const many = geoTiff(
      Int16Array.from({ length: 300 }, (_, i) => i),
      { grid: wide },
    );
    const reply = await uploadSite(team.agents.modeller, team.teamId, 'habitat', many).expect(422);
    expect(reply.body.code).toBe('raster-values');
    expect(await everything()).toEqual(before);
  });

  it('on other cells than the site’s, naming every difference and the command that mends it', async () => {
    const shifted = { ...smallGrid, originX: smallGrid.originX + 1, cellSize: 1 };
    const reply = await uploadLayer(
      team.agents.modeller,
      siteId,
      'cover',
      geoTiff(values, { grid: shifted }),
    );
    expect(reply.body).toMatchObject({ code: 'grid-mismatch', status: 422 });
    expect(reply.body.found).toContain('cells of 1 m instead of 2 m');
    expect(reply.body.found).toContain('412201');
    expect(reply.body.remedy).toContain(
      'gdalwarp -t_srs EPSG:32631 -te 412200 5301892 412212 5301900 -tr 2 2',
    );
    expect(await everything()).toEqual(before);
  });
});

describe('a form that is not right leaves nothing', () => {
  it('too large a file', async () => {
    const reply = await uploadSite(team.agents.modeller, team.teamId, 'cover', Buffer.alloc(200_001));
    expect(reply.body).toMatchObject({ code: 'too-large', status: 413 });
    expect(await everything()).toEqual(before);
  });

  it('no file, no name, an unknown part', async () => {
    const { modeller } = team.agents;
    const path = `/api/teams/${team.teamId}/sites`;
    const noFile = await modeller.post(path).field('name', 'x').field('part', 'cover').expect(400);
    expect(noFile.body.fields).toMatchObject([{ field: 'file' }]);
    const noName = await modeller
      .post(path)
      .field('part', 'cover')
      .attach('file', cover(), 'c.tif')
      .expect(400);
    expect(noName.body.fields).toMatchObject([{ field: 'name' }]);
    const wrong = await modeller
      .post(`/api/sites/${siteId}/layers`)
      .field('part', 'soil')
      .attach('file', cover(), 'c.tif')
      .expect(400);
    expect(wrong.body.fields).toMatchObject([{ field: 'part' }]);
    const two = await modeller
      .post(`/api/sites/${siteId}/layers`)
      .field('part', 'cover')
      .attach('file', cover(), 'a.tif')
      .attach('file', cover(), 'b.tif');
    expect(two.status).toBe(400);
    expect(await settled()).toEqual(before);
  });

  it('a file that is sent by somebody who may not: it is not even read', async () => {
    for (const role of ['manager', 'trainer'] as const)
      expect((await uploadLayer(team.agents[role], siteId, 'cover', cover())).status).toBe(403);
    expect(await everything()).toEqual(before);
  });
});

/** What is stored once the server has had time to clean up behind a reply that is already out. */
async function settled() {
  for (let i = 0; i < 100 && storedFiles(server).arrivals.length > 0; i++)
    await new Promise((resolve) => setTimeout(resolve, 20));
  return everything();
}

it('an upload that breaks off midway leaves nothing', async () => {
  const listening = server.app.listen(0);
  const { port } = listening.address() as AddressInfo;
  const { email } = team.people.modeller;
  const signedIn = await server.request.post('/api/session').send({ email, password: testPassword });
  const cookie = signedIn.headers['set-cookie'][0].split(';')[0];
  const boundary = 'tide';
  const head =
    `--${boundary}\r\nContent-Disposition: form-data; name="part"\r\n\r\ncover\r\n` +
    `--${boundary}\r\nContent-Disposition: form-data; name="file"; filename="c.tif"\r\n` +
    'Content-Type: image/tiff\r\n\r\n';
  const upload = httpRequest({
    port,
    method: 'POST',
    path: `/api/sites/${siteId}/layers`,
    headers: {
      cookie,
      'content-type': `multipart/form-data; boundary=${boundary}`,
      'content-length': 150_000,
    },
  });
  upload.on('error', () => undefined);
  upload.write(head);
  upload.write(Buffer.alloc(60_000, 1));
  // The file has to be on its way to disk before the line breaks.
  for (let i = 0; i < 250 && storedFiles(server).arrivals.length === 0; i++)
    await new Promise((resolve) => setTimeout(resolve, 20));
  expect(storedFiles(server).arrivals).toHaveLength(1);
  upload.destroy();
  expect(await settled()).toEqual(before);
  await new Promise((resolve) => listening.close(resolve));
});

it('GDAL agrees that the small rasters of these tests are what they say', (context) => {
  let said: string;
  try {
    said = execFileSync('gdalinfo', ['-json', '-stats', '/vsistdin/'], {
      input: habitat(),
      encoding: 'utf8',
    });
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return context.skip('gdalinfo is not installed');
    throw error;
  }
  expect(JSON.parse(said)).toMatchObject({
    size: [6, 4],
    geoTransform: [412_200, 2, 0, 5_301_900, 0, -2],
    bands: [{ type: 'Byte', noDataValue: 0, minimum: 1, maximum: 2 }],
  });
});
