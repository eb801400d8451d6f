import { Readable } from 'node:stream';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Run, RunSummary } from '#contract/runs.ts';
import type { Option } from '#contract/options.ts';
import type { Site, SiteSummary } from '#contract/sites.ts';
import { addTeam } from '#server/people/people.repository.ts';
import { createSite } from '#server/features/sites/site.service.ts';
import { habitat, storedFiles } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';
import { demoAccounts } from './demo-accounts.ts';
import { demoTeamName } from './demo-place.ts';
import { loadDemo } from './load-demo.ts';

let server: TestServer;
let leftOver: string;
let agent: ReturnType<TestServer['agent']>;
let site: Site;

beforeAll(async () => {
  server = await testServer({ demo: 'on' });
  const { write, clock } = server.services;
  // What a start leaves behind that was killed in the middle.
  leftOver = (await write((manager) => addTeam(manager, `${demoTeamName} (being made)`, clock()))).id;
  const file = await server.services.blobs.receive(Readable.from([habitat()]), 1e6);
  const raster = { part: 'habitat', file, fileName: 'habitat.tif', by: 'nobody' } as const;
  await createSite(server.services, { teamId: leftOver, name: 'half made', ...raster });
  await loadDemo(server.services);
  agent = server.agent();
  const { email, password } = demoAccounts[0];
  const { body } = await agent.post('/api/session').send({ email, password }).expect(200);
  const sites = await agent.get(`/api/teams/${body.memberships[0].teamId}/sites`).expect(200);
  const [summary] = (sites.body as { sites: SiteSummary[] }).sites;
  site = (await agent.get(`/api/sites/${summary.id}`).expect(200)).body as Site;
}, 300_000);
afterAll(() => server.close());

describe('the demo', () => {
  it('lets every role in, in one team', async () => {
    for (const { email, password, role, name } of demoAccounts) {
      const { body } = await server.request.post('/api/session').send({ email, password }).expect(200);
      expect(body.memberships).toMatchObject([{ teamName: demoTeamName, role }]);
      expect(body.person.name).toBe(name);
    }
  });

  it('is an invented place with classed ground, a plant and an outlook', () => {
    expect(site).toMatchObject({ name: 'Sallow Reach', invented: true, plantSet: true, outlookSet: true });
    expect(site.layers.map((layer) => layer.part).sort()).toEqual(['cover', 'habitat', 'refuge']);
    expect(site.layers.find((layer) => layer.part === 'habitat')?.classes).not.toBeNull();
    expect(site.outlook.droughtIndex.filter((x) => x < -2.5)).toHaveLength(2);
  });

  it('has three options beside Wait, and 40 mounds in two of them', async () => {
    const { body } = await agent.get(`/api/sites/${site.id}/options`).expect(200);
    const mounds = (body.options as Option[]).map(({ name, works }) => [
      name,
      works.filter((work) => work.kind === 'mound').length,
    ]);
    expect(mounds).toEqual([
      ['Wait', 0],
      ['40 mounds, scattered', 40],
      ['40 mounds, along the edge', 40],
      ['Clumped planting', 0],
    ]);
  });

  it('has a finished run of Wait and of the scattered mounds, which recover sooner', async () => {
    const { body } = await agent.get(`/api/sites/${site.id}/runs`).expect(200);
    const summaries = body.runs as RunSummary[];
    expect(summaries.map((run) => [run.optionName, run.status, run.frames])).toEqual([
      ['40 mounds, scattered', 'finished', 35],
      ['Wait', 'finished', 35],
    ]);
    const [mounds, wait] = await Promise.all(
      summaries.map(async ({ id }) => (await agent.get(`/api/runs/${id}`).expect(200)).body as Run),
    );
    expect(mounds.hasClosing).toBe(true);
    const inYear = ({ result }: Run, year: number) => result!.series.find((row) => row.time === year)!;
    expect(inYear(mounds, 2048).recoveredShare).toBeGreaterThan(inYear(wait, 2048).recoveredShare + 0.01);
    // Both droughts bite.
    expect(inYear(wait, 2050).recoveredShare).toBeLessThan(0.3 * inYear(wait, 2048).recoveredShare);
  });

  it('wiped what an earlier start had left half made', async () => {
    const rows = await server.services.dataSource.query(`SELECT "id", "name" FROM "team"`);
    expect(rows).toEqual([{ id: site.teamId, name: demoTeamName }]);
    expect(site.teamId).not.toBe(leftOver);
    const sites = await server.services.dataSource.query(`SELECT "name" FROM "site"`);
    expect(sites).toEqual([{ name: 'Sallow Reach' }]);
    expect(storedFiles(server).arrivals).toEqual([]);
  });

  it('is loaded once: another start changes nothing, whatever people have done with it', async () => {
    await agent.delete(`/api/runs/${(await firstRun()).id}`).expect(204);
    const before = storedFiles(server);
    await loadDemo(server.services);
    expect(storedFiles(server)).toEqual(before);
    expect((await agent.get(`/api/sites/${site.id}/runs`).expect(200)).body.total).toBe(1);
  });
});

const firstRun = async () =>
  ((await agent.get(`/api/sites/${site.id}/runs`).expect(200)).body as { runs: RunSummary[] }).runs[0];
