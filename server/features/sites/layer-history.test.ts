import { afterAll, beforeAll, expect, it } from 'vitest';
import type { LayerDependents } from '#contract/ground.ts';
import type { ElevationCurves, LayerHistoryEntry } from '#contract/layers.ts';
import type { Site } from '#contract/sites.ts';
import { startTestComparison } from '#server/testing/comparisons.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { openRun, specFor } from '#server/testing/runs.ts';
import { geoTiff, makeSite, uploadLayer } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server);
});
afterAll(() => server.close());

const layerOf = (site: Site, part: string) => site.layers.find((layer) => layer.part === part)!;
const heights = () => geoTiff(Float32Array.from({ length: 24 }, (_, i) => i / 10 - 1));

it('lists what played a part, says what depends on it, and lets it play again', async () => {
  const { modeller, manager } = team.agents;
  const first = await makeSite(modeller, team.teamId);
  await openRun(modeller, first, specFor(first), 'The first run');
  const newer = geoTiff(Float32Array.from({ length: 24 }, (_, i) => i / 99));
  const second = (await uploadLayer(modeller, first.id, 'cover', newer, 'resurvey.tif').expect(200))
    .body as Site;
  const list = async () =>
    (
      (await manager.get(`/api/sites/${first.id}/layer-history?part=cover`).expect(200)).body as {
        entries: LayerHistoryEntry[];
      }
    ).entries;
  const [now, before] = await list();
  expect(now).toMatchObject({
    replacedAt: null,
    runs: 0,
    layer: { source: { fileName: 'resurvey.tif', uploadedBy: 'A team: modeller' } },
  });
  expect(before).toMatchObject({ runs: 1, layer: { hash: layerOf(first, 'cover').hash } });
  expect(before.replacedAt).not.toBeNull();

  const dependents = async (id: string) =>
    (await manager.get(`/api/sites/${first.id}/layers/${id}/dependents`).expect(200)).body as LayerDependents;
  expect(await dependents(before.layer.id)).toMatchObject({ runs: 1, runNames: ['The first run'] });
  expect((await dependents(layerOf(second, 'habitat').id)).consequences.join(' ')).toMatch(
    /no run can start.*class table of 2 classes/,
  );

  const back = (await modeller.post(`/api/sites/${first.id}/layers/${before.layer.id}/put-back`).expect(200))
    .body as Site;
  expect(layerOf(back, 'cover')).toEqual(layerOf(first, 'cover'));
  expect((await list()).map(({ replacedAt }) => replacedAt === null)).toEqual([true, false]);
  await modeller.post(`/api/sites/${first.id}/layers/${before.layer.id}/put-back`).expect(409);
  const other = await makeSite(modeller, team.teamId);
  await modeller.post(`/api/sites/${other.id}/layers/${now.layer.id}/put-back`).expect(404);
});

it('keeps what is said about a layer: a note, and what heights are in', async () => {
  const { modeller } = team.agents;
  const { id } = await makeSite(modeller, team.teamId);
  const site = (await uploadLayer(modeller, id, 'elevation', heights()).expect(200)).body as Site;
  expect(layerOf(site, 'elevation')).toMatchObject({ vertical: { datum: '', unit: 'metre' }, minimum: -1 });
  const patch = (part: string, change: object) =>
    modeller.patch(`/api/sites/${id}/layers/${layerOf(site, part).id}`).send(change);
  const vertical = { datum: 'mean sea level', unit: 'foot' };
  const changed = (await patch('elevation', { vertical, note: ' from a drone ' }).expect(200)).body as Site;
  expect(layerOf(changed, 'elevation')).toMatchObject({ vertical, note: 'from a drone' });
  await patch('cover', { vertical }).expect(400);
  await patch('elevation', { unit: 'percent' }).expect(400);
});

it('keeps curves of elevation whose points rise, and the levels of the tide', async () => {
  const { modeller, manager } = team.agents;
  const { id } = await makeSite(modeller, team.teamId);
  const put = (elevationCurves: ElevationCurves) =>
    modeller
      .put(`/api/sites/${id}/elevation-curves`)
      .send({ elevationCurves, tidalDatums: [{ name: 'mean high water', height: 1.2 }] });
  const none = { capacity: null, vigour: null, exposure: null };
  const capacity: [number, number][] = [
    [-0.5, 0],
    [0.25, 1],
    [1.5, 0.2],
  ];
  await put({ ...none, capacity }).expect(200);
  expect((await manager.get(`/api/sites/${id}`)).body).toMatchObject({
    elevationCurves: { capacity, vigour: null },
    tidalDatums: [{ name: 'mean high water', height: 1.2 }],
  });
  const falling = await put({ ...none, vigour: [capacity[1], capacity[0]] }).expect(400);
  expect(falling.body.fields).toMatchObject([
    { field: 'elevationCurves.vigour', message: expect.stringContaining('higher') as string },
  ]);
  await put({ ...none, vigour: [capacity[0]] }).expect(400);
});

it('keeps a replaced layer for the comparisons that stand on it', async () => {
  const { modeller } = team.agents;
  const first = await makeSite(modeller, team.teamId);
  const comparison = await startTestComparison(modeller, first);
  const cover = layerOf(first, 'cover');
  await uploadLayer(modeller, first.id, 'cover', geoTiff(new Float32Array(24).fill(0.2))).expect(200);
  const dependents = await modeller.get(`/api/sites/${first.id}/layers/${cover.id}/dependents`).expect(200);
  expect(dependents.body).toMatchObject({ runs: 0, comparisons: 1 });
  const refused = await modeller.delete(`/api/sites/${first.id}/layers/${cover.id}`).expect(409);
  expect((refused.body as { detail: string }).detail).toMatch(/1 comparison that stands on this layer/);
  await modeller.get(`/api/sites/${first.id}/layer-values/${cover.hash}`).expect(200);
  await modeller.delete(`/api/sites/${first.id}/comparisons/${comparison.id}`).expect(204);
  await modeller.delete(`/api/sites/${first.id}/layers/${cover.id}`).expect(200);
});
