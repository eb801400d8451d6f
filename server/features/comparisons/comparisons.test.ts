import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { replicateSpec, type Comparison } from '#contract/comparisons.ts';
import { ratesOfRun } from '#sim-core/belief/rates-of-run.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import type { Option } from '#contract/options.ts';
import type { Problem } from '#contract/problem.ts';
import type { Site } from '#contract/sites.ts';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { processesSchema } from '#sim-core/spec/processes.ts';
import { unitCostsSchema } from '#sim-core/spec/unit-costs.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import { binaryReply } from '#server/testing/binary-reply.ts';
import { optionsOf, planFor, replicateOf, startTestComparison } from '#server/testing/comparisons.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { packed, sendBytes } from '#server/testing/runs.ts';
import { makeSite, storedFiles } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
let mounds: Option;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Comparing team');
  site = await makeSite(team.agents.modeller, team.teamId);
  const { originX, originY, cellSize } = site.grid;
  const mound = { kind: 'mound', year: 2025, x: originX + cellSize, y: originY - cellSize, radius: 2 };
  const made = await team.agents.manager
    .post(`/api/sites/${site.id}/options`)
    .send({ name: 'Mounds', works: [mound] })
    .expect(200);
  mounds = made.body as Option;
});
afterAll(() => server.close());

const pathOf = (comparison: Comparison, rest = '') =>
  `/api/sites/${site.id}/comparisons/${comparison.id}${rest}`;
const put = (comparison: Comparison, option: number, replicates: ReplicateRecord[], status = 200) =>
  team.agents.modeller
    .put(pathOf(comparison, `/ensembles/${option}/0/replicates`))
    .send({ replicates })
    .expect(status);
const get = async (comparison: Comparison) =>
  (await team.agents.trainer.get(pathOf(comparison)).expect(200)).body as Comparison;

describe('a comparison', () => {
  it('keeps the works and the settings of its options as they were, and lists newest first', async () => {
    const { manager, trainer } = team.agents;
    const unitCosts = unitCostsSchema.parse({ currency: 'EUR', mound: 1000, budget: 5000 });
    const comparison = await startTestComparison(manager, site, { unitCosts });
    expect((await get(comparison)).plan.unitCosts).toEqual(unitCosts);
    expect(comparison).toMatchObject({
      name: 'A comparison',
      status: 'running',
      ending: null,
      done: 0,
      decision: null,
      startedBy: 'Comparing team: manager',
      grid: site.grid,
    });
    expect(comparison.plan.options.map(({ name, wait, cost }) => [name, wait, cost])).toEqual([
      ['Wait', true, 0],
      ['Mounds', false, 1000],
    ]);
    await manager
      .patch(`/api/sites/${site.id}/options/${mounds.id}`)
      .send({ revision: mounds.revision, works: [] })
      .expect(200);
    const later = await get(comparison);
    expect(later.plan.options[1].actions).toHaveLength(1);
    const spec = replicateSpec(later.plan, 1, 0, 3);
    expect(runSpecSchema.parse(spec)).toEqual(spec);
    expect(spec).toMatchObject({ replicate: 3, seed: 'low tide', actions: [{ kind: 'mound' }] });
    const list = await trainer.get(`/api/sites/${site.id}/comparisons`).expect(200);
    expect(list.body).toMatchObject({
      total: 1,
      comparisons: [{ options: ['Wait', 'Mounds'], outlooks: ['As drawn'], replicates: 8, done: 0 }],
    });
  });

  it('carries what each outlook changes into its runs, and nothing where it changes nothing', () => {
    const processes = { grazers: processesSchema.parse({ grazers: {} }).grazers, fragments: undefined };
    const plan = {
      common: { seed: 'low tide', processes } as unknown as Comparison['plan']['common'],
      options: [{ actions: [] } as unknown as Comparison['plan']['options'][number]],
      outlooks: [
        { name: 'As recorded', droughtIndex: -1 },
        {
          ...{ name: 'Drier, no snails', droughtIndex: -1, grazing: false },
          ...{ trend: { shiftPerDecade: -0.3 }, losses: [{ year: 2030, share: 0.2 }] },
        },
      ],
    };
    const [plain, changed] = [replicateSpec(plan, 0, 0, 0), replicateSpec(plan, 0, 1, 0)];
    expect(Object.keys(plain)).toEqual(['seed', 'processes', 'replicate', 'droughtIndex', 'actions']);
    expect(plain.processes.grazers).toBeDefined();
    expect(changed).toMatchObject({
      trend: { shiftPerDecade: -0.3 },
      losses: [{ year: 2030, share: 0.2 }],
      processes: { grazers: undefined },
    });
  });

  it('refuses a loss that lies off the site at its outlook', async () => {
    const plan = planFor(site, await optionsOf(team.agents.manager, site.id));
    const area = { shape: 'disc', x: 1e7, y: 1e7, radius: 3 };
    const outlooks = [
      { ...plan.outlooks[0], losses: [{ year: site.outlook.surveyYear + 1, share: 0.5, area }] },
    ];
    const { body } = await team.agents.manager
      .post(`/api/sites/${site.id}/comparisons`)
      .send({ ...plan, outlooks })
      .expect(400);
    expect((body as Problem).fields?.map(({ field }) => field)).toEqual(['outlooks.0.losses.0.area']);
  });

  it('takes replicates piece by piece, and a repeated piece once', async () => {
    const comparison = await startTestComparison(team.agents.modeller, site);
    expect((await put(comparison, 0, [replicateOf(0), replicateOf(2)])).body).toEqual({ done: 2 });
    expect((await put(comparison, 0, [replicateOf(2), replicateOf(1)])).body).toEqual({ done: 3 });
    expect((await get(comparison)).done).toBe(0);
    await put(comparison, 1, [replicateOf(5)]);
    const now = await get(comparison);
    expect(now.done).toBe(1);
    expect(now.ensembles.map(({ option, outlook, done }) => [option, outlook, done])).toEqual([
      [0, 0, 3],
      [1, 0, 1],
    ]);
    const page = await team.agents.trainer
      .get(pathOf(comparison, '/ensembles/0/0/replicates?offset=1&limit=1'))
      .expect(200);
    expect(page.body).toEqual({ replicates: [replicateOf(1)], total: 3 });
  });

  it('refuses a replicate that came to another digest, and keeps none of its piece', async () => {
    const comparison = await startTestComparison(team.agents.modeller, site);
    await put(comparison, 0, [replicateOf(0)]);
    const refused = await put(
      comparison,
      0,
      [replicateOf(1), replicateOf(0, { digest: 'f'.repeat(64) })],
      422,
    );
    expect(refused.body).toMatchObject({ code: 'digest-mismatch' });
    expect((await get(comparison)).ensembles[0].done).toBe(1);
  });

  it('names what a replicate has wrong', async () => {
    const comparison = await startTestComparison(team.agents.modeller, site);
    for (const [changes, field] of [
      [{ replicate: 8 }, 'replicates.0.replicate'],
      [{ coveredArea: [1] }, 'replicates.0.coveredArea'],
      [{ droughtIndex: [1] }, 'replicates.0.droughtIndex'],
      [{ recoveredYear: 2050 }, 'replicates.0.recoveredYear'],
    ] as const) {
      const refused = await put(comparison, 0, [replicateOf(0, changes as Partial<ReplicateRecord>)], 400);
      expect((refused.body as Problem).fields?.[0].field).toBe(field);
    }
    await put(comparison, 2, [replicateOf(0)], 404);
  });

  it('knows what its replicates draw, and refuses other draws and draws that cannot be run', async () => {
    const { modeller } = team.agents;
    const { common } = planFor(site, []);
    const withBelief = (low: number) => ({
      common: {
        ...common,
        uncertain: { draws: 8, rates: { lateralSpread: { law: 'uniform', low, high: 1.5 } } },
      },
    });
    const comparison = await startTestComparison(modeller, site, withBelief(0.8));
    const drawn = (replicate: number) => ratesOfRun(replicateSpec(comparison.plan, 1, 0, replicate)).drawn;
    expect(drawn(0).lateralSpread).toBeGreaterThan(0.8);
    await put(comparison, 1, [replicateOf(0, { drawn: drawn(0) })]);
    const page = await modeller.get(pathOf(comparison, '/ensembles/1/0/replicates')).expect(200);
    expect((page.body as { replicates: ReplicateRecord[] }).replicates[0].drawn).toEqual(drawn(0));
    for (const wrong of [{}, drawn(2)]) {
      const refused = await put(comparison, 1, [replicateOf(1, { drawn: wrong })], 400);
      expect((refused.body as Problem).fields?.[0].field).toBe('replicates.0.drawn.lateralSpread');
    }
    const clash = await modeller
      .post(`/api/sites/${site.id}/comparisons`)
      .send(planFor(site, await optionsOf(modeller, site.id), withBelief(0.005)))
      .expect(400);
    expect((clash.body as Problem).fields?.[0]).toMatchObject({
      field: 'common.uncertain.rates.lateralSpread',
      message: expect.stringMatching(/of 8 futures draw rates that cannot be run/) as string,
    });
    const grazed = await startTestComparison(modeller, site, {
      ...{ replicates: 2, outlooks: [{ name: 'Ungrazed', droughtIndex: 0, grazing: false }] },
      common: {
        ...common,
        processes: { grazers: {} },
        uncertain: {
          draws: 2,
          rates: {
            tolerance: { law: 'uniform', low: -3, high: -2 },
            grazingRate: { law: 'uniform', low: 0, high: 1 },
          },
        },
      },
    });
    const ungrazed = ratesOfRun(replicateSpec(grazed.plan, 0, 0, 0)).drawn;
    expect(Object.keys(ungrazed)).toEqual(['tolerance']);
    // The first two futures are fine, a later one is not; nobody may go on into that.
    const some = await startTestComparison(modeller, site, { ...withBelief(0.05), replicates: 2 });
    const more = await modeller.post(pathOf(some, '/resume')).send({ replicates: 2000 });
    const all = await modeller.post(pathOf(some, '/copies')).send({ name: 'More', replicates: 2000 });
    expect([more.status, all.status]).toEqual([400, 400]);
  });

  it('stores maps and the counts behind them, each in the place of the one before', async () => {
    const comparison = await startTestComparison(team.agents.modeller, site);
    const { modeller, trainer } = team.agents;
    const closing = Int16Array.from({ length: 24 }, (_, i) => 2024 + (i % 4));
    const path = (rest: string) => pathOf(comparison, `/ensembles/1/0/${rest}`);
    await sendBytes(modeller, path('maps/closing?replicates=4'), packed(closing)).expect(204);
    await sendBytes(modeller, path('maps/chance-2026?replicates=4'), packed(new Uint8Array(24))).expect(204);
    await sendBytes(
      modeller,
      path('maps-state?replicates=4'),
      Buffer.from('whatever the browser needs'),
    ).expect(204);
    expect((await get(comparison)).ensembles[1]).toMatchObject({
      maps: { closing: 4, 'chance-2026': 4 },
      mapsState: 4,
    });
    const reply = await binaryReply(trainer.get(path('maps/closing'))).expect(200);
    expect(decodeCellValues(reply.body as Buffer).values).toEqual(closing);
    const state = await binaryReply(trainer.get(path('maps-state'))).expect(200);
    expect(String(state.body)).toBe('whatever the browser needs');
    const before = storedFiles(server).blobs.length;
    await sendBytes(modeller, path('maps-state?replicates=8'), Buffer.from('more of it')).expect(204);
    expect(storedFiles(server).blobs).toHaveLength(before);
    expect((await get(comparison)).ensembles[1].mapsState).toBe(8);
    await sendBytes(modeller, path('maps/closing?replicates=8'), packed(new Uint8Array(24))).expect(400);
    await sendBytes(modeller, path('maps/nothing?replicates=8'), packed(closing)).expect(400);
    await trainer.get(pathOf(comparison, '/ensembles/0/0/maps/closing')).expect(404);
  });

  it('ends, resumes for more, and takes nothing while it stands', async () => {
    const comparison = await startTestComparison(team.agents.modeller, site);
    const { modeller } = team.agents;
    const ended = await modeller
      .post(pathOf(comparison, '/end'))
      .send({ ending: 'all replicates' })
      .expect(200);
    expect(ended.body).toMatchObject({ status: 'finished', ending: 'all replicates' });
    expect((await put(comparison, 0, [replicateOf(0)], 409)).body).toMatchObject({ code: 'conflict' });
    const resumed = await modeller.post(pathOf(comparison, '/resume')).send({ replicates: 20 }).expect(200);
    expect(resumed.body).toMatchObject({ status: 'running', ending: null, plan: { replicates: 20 } });
    await put(comparison, 0, [replicateOf(19)]);
    expect((await get(comparison)).events.map(({ what }) => what)).toEqual([
      'started',
      'ended, as all futures were run',
      'resumed, for 20 replicates of each option',
    ]);
  });
});

describe('a decision', () => {
  it('is taken by a manager, freezes the comparison, and a copy goes on', async () => {
    const { manager, modeller, trainer } = team.agents;
    const comparison = await startTestComparison(modeller, site);
    const decision = {
      optionId: mounds.id,
      reason: 'Closes in time.',
      reservations: 'Two rates are assumed.',
    };
    const decide = pathOf(comparison, '/decision');
    expect((await manager.post(decide).send(decision).expect(409)).body).toMatchObject({
      detail: expect.stringMatching(/at least 2/) as string,
    });
    for (const option of [0, 1]) await put(comparison, option, [replicateOf(0), replicateOf(1)]);
    await sendBytes(
      modeller,
      pathOf(comparison, '/ensembles/0/0/maps/closing?replicates=2'),
      packed(new Int16Array(24)),
    ).expect(204);
    await manager
      .post(decide)
      .send({ ...decision, optionId: site.id })
      .expect(400);
    await manager
      .post(decide)
      .send({ ...decision, reason: ' ' })
      .expect(400);
    const decided = (await manager.post(decide).send(decision).expect(200)).body as Comparison;
    expect(decided).toMatchObject({
      status: 'stopped',
      decision: { ...decision, optionName: 'Mounds', decidedBy: 'Comparing team: manager' },
    });
    expect(decided.events.at(-1)).toMatchObject({
      what: 'decided for “Mounds”',
      by: 'Comparing team: manager',
    });
    // Nothing of it changes any more.
    await manager.post(decide).send(decision).expect(409);
    await put(comparison, 0, [replicateOf(3)], 409);
    await modeller.patch(pathOf(comparison)).send({ name: 'Other' }).expect(409);
    await modeller.delete(pathOf(comparison)).expect(409);
    await modeller.post(pathOf(comparison, '/resume')).send({ replicates: 8 }).expect(409);
    await modeller.post(pathOf(comparison, '/end')).send({ ending: 'all replicates' }).expect(409);
    await sendBytes(
      modeller,
      pathOf(comparison, '/ensembles/0/0/maps/closing?replicates=2'),
      packed(new Int16Array(24).fill(1)),
    ).expect(409);
    // The copy has all of it but the decision.
    const copied = (
      await modeller
        .post(pathOf(comparison, '/copies'))
        .send({ name: 'Second look', replicates: 12 })
        .expect(200)
    ).body as Comparison;
    expect(copied).toMatchObject({ name: 'Second look', status: 'stopped', decision: null, done: 2 });
    expect(copied.ensembles[0].maps).toEqual({ closing: 2 });
    await modeller.post(pathOf(copied, '/resume')).send({ replicates: 12 }).expect(200);
    await put(copied, 0, [replicateOf(3)]);
    await modeller.delete(pathOf(copied)).expect(204);
    await trainer.get(pathOf(copied)).expect(404);
    // The map that both had is still there for the other.
    await trainer.get(pathOf(comparison, '/ensembles/0/0/maps/closing')).expect(200);
  });
});

describe('a name', () => {
  it('is changed by whoever runs it, after a decision by those who decide; nothing decided is deleted', async () => {
    const { modeller, manager, trainer } = team.agents;
    const comparison = await startTestComparison(modeller, site);
    const rename = (agent: typeof modeller, name: string, status = 200) =>
      agent.patch(pathOf(comparison)).send({ name }).expect(status);
    expect((await rename(modeller, 'Second name')).body).toMatchObject({ name: 'Second name' });
    await rename(trainer, 'Trained', 403);
    for (const option of [0, 1]) await put(comparison, option, [replicateOf(0), replicateOf(1)]);
    await manager
      .post(pathOf(comparison, '/decision'))
      .send({ optionId: comparison.plan.options[1].optionId, reason: 'Sooner.' })
      .expect(200);
    await rename(modeller, 'Mine', 409);
    await rename(manager, 'Board paper 7');
    await rename(manager, 'Board paper 7');
    const now = await get(comparison);
    expect([now.name, now.decision?.reason]).toEqual(['Board paper 7', 'Sooner.']);
    expect(now.events.map(({ what }) => what).filter((what) => what.startsWith('renamed'))).toEqual([
      'renamed from “A comparison”',
      'renamed from “Second name”',
    ]);
    await manager.delete(pathOf(comparison)).expect(409);
    const copied = await manager
      .post(pathOf(comparison, '/copies'))
      .send({ name: 'Copy', replicates: 8 })
      .expect(200);
    // It waits for somebody to go on with it, not for a decision.
    expect(copied.body).toMatchObject({ status: 'stopped', ending: null, done: 2, decision: null });
    await manager.delete(pathOf(copied.body as Comparison)).expect(204);
    await manager.get(pathOf(copied.body as Comparison)).expect(404);
    expect((await get(comparison)).done).toBe(2);
  });
});

describe('a start is refused', () => {
  const start = async (changes: object) => {
    const plan = planFor(site, await optionsOf(team.agents.modeller, site.id), changes);
    return team.agents.modeller.post(`/api/sites/${site.id}/comparisons`).send(plan);
  };
  it.each<[string, object, string]>([
    [
      'an option of elsewhere',
      { options: [{ optionId: '00000000-0000-4000-8000-000000000000', cost: null }] },
      'options.0.optionId',
    ],
    [
      'a list of the wrong length',
      { outlooks: [{ name: 'Short', droughtIndex: [0, 1] }] },
      'outlooks.0.droughtIndex',
    ],
    ['map years beyond the horizon', { mapYears: [2026, 2040] }, 'mapYears.1'],
    ['one replicate', { replicates: 1 }, 'replicates'],
    ['an unknown field', { extra: 1 }, 'extra'],
  ])('%s', async (_, changes, field) => {
    const reply = await start(changes);
    expect(reply.status).toBe(400);
    expect((reply.body as Problem).fields?.map((problem) => problem.field)).toContain(field);
  });
  it('at a layer of another site', async () => {
    const { common } = planFor(site, []);
    const cover = { layer: 'a'.repeat(64) };
    const reply = await start({ common: { ...common, layers: { ...common.layers, cover } } });
    expect((reply.body as Problem).fields?.[0].field).toBe('common.layers.cover.layer');
  });
});
