import { Readable } from 'node:stream';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Brief, BriefSummary } from '#contract/briefs.ts';
import { replicateSpec, type Comparison, type ComparisonSummary } from '#contract/comparisons.ts';
import type { SiteCosts } from '#contract/costs.ts';
import type { Run, RunSummary } from '#contract/runs.ts';
import type { Option } from '#contract/options.ts';
import type { Site, SiteSummary } from '#contract/sites.ts';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { demoGrid } from '#rasters/demo/sallow-reach.ts';
import { createEnsembleMaps, mapNames } from '#rasters/ensemble/ensemble-maps.ts';
import { createRun, recordReplicate } from '#sim-core/index.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import { addTeam } from '#server/people/people.repository.ts';
import { createSite } from '#server/features/sites/site.service.ts';
import { binaryReply } from '#server/testing/binary-reply.ts';
import { habitat, storedFiles } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';
import { demoAccounts } from './demo-accounts.ts';
import { demoGround } from './demo-ground.ts';
import { demoTeamName } from './demo-place.ts';
import { loadDemo } from './load-demo.ts';

let server: TestServer;
let leftOver: string;
let agent: ReturnType<TestServer['agent']>;
let site: Site;
/** runs of the comparison that were done each time that progress was told */
const told: number[] = [];
/** fewer than at a start, for these tests' sake */
const replicates = 2;

beforeAll(async () => {
  server = await testServer({ demo: 'on' });
  const { write, clock } = server.services;
  // What a start leaves behind that was killed in the middle.
  leftOver = (await write((manager) => addTeam(manager, `${demoTeamName} (being made)`, clock()))).id;
  const file = await server.services.blobs.receive(Readable.from([habitat()]), 1e6);
  const raster = { part: 'habitat', file, fileName: 'habitat.tif', by: 'nobody' } as const;
  await createSite(server.services, { teamId: leftOver, name: 'half made', ...raster });
  await loadDemo(server.services, { replicates, onProgress: ({ runsDone }) => told.push(runsDone) });
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
    expect(site.layers.map((layer) => layer.part).sort()).toEqual([
      'cover',
      'elevation',
      'habitat',
      'refuge',
    ]);
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

it('has a brief of its comparison, of one page with an annex', async () => {
  const { body } = await agent.get(`/api/sites/${site.id}/briefs`).expect(200);
  const [summary] = (body as { briefs: BriefSummary[] }).briefs;
  expect(summary).toMatchObject({
    comparisonName: 'Wait, mounds or clumps',
    version: 1,
    decided: false,
    sent: 0,
  });
  const brief = (await agent.get(`/api/sites/${site.id}/briefs/${summary.id}`).expect(200)).body as Brief;
  expect(brief.versions[0]).toMatchObject({ briefPages: 1 });
  expect(brief.facts.teamName).toBe(demoTeamName);
  expect(brief.versions[0].bytes).toBeLessThan(5e6);
  expect(brief.facts.options.map(({ mapFutures }) => mapFutures)).toEqual([2, 2, 2, 2]);
});

describe('the comparison of the demo', () => {
  let path: string;
  let comparison: Comparison;
  beforeAll(async () => {
    const { body } = await agent.get(`/api/sites/${site.id}/comparisons`).expect(200);
    const [summary] = (body as { comparisons: ComparisonSummary[] }).comparisons;
    path = `/api/sites/${site.id}/comparisons/${summary.id}`;
    comparison = (await agent.get(path).expect(200)).body as Comparison;
  });
  const recordsOf = async (option: number, outlook: number) =>
    (await agent.get(`${path}/ensembles/${option}/${outlook}/replicates`).expect(200)).body
      .replicates as ReplicateRecord[];
  const bytesAt = async (rest: string) =>
    (await binaryReply(agent.get(`${path}/ensembles/${rest}`)).expect(200)).body as Buffer;

  it('is finished, of all options under two outlooks, and waits for a decision', () => {
    expect(comparison).toMatchObject({
      status: 'finished',
      ending: 'all replicates',
      replicates,
      done: replicates,
      decision: null,
      grid: site.grid,
    });
    expect(comparison.plan.options.map(({ name }) => name)).toEqual([
      'Wait',
      '40 mounds, scattered',
      '40 mounds, along the edge',
      'Clumped planting',
    ]);
    expect(comparison.plan.outlooks.map(({ name }) => name)).toEqual(['The outlook', 'Drier']);
    expect(comparison.plan.outlooks[0].droughtIndex).toEqual(site.outlook.drawn);
    expect(comparison.events.map(({ what }) => what)).toEqual(['started', 'ended, as all futures were run']);
    expect([told.at(-1), told.toSorted((a, b) => a - b)]).toEqual([8 * replicates, told]);
  });

  it('knows what each option costs, all within the budget', async () => {
    const { costs, changedBy } = (await agent.get(`/api/sites/${site.id}/costs`).expect(200))
      .body as SiteCosts;
    expect([changedBy, comparison.plan.currency]).toEqual(['Ines Marlow', costs.currency]);
    // By hand: 40 mounds at 260, 920 clumps at 3, three visits in two years at 450, 34 years at 150.
    const [wait, scattered, edge, clumps] = comparison.plan.options.map(({ cost }) => cost!);
    expect([wait, scattered, edge]).toEqual([0, 20_960, 20_960]);
    expect(clumps).toBeGreaterThan(0);
    expect(clumps).toBeLessThan(scattered);
    expect(costs.budget).toBeGreaterThan(scattered);
  });

  it('has all replicates, maps of the size of the grid, and the counts that they are made of', async () => {
    const { width, height } = demoGrid;
    expect(comparison.ensembles).toHaveLength(8);
    const names = mapNames(comparison.plan.mapYears);
    for (const { option, outlook, done, maps, mapsState } of comparison.ensembles) {
      expect([done, mapsState, Object.keys(maps).toSorted()]).toEqual([
        replicates,
        replicates,
        names.toSorted(),
      ]);
      expect(new Set(Object.values(maps))).toEqual(new Set([replicates]));
      expect((await recordsOf(option, outlook)).map(({ replicate }) => replicate)).toEqual([0, 1]);
      const state = await bytesAt(`${option}/${outlook}/maps-state`);
      const held = createEnsembleMaps({ width, height, years: comparison.plan.mapYears }, state);
      expect(held.replicates()).toEqual([0, 1]);
      for (const name of names) {
        const stored = decodeCellValues(await bytesAt(`${option}/${outlook}/maps/${name}`));
        expect([stored.width, stored.height]).toEqual([width, height]);
        expect(Buffer.compare(bytes(stored.values), bytes(held.map(name)))).toBe(0);
      }
    }
  }, 120_000);

  it('has replicates that come to the same record wherever they are run, with the weather of their outlook', async () => {
    const [option, outlook, replicate] = [1, 1, 1];
    const spec = runSpecSchema.parse(replicateSpec(comparison.plan, option, outlook, replicate));
    const ground = await demoGround(server.services, site, spec.layers);
    const run = createRun({ spec, grid: site.grid, ground });
    while (run.nextYear());
    const records = await recordsOf(option, outlook);
    expect(records[replicate]).toEqual(recordReplicate(run.result(), spec, comparison.plan.droughtThreshold));
    // Options share their luck, outlooks and replicates do not.
    const [other] = await recordsOf(0, outlook);
    expect(records[0].droughtIndex).toEqual(other.droughtIndex);
    expect(records[0].droughtIndex).not.toEqual(records[1].droughtIndex);
    const mean = (values: number[]) => values.reduce((sum, value) => sum + value, 0) / values.length;
    const [milder] = await recordsOf(0, 0);
    expect(mean(other.droughtIndex)).toBeCloseTo(mean(milder.droughtIndex) - 0.5, 6);
  }, 60_000);

  it('can be copied, and the copy resumed for more replicates', async () => {
    const copy = (await agent.post(`${path}/copies`).send({ name: 'More of it', replicates: 4 }).expect(200))
      .body as Comparison;
    expect(copy.ensembles).toEqual(comparison.ensembles);
    const resumed = await agent
      .post(`/api/sites/${site.id}/comparisons/${copy.id}/resume`)
      .send({ replicates: 4 })
      .expect(200);
    expect(resumed.body).toMatchObject({ status: 'running', done: replicates });
  });
});

const firstRun = async () =>
  ((await agent.get(`/api/sites/${site.id}/runs`).expect(200)).body as { runs: RunSummary[] }).runs[0];

const bytes = ({ buffer, byteOffset, byteLength }: ArrayBufferView) =>
  Buffer.from(buffer as ArrayBuffer, byteOffset, byteLength);
