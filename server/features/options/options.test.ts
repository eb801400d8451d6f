import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Option, Site } from '#contract/sites.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
let path: string;

const mound = { kind: 'mound', year: 2027, x: 412_203, y: 5_301_897, radius: 2, strength: 1, halo: 0 };

beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Option team');
  site = await makeSite(team.agents.modeller, team.teamId);
  path = `/api/sites/${site.id}/options`;
});
afterAll(() => server.close());

const make = async (name: string, works: unknown[] = [mound]) =>
  (await team.agents.manager.post(path).send({ name, works }).expect(200)).body as Option;

describe('options', () => {
  it('are kept with their works, Wait first, then in the order in which they were made', async () => {
    const made = await make('One mound');
    expect(made).toMatchObject({
      revision: 1,
      wait: false,
      works: [mound],
      changedBy: 'Option team: manager',
    });
    await make('Another', []);
    const { body } = await team.agents.trainer.get(path).expect(200);
    expect((body.options as Option[]).map((option) => option.name)).toEqual(['Wait', 'One mound', 'Another']);
  });

  it('change only from the revision that was seen: the second of two is told who was first', async () => {
    const { manager, modeller } = team.agents;
    const { id } = await make('Contested');
    const moved = [{ ...mound, x: 412_205 }];
    const first = await modeller
      .put(`${path}/${id}`)
      .send({ name: 'Mine', works: moved, revision: 1 })
      .expect(200);
    expect(first.body).toMatchObject({
      revision: 2,
      name: 'Mine',
      works: moved,
      changedBy: 'Option team: modeller',
    });
    const second = await manager
      .put(`${path}/${id}`)
      .send({ name: 'No, mine', works: [], revision: 1 })
      .expect(409);
    expect(second.body.code).toBe('conflict');
    expect(second.body.detail).toContain('Option team: modeller changed “Mine” at 20');
    const { body } = await manager.get(path);
    expect((body.options as Option[]).find((option) => option.id === id)).toEqual(first.body);
  });

  it('changed at the same moment, one wins and the other hears of it', async () => {
    const { manager, modeller } = team.agents;
    const { id } = await make('Raced');
    const replies = await Promise.all(
      [manager, modeller].map((agent, i) =>
        agent.put(`${path}/${id}`).send({ name: `Version ${i}`, works: [], revision: 1 }),
      ),
    );
    expect(replies.map((reply) => reply.status).sort()).toEqual([200, 409]);
  });

  it('can be deleted, but Wait can be neither changed nor deleted', async () => {
    const { manager } = team.agents;
    const { id } = await make('Short-lived');
    await manager.delete(`${path}/${id}`).expect(204);
    await manager.delete(`${path}/${id}`).expect(404);
    const [wait] = (await manager.get(path)).body.options as [Option];
    const change = await manager
      .put(`${path}/${wait.id}`)
      .send({ name: 'x', works: [mound], revision: 1 })
      .expect(409);
    expect(change.body.detail).toContain('Wait is what every other option is measured against');
    await manager.delete(`${path}/${wait.id}`).expect(409);
    expect(((await manager.get(path)).body.options as Option[])[0]).toEqual(wait);
  });

  it('of one site are not found under another', async () => {
    const { modeller, manager } = team.agents;
    const other = await makeSite(modeller, team.teamId);
    const { id } = await make('Elsewhere');
    const elsewhere = `/api/sites/${other.id}/options/${id}`;
    await manager.put(elsewhere).send({ name: 'x', works: [], revision: 1 }).expect(404);
    await manager.delete(elsewhere).expect(404);
  });

  // The site spans eastings 412200 to 412212 and northings 5301892 to 5301900.
  it.each([
    ['works.1.x', [mound, { ...mound, x: 412_212 }]],
    ['works.0.x', [{ ...mound, x: 412_199.9 }]],
    ['works.0.y', [{ ...mound, y: 5_301_892 }]],
    ['works.1.y', [mound, { ...mound, y: 5_301_900.1 }]],
    ['works.0.radius', [{ ...mound, radius: 0 }]],
    ['works.0.strength', [{ ...mound, strength: 1.2 }]],
    ['works.0.kind', [{ ...mound, kind: 'dam' }]],
    ['works.0.colour', [{ ...mound, colour: 'coral' }]],
  ])('with works that cannot be are refused at %s', async (field, works) => {
    const reply = await team.agents.manager.post(path).send({ name: 'Off', works }).expect(400);
    expect(reply.body.fields).toMatchObject([{ field }]);
  });

  it.each([
    [412_200, 5_301_900],
    [412_211.999, 5_301_892.001],
  ])('take a mound in the outermost cells: %d, %d', async (x, y) => {
    await make('Corner', [{ ...mound, x, y }]);
  });
});
