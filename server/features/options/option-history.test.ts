import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Option, OptionRevision } from '#contract/options.ts';
import type { Site } from '#contract/sites.ts';
import { OptionEntity } from '#server/database/entities/option.ts';
import { OptionRevisionEntity } from '#server/database/entities/option-revision.ts';
import { makeTeam, type TestTeam } from '#server/testing/people.ts';
import { makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';
import { getRevision, keepRevision, listRevisions } from './option-history.service.ts';
import { drawingSizes } from './option-history.repository.ts';

let server: TestServer;
let team: TestTeam;
let site: Site;
let path: string;
const mound = {
  id: 'm1',
  kind: 'mound',
  year: 2027,
  x: 412_203,
  y: 5_301_897,
  radius: 2,
  strength: 1,
  halo: 0,
};

beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'History team');
  site = await makeSite(team.agents.modeller, team.teamId);
  path = `/api/sites/${site.id}/options`;
});
afterAll(() => server.close());

const make = async (name: string, works: unknown[] = [mound]) =>
  (await team.agents.manager.post(path).send({ name, works }).expect(200)).body as Option;
const change = async (id: string, revision: number, body: object) =>
  (
    await team.agents.modeller
      .patch(`${path}/${id}`)
      .send({ revision, ...body })
      .expect(200)
  ).body as Option;
const historyOf = async (id: string) =>
  (await team.agents.trainer.get(`${path}/${id}/history`).expect(200)).body.revisions as OptionRevision[];

describe('the history of an option', () => {
  it('says who changed what, newest first, and brings an older state back as the newest', async () => {
    const { id } = await make('Kept');
    await change(id, 1, { works: [mound, { ...mound, id: 'm2' }], note: 'Two now' });
    await change(id, 2, { name: 'Renamed', works: [] });
    expect(
      (await historyOf(id)).map(({ revision, changedBy, summary, works }) => [
        revision,
        changedBy,
        works,
        summary,
      ]),
    ).toEqual([
      [3, 'History team: modeller', 0, '2 mounds removed; renamed from “Kept” to “Renamed”'],
      [2, 'History team: modeller', 2, '1 mound added; note changed'],
      [1, 'History team: manager', 1, 'made, with 1 mound'],
    ]);
    const { body: second } = await team.agents.trainer.get(`${path}/${id}/history/2`).expect(200);
    expect(second).toMatchObject({
      id,
      revision: 2,
      name: 'Kept',
      note: 'Two now',
      works: [{ id: 'm1' }, { id: 'm2' }],
    });

    const bring = (onRevision: number) =>
      team.agents.manager.post(`${path}/${id}/history/2/bring-back`).send({ onRevision });
    expect((await bring(2).expect(409)).body.detail).toContain('History team: modeller changed “Renamed”');
    const { body: back } = await bring(3).expect(200);
    expect(back).toMatchObject({
      revision: 4,
      name: 'Kept',
      note: 'Two now',
      changedBy: 'History team: manager',
    });
    expect((back as Option).works).toEqual((second as Option).works);
    const [newest] = await historyOf(id);
    expect(newest).toMatchObject({
      revision: 4,
      summary: 'revision 2 brought back, with 2 mounds',
      kept: true,
    });
    // The same works are kept once, whatever the number of revisions that hold them.
    expect(await drawingSizes(server.services.dataSource.manager, id)).toHaveLength(3);
  });

  it('begins with the state that is there when an older option is first changed', async () => {
    const { id } = await make('Older');
    await server.services.write((manager) => manager.delete(OptionRevisionEntity, { optionId: id }));
    await change(id, 1, { works: [] });
    expect((await historyOf(id)).map(({ revision, summary }) => [revision, summary])).toEqual([
      [2, '1 mound removed'],
      [1, 'as it was when its history began'],
    ]);
    const { body } = await team.agents.manager.get(`${path}/${id}/history/1`).expect(200);
    expect((body as Option).works).toEqual([mound]);
  });

  it('lets go of the oldest works when it grows too long, and of no line', async () => {
    const { id } = await make('Long', []);
    const { manager } = server.services.dataSource;
    const row = (await manager.findOneBy(OptionEntity, { id }))!;
    for (let revision = 2; revision <= 6; revision++)
      await server.services.write((writer) =>
        keepRevision(
          writer,
          { ...row, revision, works: JSON.stringify([{ ...mound, x: 412_200 + revision }]) },
          'moved',
          {
            revisions: 3,
            bytes: 1e6,
          },
        ),
      );
    expect((await listRevisions(manager, site.id, id)).map(({ revision, kept }) => [revision, kept])).toEqual([
      [6, true], [5, true], [4, true], [3, false], [2, false], [1, false],
    ]); // prettier-ignore
    await expect(getRevision(manager, { siteId: site.id, optionId: id, revision: 3 })).rejects.toMatchObject({
      code: 'gone',
    });
    // However large the newest, it stays.
    await server.services.write((writer) =>
      keepRevision(
        writer,
        { ...row, revision: 7, works: JSON.stringify([{ ...mound, id: 'm7' }]) },
        'emptied',
        { revisions: 3, bytes: 1 },
      ),
    );
    const kept = (await listRevisions(manager, site.id, id)).filter((revision) => revision.kept);
    expect(kept.map(({ revision }) => revision)).toEqual([7]);
  });

  it('goes with the option, and is not found under another site', async () => {
    const { id } = await make('Short-lived');
    const other = await makeSite(team.agents.modeller, team.teamId);
    const elsewhere = `/api/sites/${other.id}/options/${id}/history`;
    await team.agents.manager.get(elsewhere).expect(404);
    await team.agents.manager.get(`${elsewhere}/1`).expect(404);
    await team.agents.manager.post(`${elsewhere}/1/bring-back`).send({ onRevision: 1 }).expect(404);
    await team.agents.manager.get(`${path}/${id}/history/9`).expect(404);
    await team.agents.manager.delete(`${path}/${id}`).expect(204);
    expect(await drawingSizes(server.services.dataSource.manager, id)).toEqual([]);
  });
});
