import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Option } from '#contract/options.ts';
import type { Site } from '#contract/sites.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
let path: string;

const mound = { kind: 'mound', year: 2027, x: 412_203, y: 5_301_897, radius: 2, strength: 1, halo: 0 };

const fence = { kind: 'fence', year: 2027, strength: 1 };
const offSite = [[412_200, 5_301_891], [412_212, 5_301_891], [412_206, 5_301_880]]; // prettier-ignore

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
      .patch(`${path}/${id}`)
      .send({ name: 'Mine', works: moved, revision: 1 })
      .expect(200);
    expect(first.body).toMatchObject({
      revision: 2,
      name: 'Mine',
      works: moved,
      changedBy: 'Option team: modeller',
    });
    const second = await manager
      .patch(`${path}/${id}`)
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
        agent.patch(`${path}/${id}`).send({ name: `Version ${i}`, works: [], revision: 1 }),
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
      .patch(`${path}/${wait.id}`)
      .send({ name: 'x', works: [mound], revision: 1 })
      .expect(409);
    expect(change.body.detail).toContain('Wait is what every other option is measured against');
    await manager.delete(`${path}/${wait.id}`).expect(409);
    expect(((await manager.get(path)).body.options as Option[])[0]).toEqual(wait);
  });

  it('are renamed and noted without sending their works', async () => {
    const { id, works } = await make('Before');
    const reply = await team.agents.manager
      .patch(`${path}/${id}`)
      .send({ revision: 1, name: 'After', note: '  Ask the harbour first.  ' })
      .expect(200);
    expect(reply.body).toMatchObject({ name: 'After', note: 'Ask the harbour first.', works, revision: 2 });
  });

  it('can be put in the archive, where nobody draws on them, and brought back', async () => {
    const { id } = await make('Put away');
    const patch = (body: object) => team.agents.manager.patch(`${path}/${id}`).send(body);
    const counted = async () =>
      ((await team.agents.manager.get(`/api/sites/${site.id}`)).body as Site).options;
    const before = await counted();
    expect((await patch({ revision: 1, archived: true }).expect(200)).body).toMatchObject({ archived: true });
    expect(await counted()).toBe(before - 1);
    expect((await patch({ revision: 2, works: [] }).expect(409)).body.detail).toContain('is in the archive');
    const back = await patch({ revision: 2, archived: false, works: [] }).expect(200);
    expect(back.body).toMatchObject({ archived: false, works: [], revision: 3 });
  });

  it('are copied with works, sets and note; the copy stands after the original', async () => {
    const site2 = await makeSite(team.agents.modeller, team.teamId);
    const there = `/api/sites/${site2.id}/options`;
    const post = (at: string, body: object) => team.agents.manager.post(at).send(body).expect(200);
    const set = { id: 's1', laid: { pattern: 'scattered', seed: 'x', parameters: { count: 3 } } };
    const body = { name: 'A', note: 'n', works: [{ ...mound, id: 'a', set: 's1' }], sets: [set] };
    const { body: a } = await post(there, body);
    await post(there, { name: 'B', works: [] });
    const { body: copy } = await post(`${there}/${(a as Option).id}/copies`, { name: 'A, copy' });
    expect(copy).toMatchObject({ ...body, name: 'A, copy', revision: 1 });
    expect((copy as Option).id).not.toBe((a as Option).id);
    const list = async () => (await team.agents.manager.get(there)).body.options as Option[];
    const [wait] = await list();
    await post(`${there}/${wait.id}/copies`, { name: 'Wait, copy' });
    expect((await list()).map(({ name }) => name)).toEqual(['Wait', 'Wait, copy', 'A', 'A, copy', 'B']);
    await post(there, { name: 'Last', works: [] });
    expect((await list()).at(-1)?.name).toBe('Last');
  });

  it('are put in another order, Wait staying first', async () => {
    const site2 = await makeSite(team.agents.modeller, team.teamId);
    const there = `/api/sites/${site2.id}/options`;
    for (const name of ['A', 'B', 'C'])
      await team.agents.manager.post(there).send({ name, works: [] }).expect(200);
    const options = (await team.agents.manager.get(there)).body.options as Option[];
    const [wait, a, b, c] = options.map(({ id }) => id);
    const order = (optionIds: string[]) =>
      team.agents.manager.put(`/api/sites/${site2.id}/option-order`).send({ optionIds });
    const reply = await order([c, a, b]).expect(200);
    const names = (body: { options: Option[] }) => body.options.map(({ name }) => name);
    expect(names(reply.body as { options: Option[] })).toEqual(['Wait', 'C', 'A', 'B']);
    for (const wrong of [
      [a, b],
      [a, b, c, c],
      [wait, a, b, c],
      [a, b, site.id],
    ])
      expect((await order(wrong).expect(409)).body.detail).toContain('each of the 3 beside Wait once');
    expect(names((await team.agents.trainer.get(there)).body as { options: Option[] })).toEqual([
      'Wait',
      'C',
      'A',
      'B',
    ]);
  });

  it('of one site are not found under another', async () => {
    const { modeller, manager } = team.agents;
    const other = await makeSite(modeller, team.teamId);
    const { id } = await make('Elsewhere');
    const elsewhere = `/api/sites/${other.id}/options/${id}`;
    await manager.patch(elsewhere).send({ name: 'x', works: [], revision: 1 }).expect(404);
    await manager.delete(elsewhere).expect(404);
    await manager.post(`${elsewhere}/copies`).send({ name: 'x' }).expect(404);
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
    ['works.0.area', [{ ...fence, area: { shape: 'disc', x: 412_190, y: 5_301_895, radius: 9.9 } }]],
    ['works.0.area', [{ ...fence, area: { shape: 'polygon', ring: offSite } }]],
    ['works.0.set', [{ ...mound, set: 'gone' }]],
    [
      'works.1.id',
      [
        { ...mound, id: 'a' },
        { ...mound, id: 'a' },
      ],
    ],
    [
      'works.0.points.1.0',
      [
        {
          kind: 'clumps',
          year: 2027,
          points: [
            [412_203, 5_301_897],
            [0, 5_301_897],
          ],
        },
      ],
    ],
  ])('with works that cannot be are refused at %s', async (field, works) => {
    const reply = await team.agents.manager.post(path).send({ name: 'Off', works }).expect(400);
    expect(reply.body.fields).toMatchObject([{ field }]);
  });

  it('take an area that reaches beyond the site', async () => {
    await make('Overhang', [{ ...fence, area: { shape: 'disc', x: 412_190, y: 5_301_895, radius: 10.1 } }]);
  });

  it.each([
    [412_200, 5_301_900],
    [412_211.999, 5_301_892.001],
  ])('take a mound in the outermost cells: %d, %d', async (x, y) => {
    await make('Corner', [{ ...mound, x, y }]);
  });
});
