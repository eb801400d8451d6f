import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Fit, FitState, FitSummary } from '#contract/fits.ts';
import { resurveysOf } from '#contract/layer-sources.ts';
import type { Problem } from '#contract/problem.ts';
import type { Site } from '#contract/sites.ts';
import { addResurvey, firstGeneration, fitFor, startTestFit } from '#server/testing/fits.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { cover, makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Fitting team');
  site = await makeSite(team.agents.modeller, team.teamId);
  await addResurvey(team.agents.modeller, site.id, 2026);
  site = await addResurvey(team.agents.modeller, site.id, 2028);
});
afterAll(() => server.close());

const pathOf = (fit: Fit, rest = '') => `/api/sites/${site.id}/fits/${fit.id}${rest}`;
const get = async (fit: Fit) => (await team.agents.trainer.get(pathOf(fit)).expect(200)).body as Fit;
const put = (fit: Fit, state: FitState) => team.agents.modeller.put(pathOf(fit, '/state')).send(state);
const fieldsOf = (body: unknown) => (body as Problem).fields?.map(({ field }) => field);

describe('resurveys', () => {
  it('stand once a year, beside each other and beside the cover', async () => {
    expect(resurveysOf(site).map(({ year }) => year)).toEqual([2026, 2028]);
    const again = await addResurvey(team.agents.modeller, site.id, 2028);
    expect(resurveysOf(again).map(({ year }) => year)).toEqual([2026, 2028]);
    expect(again.layers.filter(({ part }) => part === 'cover')).toHaveLength(1);
    const history = await team.agents.modeller
      .get(`/api/sites/${site.id}/layer-history?part=resurvey`)
      .expect(200);
    expect((history.body as { entries: unknown[] }).entries).toHaveLength(3);
    site = again;
  });

  it('need a year, and nothing else has one', async () => {
    const send = (fields: Record<string, string>) => {
      const request = team.agents.modeller.post(`/api/sites/${site.id}/layers`);
      for (const [name, value] of Object.entries(fields)) void request.field(name, value);
      return request.attach('file', cover(), 'cover.tif').expect(400);
    };
    expect(fieldsOf((await send({ part: 'resurvey' })).body)).toEqual(['year']);
    expect(fieldsOf((await send({ part: 'cover', year: '2030' })).body)).toEqual(['year']);
    expect(fieldsOf((await send({ part: 'resurvey', year: '30' })).body)).toEqual(['year']);
  });

  it('take another year unless there is one of it', async () => {
    const [first] = resurveysOf(site);
    const change = (year: number) =>
      team.agents.modeller.patch(`/api/sites/${site.id}/layers/${first.id}`).send({ year });
    expect(fieldsOf((await change(2028).expect(400)).body)).toEqual(['year']);
    const changed = (await change(2027).expect(200)).body as Site;
    expect(resurveysOf(changed).map(({ year }) => year)).toEqual([2027, 2028]);
    site = (await change(2026).expect(200)).body as Site;
  });
});

describe('a fit', () => {
  it('is listed with what it fits and to what', async () => {
    const fit = await startTestFit(team.agents.modeller, site);
    expect(fit).toMatchObject({ status: 'running', runs: 0, generations: 0, accepted: null });
    const { body } = await team.agents.trainer.get(`/api/sites/${site.id}/fits`).expect(200);
    const { fits } = body as { fits: FitSummary[] };
    expect(fits[0]).toMatchObject({
      id: fit.id,
      rates: ['lateralSpread', 'fillRate'],
      years: [2026, 2028],
      mostRuns: 200,
    });
  });

  it.each<[object, string]>([
    [{ data: { maps: [], areas: [], fronts: [] }, figures: [] }, 'figures'],
    [{ data: { maps: [], areas: [], fronts: [] } }, 'data'],
    [{ data: { maps: [], areas: [{ year: 2024, area: 1, error: 0 }], fronts: [] } }, 'data.areas.0.year'],
    [{ data: { maps: [], areas: [{ year: 2029, area: 1, error: 0 }], fronts: [] } }, 'data.areas.0.year'],
    [
      { data: { maps: [], areas: [], fronts: [{ from: 2026, until: 2026, speed: 1, error: 0 }] } },
      'data.fronts.0.until',
    ],
    [
      {
        data: {
          maps: [{ layer: 'a'.repeat(64), unit: 'share', year: 2026, areaError: 0 }],
          areas: [],
          fronts: [],
        },
      },
      'data.maps.0.layer',
    ],
    [
      { rates: [{ name: 'lateralSpread', belief: { law: 'uniform', low: 2, high: 1 } }] },
      'rates.0.belief.high',
    ],
    [{ rates: [{ name: 'grazingRate', belief: { law: 'uniform', low: 0.1, high: 1 } }] }, 'rates.0.name'],
    [{ priorRuns: 41, population: 21 }, 'priorRuns'],
    [{ mostRuns: 40, priorRuns: 50 }, 'mostRuns'],
    [{ figures: [{ kind: 'area', year: 2026, observed: 1, error: 0 }] }, 'figures'],
  ])('that cannot be is refused: %o at %s', async (changes, field) => {
    const { body } = await team.agents.modeller
      .post(`/api/sites/${site.id}/fits`)
      .send(fitFor(site, changes))
      .expect(400);
    expect(fieldsOf(body)).toContain(field);
  });

  it('keeps the furthest state, takes it twice, and ends with it', async () => {
    const fit = await startTestFit(team.agents.modeller, site);
    const state = firstGeneration(fit);
    await put(fit, state).expect(200);
    await put(fit, state).expect(200);
    await put(fit, { ...state, runs: 39 }).expect(409);
    expect(await get(fit)).toMatchObject({ runs: 40, generations: 1, status: 'running', state });
    await put(fit, { ...state, runs: 60, tried: 20, ending: 'no more runs' }).expect(200);
    expect(await get(fit)).toMatchObject({ runs: 60, status: 'finished' });
    await put(fit, { ...state, runs: 80 }).expect(409);
  });

  it('takes no state of other rates or figures', async () => {
    const fit = await startTestFit(team.agents.modeller, site);
    const state = firstGeneration(fit);
    const [member] = state.population;
    const refused = async (changes: Partial<FitState>) =>
      fieldsOf((await put(fit, { ...state, ...changes }).expect(400)).body);
    expect(await refused({ population: [{ ...member, point: [0.5] }] })).toEqual(['population.0.point']);
    expect(await refused({ kept: [{ ...member, summaries: [1] }] })).toEqual(['kept.0.summaries']);
    expect(await refused({ runs: 201 })).toEqual(['runs']);
    expect(await get(fit)).toMatchObject({ runs: 0 });
  });

  it('stops and goes on; what is sent meanwhile is refused', async () => {
    const fit = await startTestFit(team.agents.modeller, site);
    await team.agents.modeller.post(pathOf(fit, '/stop')).expect(200);
    await put(fit, firstGeneration(fit)).expect(409);
    const { body } = await team.agents.modeller.post(pathOf(fit, '/resume')).expect(200);
    expect(body).toMatchObject({ status: 'running' });
    await put(fit, firstGeneration(fit)).expect(200);
  });

  it('keeps its rasters: one of the history cannot go while a fit stands on it', async () => {
    const fit = await startTestFit(team.agents.modeller, site);
    const layer = resurveysOf(site)[0];
    const path = `/api/sites/${site.id}/layers/${layer.id}`;
    await team.agents.modeller.delete(path).expect(200);
    const { body } = await team.agents.modeller.delete(path).expect(409);
    expect((body as Problem).detail).toMatch(/fits? that stand/);
    await team.agents.modeller.post(`${path}/put-back`).expect(200);
    await team.agents.modeller.delete(pathOf(fit)).expect(204);
    await team.agents.modeller.get(pathOf(fit)).expect(404);
  });
});

describe('accepting a fit', () => {
  const accept = (fit: Fit) => team.agents.modeller.post(pathOf(fit, '/accept'));

  it('waits for a generation and for the end of the work', async () => {
    const fit = await startTestFit(team.agents.modeller, site);
    await accept(fit).expect(409);
    await team.agents.modeller.post(pathOf(fit, '/stop')).expect(200);
    const { body } = await accept(fit).expect(409);
    expect((body as Problem).detail).toMatch(/0 runs of 40/);
  });

  it('gives the plant the fitted laws, their medians and where they come from', async () => {
    const fit = await startTestFit(team.agents.modeller, site);
    await put(fit, firstGeneration(fit, { ending: 'enough' })).expect(200);
    const { body } = await accept(fit).expect(200);
    expect((body as Fit).accepted).toMatchObject({ what: 'plant of the site' });
    const { plant, plantSet } = (await team.agents.trainer.get(`/api/sites/${site.id}`).expect(200))
      .body as Site;
    expect(plantSet).toBe(true);
    const { lateralSpread } = plant.beliefs;
    if (lateralSpread?.law !== 'values') throw new Error('Expected a law of values');
    // Shares 0 to 0.2 of 0.5 to 1.5.
    expect(Math.min(...lateralSpread.values)).toBeGreaterThanOrEqual(0.5);
    expect(Math.max(...lateralSpread.values)).toBeLessThanOrEqual(0.7);
    expect(plant.rates.lateralSpread).toBeCloseTo(0.6, 10);
    expect(plant.rates.fillRate).toBeCloseTo(1, 10);
    expect(plant.sources.lateralSpread).toMatchObject({ sure: 'measured here' });
    expect(plant.sources.lateralSpread?.source).toMatch(/“A fit” of .* resurveys of 2026, 2028/);
    expect(plant.sources.tolerance).toBeUndefined();
  });

  it('adds a version to the profile that the plant came from', async () => {
    const { plant } = (await team.agents.modeller.get(`/api/sites/${site.id}`).expect(200)).body as Site;
    const kept = await team.agents.modeller
      .post(`/api/teams/${team.teamId}/plants`)
      .send({ plant, note: '' })
      .expect(200);
    const plantId = (kept.body as { id: string }).id;
    const origin = { kind: 'library', plantId, version: 1 };
    await team.agents.modeller
      .put(`/api/sites/${site.id}/plant`)
      .send({ ...plant, origin })
      .expect(200);
    const fit = await startTestFit(team.agents.modeller, site, { name: 'Second fit' });
    await put(fit, firstGeneration(fit, { ending: 'enough' })).expect(200);
    await accept(fit).expect(200);
    const after = (await team.agents.modeller.get(`/api/sites/${site.id}`).expect(200)).body as Site;
    expect(after.plantOrigin).toMatchObject({ origin: { plantId, version: 2 }, latest: 2, changed: false });
  });
});
