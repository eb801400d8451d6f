import { afterAll, beforeAll, expect, it } from 'vitest';
import type { UnitCosts } from '#sim-core/spec/unit-costs.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let path: string;
const costs: UnitCosts = {
  currency: 'NOK',
  mound: 420,
  clump: 3.5,
  fenceMetre: 12,
  visit: 900,
  visitsPerYear: 2,
  perYear: 0,
  budget: 20_000,
  discountRate: 0.03,
};

beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Cost team');
  path = `/api/sites/${(await makeSite(team.agents.modeller, team.teamId)).id}/costs`;
});
afterAll(() => server.close());

it('a site has no costs until somebody sets them, and then says who did', async () => {
  const before = await team.agents.trainer.get(path).expect(200);
  expect(before.body).toMatchObject({ costs: { mound: 0, budget: null }, changedBy: null });
  const set = await team.agents.manager.put(path).send(costs).expect(200);
  expect(set.body).toMatchObject({ costs, changedBy: 'Cost team: manager' });
  await team.agents.modeller
    .put(path)
    .send({ ...costs, budget: null })
    .expect(200);
  const after = await team.agents.trainer.get(path).expect(200);
  expect(after.body).toMatchObject({ costs: { ...costs, budget: null }, changedBy: 'Cost team: modeller' });
});

it.each([
  ['currency', { currency: 'XXQ' }],
  ['currency', { currency: 'euro' }],
  ['mound', { mound: -1 }],
  ['visit', { visit: '900' }],
  ['budget', { budget: 1e13 }],
  ['discountRate', { discountRate: 3 }],
  ['visitsPerYear', { visitsPerYear: 1.5 }],
  ['perTree', { perTree: 1 }],
])('refuses what is wrong at %s', async (field, wrong) => {
  const reply = await team.agents.manager
    .put(path)
    .send({ ...costs, ...wrong })
    .expect(400);
  expect(reply.body.fields).toMatchObject([{ field }]);
});
