import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { LayerHistoryEntry } from '#contract/layers.ts';
import type { Site } from '#contract/sites.ts';
import type { CellSize, GridChange } from '#contract/working-grid.ts';
import { withOtherWorker } from '#server/testing/other-worker.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { openRun, specFor } from '#server/testing/runs.ts';
import { geoTiff, makeSite, smallGrid, storedFiles, uploadLayer } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server);
});
afterAll(() => server.close());

const of = (siteId: string, rest: string) => `/api/sites/${siteId}/${rest}`;
const siteNow = async (id: string) =>
  (await team.agents.modeller.get(`/api/sites/${id}`).expect(200)).body as Site;
const coarsen = async (id: string, factor: number) => {
  await team.agents.modeller.post(of(id, 'grid-change')).send({ factor }).expect(200);
  await server.services.background.idle();
  return siteNow(id);
};
const history = async (id: string, part: string) => {
  const { body } = await team.agents.modeller.get(of(id, `layer-history?part=${part}`)).expect(200);
  return (body as { entries: LayerHistoryEntry[] }).entries;
};

describe('the cells that a site may have', () => {
  it('are said with what they do to the front, to memory and to time', async () => {
    const { modeller, manager } = team.agents;
    const { id } = await makeSite(modeller, team.teamId);
    const { body } = await manager.get(of(id, 'cell-sizes')).expect(200);
    const [fine, double, third] = (body as { cellSizes: CellSize[] }).cellSizes;
    expect(fine).toMatchObject({ factor: 1, grid: smallGrid, cells: 24 });
    expect(double).toMatchObject({ factor: 2, grid: { width: 3, height: 2, cellSize: 4 }, cells: 6 });
    expect(fine.memoryBytes / double.memoryBytes).toBeCloseTo(4, 9);
    expect(fine.secondsPerYear / double.secondsPerYear).toBeCloseTo(4, 9);
    // The default plant's front is slow for such cells: the coarser, the more the lattice shows.
    expect(fine.frontRatio).toBeLessThan(1);
    expect(double.frontRatio ?? 0).toBeLessThan(fine.frontRatio!);
    expect(double).toMatchObject({ problem: null });
    expect([...double.warnings, ...(third?.warnings ?? [])].join()).toMatch(/cell/i);
  });

  it('says on which no run could start, and what would mend it', async () => {
    const { modeller } = team.agents;
    const site = await makeSite(modeller, team.teamId);
    const sizesWith = async (rates: object, stepsPerYear = 1, more: object = {}) => {
      const plant = { name: 'slow', rates: { ...site.plant.rates, ...rates }, ...more };
      await modeller.put(of(site.id, 'plant')).send(plant).expect(200);
      const outlook = { ...site.outlook, stepsPerYear };
      await modeller.put(of(site.id, 'outlook')).send(outlook).expect(200);
      const { body } = await modeller.get(of(site.id, 'cell-sizes')).expect(200);
      return (body as { cellSizes: CellSize[] }).cellSizes;
    };
    const [fine, double] = await sizesWith({ lateralSpread: 0.05 });
    expect(fine.problem === null).toBe(fine.frontRatio !== null);
    expect(double).toMatchObject({ frontRatio: null, warnings: [] });
    expect(double.problem).toMatch(
      /Use cells of [\d.]+ m or less, or a lateral spread of [\d.]+ m\/yr or more/,
    );
    // What the sentence names must do.
    const spread = Number(/lateral spread of ([\d.]+)/.exec(double.problem!)![1]);
    expect((await sizesWith({ lateralSpread: spread }))[1].problem).toBeNull();
    const herd = { processes: { grazers: { grazerSpread: 150 } } };
    const [far] = await sizesWith({}, 1, herd);
    expect(far.problem).toMatch(/Grazers that move 150 m .* With .*steps a year one could start\.$/);
    const steps = Number(/With (\d+)/.exec(far.problem!)![1]);
    expect((await sizesWith({}, steps, herd))[0].problem).toBeNull();
  });

  it('say what they make of small surveyed places', async () => {
    const { modeller } = team.agents;
    const site = await makeSite(modeller, team.teamId);
    const reply = await modeller
      .post(of(site.id, 'feature-imports'))
      .field('kind', 'refuge')
      .field('radius', '2')
      .field('take', 'all')
      .attach('file', Buffer.from('x,y\n412205,5301896\n'), 'reefs.csv')
      .expect(200);
    expect((reply.body as { cautions: string[] }).cautions).toEqual([]);
    const { body } = await modeller.get(of(site.id, 'cell-sizes')).expect(200);
    const [fine, double] = (body as { cellSizes: CellSize[] }).cellSizes;
    expect(fine.warnings.join()).not.toContain('refuge');
    expect(double.warnings.join()).toContain('1 of 1 surveyed refuges is narrower than two cells of 4 m');
  });
});

describe('a site that gets coarser cells', () => {
  it('aligns its layers anew at once, keeps its class table, and leaves runs their own', async () => {
    const { modeller } = team.agents;
    const before = await makeSite(modeller, team.teamId);
    const run = await openRun(modeller, before, specFor(before));
    const after = await coarsen(before.id, 2);
    expect(after).toMatchObject({ grid: { cellSize: 4, width: 3, height: 2 }, finestGrid: smallGrid });
    const [habitat, cover] = after.layers;
    expect(habitat).toMatchObject({ part: 'habitat', dataType: 'uint8', alignment: { method: 'majority' } });
    expect(habitat.classes).toEqual(before.layers[0].classes);
    expect(cover).toMatchObject({
      part: 'cover',
      grid: after.grid,
      alignment: { method: 'area-weighted' },
      unit: 'share',
    });
    expect(cover.source).toEqual(before.layers[1].source);
    // Shares 0, 0.04 … 0.92 in 6 columns: the first four cells are 0, 1, 6 and 7 times 0.04.
    expect(cover.minimum).toBeCloseTo((0 + 1 + 6 + 7) * 0.01, 6);
    // The run keeps its grid and rasters; a new one must name those of the new cells.
    const kept = (await modeller.get(`/api/runs/${run.id}`).expect(200)).body as {
      grid: unknown;
      layers: { hash: string }[];
    };
    expect(kept.grid).toEqual(smallGrid);
    expect(kept.layers).toHaveLength(2);
    for (const { hash } of kept.layers) await modeller.get(of(before.id, `layer-values/${hash}`)).expect(200);
    const { body: options } = await modeller.get(of(before.id, 'options')).expect(200);
    const stale = await modeller
      .post(of(before.id, 'runs'))
      .send({
        name: 'stale',
        optionId: (options as { options: { id: string }[] }).options[0].id,
        spec: specFor(before),
      })
      .expect(400);
    expect(stale.body.fields[0]).toMatchObject({ field: 'spec.layers.capacity.layer' });
    await openRun(modeller, after, specFor(after));
    await modeller.post(of(before.id, 'grid-change')).send({ factor: 2 }).expect(409);
  });

  it('gets its finest cells back byte for byte', async () => {
    const { modeller } = team.agents;
    const before = await makeSite(modeller, team.teamId);
    const files = storedFiles(server);
    await coarsen(before.id, 3);
    const after = await coarsen(before.id, 1);
    expect(after.grid).toEqual(smallGrid);
    expect(after.layers.map(({ hash }) => hash)).toEqual(before.layers.map(({ hash }) => hash));
    // No run stood on the coarser ones, so they are forgotten.
    expect(storedFiles(server)).toEqual(files);
    expect(await history(before.id, 'cover')).toHaveLength(1);
  });

  it('puts back a layer of its earlier cells by aligning its file anew', async () => {
    const { modeller } = team.agents;
    const before = await makeSite(modeller, team.teamId);
    await openRun(modeller, before, specFor(before));
    await coarsen(before.id, 2);
    const [now, old] = await history(before.id, 'habitat');
    expect([now.replacedAt, now.runs, old.runs]).toEqual([null, 0, 1]);
    await modeller.post(of(before.id, `layers/${old.layer.id}/put-back`)).expect(200);
    await server.services.background.idle();
    const habitat = (await siteNow(before.id)).layers.find(({ part }) => part === 'habitat')!;
    expect(habitat.id).not.toBe(now.layer.id);
    expect(habitat).toMatchObject({
      grid: { cellSize: 4 },
      classes: old.layer.classes,
      source: old.layer.source,
    });
  });

  it('does it again when a layer is replaced meanwhile', async () => {
    const { modeller } = team.agents;
    const { services } = server;
    const { id } = await makeSite(modeller, team.teamId);
    const newer = geoTiff(Float32Array.from({ length: 24 }, (_, i) => i / 77));
    const ours = services.backgroundRasters;
    let replaced = false;
    services.backgroundRasters = {
      ...ours,
      run: async (task, progress) => {
        if (!replaced) await uploadLayer(modeller, id, 'cover', newer, 'newer.tif').expect(200);
        replaced = true;
        return ours.run(task, progress);
      },
    };
    const after = await coarsen(id, 2);
    services.backgroundRasters = ours;
    expect(after.layers.map(({ grid }) => grid.cellSize)).toEqual([4, 4]);
    expect(after.layers.find(({ part }) => part === 'cover')?.source.fileName).toBe('newer.tif');
  });

  it('stays as it was when the work breaks off, and can be asked again', async () => {
    const { modeller } = team.agents;
    const before = await makeSite(modeller, team.teamId);
    const files = storedFiles(server);
    await withOtherWorker(server, 'dies', async () => {
      await modeller.post(of(before.id, 'grid-change')).send({ factor: 2 }).expect(200);
      await server.services.background.idle();
    });
    const { body } = await modeller.get(of(before.id, 'grid-change')).expect(200);
    expect((body as { gridChange: GridChange }).gridChange).toMatchObject({
      state: 'failed',
      problem: expect.stringContaining('Ask again') as string,
    });
    expect(await siteNow(before.id)).toEqual(before);
    expect(storedFiles(server)).toEqual(files);
    expect((await coarsen(before.id, 2)).grid.cellSize).toBe(4);
  });
});
