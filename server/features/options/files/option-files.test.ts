import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Option } from '#contract/options.ts';
import { largestWorksFile, type WorksPreview } from '#contract/option-files.ts';
import type { Site } from '#contract/sites.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
let option: Option;
let path: string;
const at = { x: 412_203.25, y: 5_301_897 };
const mound = { id: 'm1', kind: 'mound', year: 2027, ...at, radius: 2, strength: 1, halo: 0, name: 'North' };
const ring = [[412_201, 5_301_893], [412_205, 5_301_893], [412_203, 5_301_899]]; // prettier-ignore
const fence = { id: 'f1', kind: 'fence', year: 2028, area: { shape: 'polygon', ring }, strength: 1 };

beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'File team');
  site = await makeSite(team.agents.modeller, team.teamId);
  const body = { name: 'Bank & bar', note: 'A note', works: [mound, fence] };
  option = (await team.agents.manager.post(`/api/sites/${site.id}/options`).send(body).expect(200))
    .body as Option;
  path = `/api/sites/${site.id}/options/${option.id}`;
});
afterAll(() => server.close());

const get = async (file: string) => {
  const reply = await team.agents.trainer.get(`${path}/${file}`).buffer(true).parse((response, done) => {
    const chunks: Buffer[] = [];
    response.on('data', (chunk: Buffer) => chunks.push(chunk));
    response.on('end', () => done(null, Buffer.concat(chunks).toString('utf8')));
  }); // prettier-ignore
  return {
    status: reply.status,
    text: reply.body as string,
    headers: reply.headers as Record<string, string>,
  };
};
const preview = (fileName: string, content: string) =>
  team.agents.manager.post(`/api/sites/${site.id}/works-preview`).send({ fileName, content });

describe('an option as a file', () => {
  it.each(['', '?crs=site'])(
    'goes out as GeoJSON, and comes back as another option that is equal: %s',
    async (query) => {
      const { text, headers } = await get(`option.geojson${query}`);
      expect(headers['content-type']).toContain('application/geo+json');
      expect(headers['content-disposition']).toContain('Trial-Marsh_Bank-bar.geojson');
      const { body } = (await preview('from us.geojson', text).expect(200)) as { body: WorksPreview };
      expect(body).toMatchObject({
        format: 'geojson',
        name: 'Bank & bar',
        note: 'A note',
        problems: [],
        assumed: [],
      });
      expect(body.works).toEqual(option.works);
      const { name, note, works, sets } = body;
      const made = await team.agents.manager
        .post(`/api/sites/${site.id}/options`)
        .send({ name, note, works, sets })
        .expect(200);
      expect((made.body as Option).works).toEqual(option.works);
    },
  );

  it('goes out as points in CSV, and as points for a crew in WGS 84', async () => {
    const points = await get('points.csv');
    expect(points.text.split('\r\n')).toHaveLength(3);
    const { body } = (await preview('points.csv', points.text).expect(200)) as { body: WorksPreview };
    expect(body.works).toMatchObject([{ ...mound, id: expect.any(String) as string }]);
    const crew = await get('crew.csv');
    expect(crew.text.split('\r\n')).toHaveLength(1 + 1 + 3 + 1);
    const gpx = await get('crew.gpx?year=2027&startX=412200&startY=5301900');
    expect(gpx.headers['content-type']).toContain('application/gpx+xml');
    expect(gpx.text).toContain('<name>Trial Marsh, Bank &amp; bar, 2027</name>');
    const [, lat, lon] = /<wpt lat="([\d.]+)" lon="([\d.]+)"><name>001 North</.exec(gpx.text)!;
    // The same place by the other way out.
    expect(crew.text).toContain(`${Number(lon)},${Number(lat)},${at.x},${at.y}`);
  });

  it('is read without saving anything', async () => {
    const count = async () =>
      ((await team.agents.manager.get(`/api/sites/${site.id}/options`)).body as { options: Option[] }).options
        .length;
    const before = await count();
    const { body } = (await preview('a.csv', `x,y\n${at.x},${at.y}\n0,0\n`).expect(200)) as {
      body: WorksPreview;
    };
    expect(body.works).toMatchObject([{ kind: 'mound', ...at, year: site.outlook.surveyYear + 1 }]);
    expect(body.problems).toMatchObject([{ row: 3 }]);
    expect(body.assumed).toContainEqual({ words: 'full strength', works: 1 });
    expect(await count()).toBe(before);
  });

  it('is refused in words where it cannot be read, and above its limit', async () => {
    const reply = await preview('a.geojson', 'x,y\n1,2').expect(400);
    expect(reply.body.fields).toMatchObject([
      { field: 'content', message: expect.stringMatching(/no JSON/) as string },
    ]);
    await preview('a.csv', 'x'.repeat(2 * largestWorksFile)).expect(413);
  });

  it('is not found under another site', async () => {
    const other = await makeSite(team.agents.modeller, team.teamId);
    for (const file of ['option.geojson', 'points.csv', 'crew.gpx', 'crew.csv'])
      await team.agents.manager.get(`/api/sites/${other.id}/options/${option.id}/${file}`).expect(404);
  });
});
