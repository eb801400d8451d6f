import { afterAll, beforeAll, expect, it } from 'vitest';
import { replicateSpec, type Comparison } from '#contract/comparisons.ts';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { recordReplicate } from '#sim-core/index.ts';
import { runReplicate } from '#sim-core/ensemble/replicate.ts';
import { buildGround, type RasterValues } from '#sim-core/grid/build-ground.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import { binaryReply } from '#server/testing/binary-reply.ts';
import { startTestComparison } from '#server/testing/comparisons.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { packed, sendBytes } from '#server/testing/runs.ts';
import { makeSite, smallGrid } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server);
});
afterAll(() => server.close());

it('goes on on its own cells, from its own layers, after its site got others', async () => {
  const { modeller } = team.agents;
  const site = await makeSite(modeller, team.teamId);
  const begun = await startTestComparison(modeller, site, { replicates: 4 });
  const path = `/api/sites/${site.id}/comparisons/${begun.id}`;
  const get = async () => (await modeller.get(path).expect(200)).body as Comparison;
  /** What a browser does: everything it stands on comes from the comparison as the server has it now. */
  const run = async (replicate: number) => {
    const { plan, grid, layers } = await get();
    const rasters = new Map<string, RasterValues>();
    for (const { hash, noData } of layers) {
      const { body } = await binaryReply(modeller.get(`/api/sites/${site.id}/layer-values/${hash}`)).expect(
        200,
      );
      rasters.set(hash, { values: decodeCellValues(body as Buffer).values, noData });
    }
    const spec = runSpecSchema.parse(replicateSpec(plan, 0, 0, replicate));
    const ground = buildGround(spec.layers, grid, (source) =>
      rasters.get('layer' in source ? source.layer : '')!,
    );
    const { result } = runReplicate({ spec, grid, ground }, { closing: true });
    return recordReplicate(result, spec, plan.droughtThreshold);
  };
  const put = (record: Awaited<ReturnType<typeof run>>) =>
    modeller
      .put(`${path}/ensembles/0/0/replicates`)
      .send({ replicates: [record] })
      .expect(200);
  const first = await run(0);
  await put(first);
  await modeller.post(`${path}/end`).send({ ending: 'stopped by hand' }).expect(200);

  await modeller.post(`/api/sites/${site.id}/grid-change`).send({ factor: 2 }).expect(200);
  await server.services.background.idle();
  expect((await modeller.get(`/api/sites/${site.id}`).expect(200)).body).toMatchObject({
    grid: { cellSize: 4 },
  });

  await modeller.post(`${path}/resume`).send({ replicates: 6 }).expect(200);
  expect((await get()).grid).toEqual(smallGrid);
  // The same future comes to the same record, and new ones and maps are taken.
  expect(await run(0)).toEqual(first);
  await put(await run(5));
  expect((await get()).ensembles[0].done).toBe(2);
  const map = `${path}/ensembles/0/0/maps/chance-2026?replicates=2`;
  await sendBytes(modeller, map, packed(new Uint8Array(24))).expect(204);
  // Of the site's present cells there are six.
  await sendBytes(modeller, map, packed(new Uint8Array(6), 3, 2)).expect(400);
}, 60_000);
