import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Run } from '#contract/runs.ts';
import type { Site } from '#contract/sites.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { binaryReply } from '#server/testing/binary-reply.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { computeRun, openRun, packed, sendBytes, sendRun, specFor } from '#server/testing/runs.ts';
import { geoTiff, makeSite, storedFiles, uploadLayer } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
const hashOf = (bytes: Uint8Array) => createHash('sha256').update(bytes).digest('hex');

beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Run team');
  site = await makeSite(team.agents.modeller, team.teamId);
});
afterAll(() => server.close());

describe('a run', () => {
  it('is kept frame by frame, closed on its digest, and replayed as it was', async () => {
    const { manager, trainer } = team.agents;
    const spec = specFor(site, { droughtIndex: [0, -4, 0, 1] });
    const computed = await computeRun(site, spec);
    const { id, ...started } = await openRun(manager, site, spec, 'Replay me');
    expect(started).toMatchObject({
      name: 'Replay me',
      status: 'running',
      optionName: 'Wait',
      startedBy: 'Run team: manager',
      spec,
      grid: site.grid,
      crsName: site.crsName,
      storedYears: [],
      digest: null,
      result: null,
    });
    const finished = (await sendRun(manager, id, computed)).body as Run;
    expect(finished).toMatchObject({
      status: 'finished',
      digest: computed.result.digest,
      recoveredYear: computed.result.recoveredYear,
      storedYears: [2024, 2025, 2026, 2027, 2028],
      frames: 5,
      hasClosing: true,
      result: computed.result,
    });
    // The same answer to whoever only watches, from the stored bytes.
    expect((await trainer.get(`/api/runs/${id}`).expect(200)).body).toEqual(finished);
    for (const [year, frame] of computed.frames) {
      const reply = await binaryReply(trainer.get(`/api/runs/${id}/frames/${year}`)).expect(200);
      expect(decodeCellValues(reply.body as Buffer)).toEqual({ width: 6, height: 4, values: frame });
      expect(reply.headers['cache-control']).toContain('immutable');
    }
    const closing = await binaryReply(trainer.get(`/api/runs/${id}/closing`)).expect(200);
    expect(decodeCellValues(closing.body as Buffer).values).toEqual(computed.closing);
  });

  it('names the outlook and the plant that it took, and no outlook where none brings its weather', async () => {
    const { manager } = team.agents;
    const drawn = { kind: 'palmer-type', standardDeviation: 2 } as const;
    const own = await makeSite(team.agents.modeller, team.teamId);
    const outlook = { ...own.outlook, name: 'Dry decades', drawn };
    await team.agents.modeller.put(`/api/sites/${own.id}/outlook`).send(outlook).expect(200);
    const from = { ...own.outlook, rates: own.plant.rates };
    const { surveyYear, years, stepsPerYear, droughtIndex, rates } = from;
    const taken = async (weather: Partial<RunSpec>) => {
      const spec = specFor(own, { surveyYear, years, stepsPerYear, rates, ...weather });
      return (await openRun(manager, own, spec)).origins;
    };
    expect(await taken({ droughtIndex: drawn, replicate: 2 })).toEqual({
      outlook: { name: 'Dry decades', weather: 'drawn' },
      plant: { name: own.plant.name, profile: null, asSet: true },
    });
    expect((await taken({ droughtIndex }))?.outlook).toEqual({ name: 'Dry decades', weather: 'listed' });
    expect((await taken({ droughtIndex: -1 }))?.outlook).toBeNull();
    const slower = { ...rates, lateralSpread: rates.lateralSpread / 2 };
    expect((await taken({ droughtIndex, rates: slower }))?.plant.asSet).toBe(false);
  });

  it('says in the list, too, when it lost again what it had recovered', async () => {
    const { manager, trainer } = team.agents;
    // The first year brings it to the target; a drought past every tolerance takes it in the second.
    const spec = specFor(site, { droughtIndex: [0, -12, 0, 0], target: 0.6, mode: 'mean-field' });
    const computed = await computeRun(site, spec);
    const { id } = await openRun(manager, site, spec, 'Lost again');
    const finished = (await sendRun(manager, id, computed)).body as Run;
    expect(finished).toMatchObject({ recoveredYear: 2025, lostYear: 2026 });
    const { runs } = (await trainer.get(`/api/sites/${site.id}/runs`).expect(200)).body as { runs: Run[] };
    expect(runs.find((run) => run.id === id)).toMatchObject({ recoveredYear: 2025, lostYear: 2026 });
  });

  it('stands in the list, newest first, page by page', async () => {
    const { manager, trainer } = team.agents;
    const own = await makeSite(team.agents.modeller, team.teamId);
    for (const name of ['first', 'second', 'third']) await openRun(manager, own, specFor(own), name);
    const page = async (query: string) =>
      (await trainer.get(`/api/sites/${own.id}/runs?${query}`).expect(200)).body as {
        runs: Run[];
        total: number;
      };
    const { runs, total } = await page('limit=2');
    expect([total, ...runs.map((run) => run.name)]).toEqual([3, 'third', 'second']);
    expect((await page('limit=2&offset=2')).runs.map((run) => run.name)).toEqual(['first']);
    await trainer.get(`/api/sites/${own.id}/runs?limit=1000`).expect(400);
  });

  it('can be renamed; deleted, it takes its files along', async () => {
    const { manager } = team.agents;
    const spec = specFor(site, { seed: 'only here', mode: 'mean-field' });
    const computed = await computeRun(site, spec);
    const { id } = await openRun(manager, site, spec);
    await sendRun(manager, id, computed);
    const renamed = await manager.patch(`/api/runs/${id}`).send({ name: 'New name' }).expect(200);
    expect(renamed.body.name).toBe('New name');
    const own = hashOf(packed(computed.frames.get(2028)!));
    expect(storedFiles(server).blobs).toContain(own);
    await manager.delete(`/api/runs/${id}`).expect(204);
    await manager.get(`/api/runs/${id}`).expect(404);
    expect(storedFiles(server).blobs).not.toContain(own);
  });

  it('keeps the layers that it stands on when they are replaced, and after it is deleted they may be forgotten', async () => {
    const { modeller } = team.agents;
    const own = await makeSite(modeller, team.teamId);
    const first = geoTiff(Float32Array.from({ length: 24 }, (_, i) => i / 100));
    const withLayer = (await uploadLayer(modeller, own.id, 'cover', first).expect(200)).body as Site;
    const { id } = await openRun(modeller, own, specFor(withLayer));
    const second = geoTiff(Float32Array.from({ length: 24 }, (_, i) => i / 200));
    await uploadLayer(modeller, own.id, 'cover', second).expect(200);
    await modeller.get(`/api/sites/${own.id}/layer-values/${hashOf(first)}`).expect(200);
    const { layers } = (await modeller.get(`/api/runs/${id}`).expect(200)).body as Run;
    expect(layers.find((layer) => layer.hash === hashOf(first))).toMatchObject({
      part: 'cover',
      current: false,
    });
    const replaced = withLayer.layers.find((layer) => layer.part === 'cover')!;
    const forget = () => modeller.delete(`/api/sites/${own.id}/layers/${replaced.id}`);
    const kept = await forget().expect(409);
    expect(kept.body.detail).toContain('“A run”');
    await modeller.delete(`/api/runs/${id}`).expect(204);
    await forget().expect(200);
    await modeller.get(`/api/sites/${own.id}/layer-values/${hashOf(first)}`).expect(404);
    expect(storedFiles(server).blobs).not.toContain(hashOf(first));
  });

  it('outlives its option, whose name it keeps', async () => {
    const { manager } = team.agents;
    const option = await manager
      .post(`/api/sites/${site.id}/options`)
      .send({ name: 'Short-lived', works: [] })
      .expect(200);
    const started = await manager
      .post(`/api/sites/${site.id}/runs`)
      .send({ name: 'r', optionId: option.body.id, spec: specFor(site) })
      .expect(200);
    await manager.delete(`/api/sites/${site.id}/options/${option.body.id}`).expect(204);
    expect((await manager.get(`/api/runs/${started.body.id}`).expect(200)).body).toMatchObject({
      optionId: null,
      optionName: 'Short-lived',
    });
  });
});

describe('a run that is broken off', () => {
  it('keeps the frames that were stored, and can be stopped once', async () => {
    const { manager } = team.agents;
    const spec = specFor(site);
    const { frames, result } = await computeRun(site, spec);
    const { id } = await openRun(manager, site, spec);
    await sendBytes(manager, `/api/runs/${id}/frames/2024`, packed(frames.get(2024)!)).expect(204);
    expect((await manager.get(`/api/runs/${id}`)).body).toMatchObject({ status: 'running', frames: 1 });
    const stopped = await manager.post(`/api/runs/${id}/stop`).expect(200);
    expect(stopped.body).toMatchObject({ status: 'stopped', storedYears: [2024] });
    await manager.get(`/api/runs/${id}/frames/2024`).expect(200);
    for (const reply of [
      await manager.post(`/api/runs/${id}/stop`),
      await manager.post(`/api/runs/${id}/finish`).send(result),
      await sendBytes(manager, `/api/runs/${id}/frames/2025`, packed(frames.get(2025)!)),
      await manager.post(`/api/runs/${id}/checks`).send({ digest: result.digest, engineVersion: '1' }),
    ])
      expect(reply.body).toMatchObject({ code: 'conflict', status: 409 });
    await manager.get(`/api/runs/${id}/frames/2025`).expect(404);
    await manager.get(`/api/runs/${id}/series.csv`).expect(409);
  });
});

describe('running it again', () => {
  it('records whether the digest agreed, by a trainer too', async () => {
    const { manager, trainer } = team.agents;
    const spec = specFor(site, { seed: 'again' });
    const computed = await computeRun(site, spec);
    const { id } = await openRun(manager, site, spec);
    await sendRun(manager, id, computed);
    const { digest, engineVersion } = (await computeRun(site, spec)).result;
    const agreed = await trainer.post(`/api/runs/${id}/checks`).send({ digest, engineVersion }).expect(200);
    expect(agreed.body.check).toMatchObject({ agreed: true, by: 'Run team: trainer', engineVersion });
    const other = await trainer
      .post(`/api/runs/${id}/checks`)
      .send({ digest: '0'.repeat(64), engineVersion })
      .expect(200);
    expect(other.body.check.agreed).toBe(false);
  });
});
