import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import type { Option } from '#contract/options.ts';
import type { Site } from '#contract/sites.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { computeRun, openRun, packed, sendBytes, specFor, type ComputedRun } from '#server/testing/runs.ts';
import { makeSite, storedFiles } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
let wait: Option;

beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server);
  site = await makeSite(team.agents.modeller, team.teamId);
  [wait] = (await team.agents.manager.get(`/api/sites/${site.id}/options`)).body.options as [Option];
});
afterAll(() => server.close());

describe('an impossible run is refused at the field that is wrong', () => {
  const mound = { kind: 'mound', year: 2025, x: 412_203, y: 5_301_897, radius: 2, strength: 1, halo: 0 };
  const elsewhere = 'ab'.repeat(32);
  it.each([
    ['spec.rates.lateralSpread', { rates: { lateralSpread: 900 } }],
    ['spec.rates.lateralSpread', { rates: { lateralSpread: 0.005 } }],
    ['spec.years', { years: 0 }],
    ['spec.droughtIndex', { droughtIndex: [0, 0, 0] }],
    ['spec.actions.0.year', { actions: [{ ...mound, year: 2040 }] }],
    ['spec.actions.0', { actions: [{ ...mound, x: 0 }] }],
    ['spec.layers.cover.layer', { layers: { cover: { layer: elsewhere } } }],
    [
      'spec.layers.capacity.product.1.layer',
      { layers: { cover: 0, capacity: { product: [1, { layer: elsewhere }] } } },
    ],
    [
      'spec.layers.refuge.highest.0.file',
      { layers: { cover: 0, refuge: { highest: [{ file: 'a.tif' }, 0] } } },
    ],
    ['spec.layers.cover.file', { layers: { cover: { file: 'cover.tif' } } }],
    ['spec.layers.cover.band', { layers: { cover: { layer: 'COVER', band: 2 } } }],
    ['spec.layers', { layers: { cover: { layer: 'not a hash' } } }],
    ['spec.seed', { seed: '' }],
    ['spec.colour', { colour: 'green' }],
  ] as const)('%s', async (field, change) => {
    const cover = site.layers.find((layer) => layer.part === 'cover')!.hash;
    const spec = JSON.parse(
      JSON.stringify({ ...specFor(site), ...change }).replace('COVER', cover),
    ) as object;
    const reply = await team.agents.manager
      .post(`/api/sites/${site.id}/runs`)
      .send({ name: 'r', optionId: wait.id, spec })
      .expect(400);
    expect(reply.body.code).toBe('invalid-request');
    const fields = (reply.body.fields as { field: string }[]).map((problem) => problem.field);
    expect(fields.some((found) => found.startsWith(field))).toBe(true);
    expect(await server.services.dataSource.query('SELECT * FROM "run"')).toEqual([]);
  });

  it('an option of another site, or none', async () => {
    const other = await makeSite(team.agents.modeller, team.teamId);
    const reply = await team.agents.manager
      .post(`/api/sites/${other.id}/runs`)
      .send({ name: 'r', optionId: wait.id, spec: specFor(other) })
      .expect(400);
    expect(reply.body.fields).toMatchObject([{ field: 'optionId' }]);
  });
});

describe('what does not belong to a run is refused and leaves nothing', () => {
  let runId: string;
  let computed: ComputedRun;
  let before: ReturnType<typeof storedFiles>;
  const put = (path: string, bytes: Buffer) =>
    sendBytes(team.agents.manager, `/api/runs/${runId}/${path}`, bytes);

  beforeAll(async () => {
    computed = await computeRun(site, specFor(site));
  });
  beforeEach(async () => {
    runId = (await openRun(team.agents.manager, site, specFor(site))).id;
    before = storedFiles(server);
  });

  it('a frame of a year that the run has not', async () => {
    const reply = await put('frames/2040', packed(computed.frames.get(2024)!)).expect(400);
    expect(reply.body.fields[0]).toMatchObject({
      field: 'year',
      message: expect.stringContaining('2024 to 2028'),
    });
    await put('frames/soon', packed(computed.frames.get(2024)!)).expect(400);
    expect(storedFiles(server)).toEqual(before);
  });

  it.each([
    ['no cell values at all', () => Buffer.from('a picture of a marsh'), 400],
    ['another size', () => packed(new Uint8Array(12), 6, 2), 400],
    ['more cells than the site', () => packed(new Uint8Array(4000), 100, 40), 400],
    ['another type', () => packed(new Float32Array(24)), 400],
    ['cut short', () => packed(computed.frames.get(2024)!).subarray(0, 20), 400],
    ['far too many bytes', () => Buffer.alloc(100_000), 413],
    ['nothing', () => Buffer.alloc(0), 400],
  ] as const)('a frame of %s', async (_, bytes, status) => {
    const reply = await put('frames/2024', bytes()).expect(status);
    expect(reply.type).toBe('application/problem+json');
    expect(storedFiles(server)).toEqual(before);
    expect((await team.agents.manager.get(`/api/runs/${runId}`)).body.frames).toBe(0);
  });

  it('closing years that are no years', async () => {
    await put('closing', packed(new Uint8Array(24))).expect(400);
    expect(storedFiles(server)).toEqual(before);
  });

  it('a finish with a frame missing, a wrong digest or a short series', async () => {
    const { manager } = team.agents;
    const finish = (changes = {}) =>
      manager.post(`/api/runs/${runId}/finish`).send({ ...computed.result, ...changes });
    for (const [year, frame] of computed.frames)
      if (year !== 2026) await put(`frames/${year}`, packed(frame)).expect(204);
    const missing = await finish().expect(409);
    expect(missing.body.detail).toContain('2026');
    await put('frames/2026', packed(computed.frames.get(2025)!)).expect(204);
    const mixed = await finish().expect(422);
    expect(mixed.body).toMatchObject({ code: 'digest-mismatch' });
    expect(mixed.body.detail).toContain(computed.result.digest);
    // Sent again, the right frame takes the place of the wrong one.
    await put('frames/2026', packed(computed.frames.get(2026)!)).expect(204);
    await finish({ digest: 'f'.repeat(64) }).expect(422);
    const short = await finish({ series: computed.result.series.slice(1) }).expect(400);
    expect(short.body.fields).toMatchObject([{ field: 'series' }]);
    expect((await manager.get(`/api/runs/${runId}`)).body).toMatchObject({ status: 'running', digest: null });
    await finish().expect(200);
    await finish().expect(409);
  });

  it('another frame or other closing years once it is finished; the same ones are harmless', async () => {
    for (const [year, frame] of computed.frames) await put(`frames/${year}`, packed(frame)).expect(204);
    await put('closing', packed(computed.closing)).expect(204);
    await team.agents.manager.post(`/api/runs/${runId}/finish`).send(computed.result).expect(200);
    before = storedFiles(server);
    await put('frames/2025', packed(computed.frames.get(2025)!)).expect(204);
    await put('closing', packed(computed.closing)).expect(204);
    const other = await put('frames/2025', packed(new Uint8Array(24).fill(7))).expect(409);
    expect(other.body.code).toBe('conflict');
    await put('closing', packed(new Int16Array(24).fill(7))).expect(409);
    expect(storedFiles(server)).toEqual(before);
  });
});
