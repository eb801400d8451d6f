import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makePerson, makeTeam, signInAs, type TestTeam } from '#server/testing/people.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
beforeAll(async () => {
  server = await testServer();
});
afterAll(() => server.close());

const memberPath = ({ teamId, people }: TestTeam, role: keyof TestTeam['people']) =>
  `/api/teams/${teamId}/members/${people[role].id}`;

describe('members', () => {
  it('are listed to each other, without anything secret', async () => {
    const { teamId, people, agents } = await makeTeam(server);
    const { body } = await agents.trainer.get(`/api/teams/${teamId}/members`).expect(200);
    expect(body.members).toHaveLength(4);
    const manager = body.members.find((member: { role: string }) => member.role === 'manager');
    expect(manager).toEqual({
      personId: people.manager.id,
      name: people.manager.name,
      email: people.manager.email,
      role: 'manager',
      joinedAt: expect.stringMatching(/Z$/),
      openSessions: 1,
    });
  });

  it('have a new role at once', async () => {
    const team = await makeTeam(server);
    const { agents, teamId } = team;
    await agents.modeller.get(`/api/teams/${teamId}/invites`).expect(403);
    const reply = await agents.admin.patch(memberPath(team, 'modeller')).send({ role: 'admin' }).expect(200);
    expect(reply.body).toMatchObject({ personId: team.people.modeller.id, role: 'admin' });
    await agents.modeller.get(`/api/teams/${teamId}/invites`).expect(200);
  });

  it('lose access at once when they are removed, and keep their account', async () => {
    const team = await makeTeam(server);
    await team.agents.admin.delete(memberPath(team, 'manager')).expect(204);
    await team.agents.manager.get(`/api/teams/${team.teamId}/members`).expect(404);
    const session = await team.agents.manager.get('/api/session').expect(200);
    expect(session.body).toMatchObject({ person: { id: team.people.manager.id }, memberships: [] });
    await team.agents.admin.delete(memberPath(team, 'manager')).expect(404);
  });

  it('are signed out everywhere by an admin', async () => {
    const team = await makeTeam(server);
    const second = await signInAs(server, team.people.trainer);
    await team.agents.admin.delete(`${memberPath(team, 'trainer')}/sessions`).expect(204);
    for (const agent of [team.agents.trainer, second])
      await agent.get(`/api/teams/${team.teamId}/members`).expect(401);
    await team.agents.manager.get(`/api/teams/${team.teamId}/members`).expect(200);
  });

  it('of another team cannot be reached through one’s own', async () => {
    const own = await makeTeam(server);
    const other = await makeTeam(server);
    const path = `/api/teams/${own.teamId}/members/${other.people.trainer.id}`;
    await own.agents.admin.patch(path).send({ role: 'admin' }).expect(404);
    await own.agents.admin.delete(path).expect(404);
    await own.agents.admin.delete(`${path}/sessions`).expect(404);
    await other.agents.trainer.get(`/api/teams/${other.teamId}/members`).expect(200);
  });
});

describe('a team', () => {
  it('keeps its last admin', async () => {
    const team = await makeTeam(server);
    const { admin } = team.agents;
    const refused = await admin.patch(memberPath(team, 'admin')).send({ role: 'trainer' }).expect(409);
    expect(refused.body.detail).toContain('only admin');
    await admin.delete(memberPath(team, 'admin')).expect(409);
    await admin.patch(memberPath(team, 'admin')).send({ role: 'admin' }).expect(200);
    await admin.patch(memberPath(team, 'manager')).send({ role: 'admin' }).expect(200);
    await admin.patch(memberPath(team, 'admin')).send({ role: 'trainer' }).expect(200);
  });

  it('keeps an admin when two admins step down at the same moment', async () => {
    const team = await makeTeam(server);
    const { admin, manager } = team.agents;
    await admin.patch(memberPath(team, 'manager')).send({ role: 'admin' }).expect(200);
    const replies = await Promise.all([
      admin.patch(memberPath(team, 'admin')).send({ role: 'trainer' }),
      manager.patch(memberPath(team, 'manager')).send({ role: 'trainer' }),
    ]);
    expect(replies.map((reply) => reply.status).sort()).toEqual([200, 409]);
  });

  it('is founded by anybody who is signed in, as its admin', async () => {
    const agent = await signInAs(server, await makePerson(server));
    const { body } = await agent.post('/api/teams').send({ name: 'Second shore' }).expect(200);
    expect(body.memberships).toMatchObject([{ teamName: 'Second shore', role: 'admin' }]);
    await agent.get(`/api/teams/${body.memberships[0].teamId}/outbox`).expect(200);
  });
});
