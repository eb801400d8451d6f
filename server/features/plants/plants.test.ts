import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { LibraryPlant, Plant } from '#contract/plants.ts';
import type { Problem } from '#contract/problem.ts';
import type { Site } from '#contract/sites.ts';
import { startingPlants } from '#contract/starting-plants.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let other: TestTeam;
let site: Site;
let path: string;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Growing team');
  other = await makeTeam(server, 'Other team');
  site = await makeSite(team.agents.modeller, team.teamId);
  path = `/api/teams/${team.teamId}/plants`;
});
afterAll(() => server.close());

const spread = { law: 'triangular', low: 0.2, mode: 0.5, high: 1.5 } as const;
const plantOf = (changes: Partial<Plant> = {}): Plant => ({
  ...site.plant,
  name: 'Grass',
  beliefs: { lateralSpread: spread },
  sources: { lateralSpread: { sure: 'measured here', source: 'Invented survey' } },
  ...changes,
});
const keep = async (plant: Plant, note = '') =>
  (await team.agents.modeller.post(path).send({ plant, note }).expect(200)).body as LibraryPlant;
const setPlant = async (body: object, status = 200) =>
  (await team.agents.modeller.put(`/api/sites/${site.id}/plant`).send(body).expect(status)).body as unknown;

describe('the library of plants', () => {
  it('keeps versions that never change, newest first, and says who saved them', async () => {
    const { modeller, admin, trainer } = team.agents;
    const first = await keep(plantOf(), 'from the survey');
    expect(first).toMatchObject({
      name: 'Grass',
      archived: false,
      versions: [{ version: 1, note: 'from the survey', savedBy: 'Growing team: modeller' }],
    });
    const faster = plantOf({ rates: { ...site.plant.rates, lateralSpread: 0.7 } });
    const second = await admin
      .post(`${path}/${first.id}/versions`)
      .send({ plant: faster, note: 'faster', latest: 1 })
      .expect(200);
    expect((second.body as LibraryPlant).versions.map(({ version, savedBy }) => [version, savedBy])).toEqual([
      [2, 'Growing team: admin'],
      [1, 'Growing team: modeller'],
    ]);
    const version = (n: number) => trainer.get(`${path}/${first.id}/versions/${n}`);
    expect((await version(1).expect(200)).body).toMatchObject({ plant: plantOf(), note: 'from the survey' });
    expect((await version(2).expect(200)).body).toMatchObject({ plant: faster });
    await version(3).expect(404);
    // Whoever has not seen version 2 must not save over it.
    const late = await modeller
      .post(`${path}/${first.id}/versions`)
      .send({ plant: plantOf(), latest: 1 })
      .expect(409);
    expect((late.body as Problem).detail).toMatch(/Growing team: admin saved version 2 meanwhile/);
  });

  it('copies, renames, archives, and shows nothing to another team', async () => {
    const { modeller } = team.agents;
    const original = await keep(plantOf({ name: 'Reed' }));
    const copy = await modeller.post(`${path}/${original.id}/copies`).send({ name: 'Reed, upper marsh' });
    expect(copy.body).toMatchObject({
      name: 'Reed, upper marsh',
      versions: [{ version: 1, note: 'Copied from “Reed”, version 1' }],
    });
    const changed = await modeller
      .patch(`${path}/${original.id}`)
      .send({ name: 'Old reed', archived: true })
      .expect(200);
    expect(changed.body).toMatchObject({ name: 'Old reed', archived: true });
    const foreign = `/api/teams/${other.teamId}/plants/${original.id}`;
    await other.agents.admin.get(`${foreign}/versions/1`).expect(404);
    await other.agents.admin.patch(foreign).send({ archived: false }).expect(404);
    await other.agents.admin.post(`${foreign}/copies`).send({ name: 'Taken' }).expect(404);
    await other.agents.admin.post(`${foreign}/versions`).send({ plant: plantOf(), latest: 1 }).expect(404);
    expect((await other.agents.admin.get(`/api/teams/${other.teamId}/plants`)).body).toEqual({ plants: [] });
  });

  it.each<[string, object]>([
    ['plant.beliefs.lateralSpread.high', { beliefs: { lateralSpread: { ...spread, high: 50 } } }],
    ['plant.beliefs.grazingRate', { beliefs: { grazingRate: { law: 'uniform', low: 0, high: 1 } } }],
    ['plant.sources.lateralSpread.sure', { sources: { lateralSpread: { sure: 'certain', source: '' } } }],
    [
      'plant.sources.tolerance.range',
      { sources: { tolerance: { sure: 'expert guess', source: '', range: { low: 1, high: 0 } } } },
    ],
    ['plant.fieldNumbers.frontSpeed.value', { fieldNumbers: { frontSpeed: { value: 0, plusMinus: 1 } } }],
    ['plant.rates.fillRate', { rates: { fillRate: 99 } }],
  ])('refuses a plant that is wrong at %s', async (field, wrong) => {
    const plant = { ...plantOf(), ...wrong };
    const reply = await team.agents.modeller.post(path).send({ plant }).expect(400);
    expect((reply.body as Problem).fields?.map((problem) => problem.field)).toEqual([field]);
  });
});

describe('the plant of a site', () => {
  it('remembers the profile that it was taken from, and whether it was changed since', async () => {
    const kept = await keep(plantOf({ name: 'Site grass' }));
    const origin = { kind: 'library', plantId: kept.id, version: 1 };
    const profile = { name: 'Site grass', latest: 1 };
    expect(await setPlant({ ...plantOf(), origin })).toMatchObject({
      plantSet: true,
      plantOrigin: { origin, ...profile, changed: false },
    });
    // Its name and what was measured on the site are the site's own; a rate is not.
    const named = plantOf({ name: 'Ours', fieldNumbers: { frontSpeed: { value: 0.6, plusMinus: 0.1 } } });
    expect(await setPlant(named)).toMatchObject({ plantOrigin: { ...profile, changed: false } });
    expect(await setPlant({ ...named, beliefs: {} })).toMatchObject({
      plantOrigin: { ...profile, changed: true },
    });
    await team.agents.modeller
      .post(`${path}/${kept.id}/versions`)
      .send({ plant: named, latest: 1 })
      .expect(200);
    expect((await team.agents.trainer.get(`/api/sites/${site.id}`)).body).toMatchObject({
      plantOrigin: { origin, latest: 2, changed: true },
    });
    expect(await setPlant({ ...named, origin: null })).toMatchObject({ plantOrigin: null });
  });

  it('is taken from a starting profile, too, and from no other team’s', async () => {
    const [{ key, plant }] = startingPlants;
    expect(await setPlant({ ...plant, origin: { kind: 'starting', key } })).toMatchObject({
      plant,
      plantOrigin: { name: plant.name, latest: null, changed: false },
    });
    const foreign = (await other.agents.modeller
      .post(`/api/teams/${other.teamId}/plants`)
      .send({ plant: plantOf() })
      .expect(200)) as unknown as { body: LibraryPlant };
    for (const origin of [
      { kind: 'library', plantId: foreign.body.id, version: 1 },
      { kind: 'starting', key: 'oak' },
    ]) {
      const refused = (await setPlant({ ...plant, origin }, 400)) as Problem;
      expect(refused.fields?.[0].field).toBe('origin');
    }
  });
});
