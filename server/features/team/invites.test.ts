import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { InviteEntity } from '#server/database/entities/invite.ts';
import { makePerson, makeTeam, signInAs, testPassword, type TestTeam } from '#server/testing/people.ts';
import { readBytes } from '#server/testing/read-bytes.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let team: TestTeam;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Shore team');
});
afterAll(() => server.close());

const newPassword = 'a long enough one';
let serial = 0;
const newAddress = () => `new${++serial}@people.example`;
const send = (email: string, role = 'modeller') =>
  team.agents.admin.post(`/api/teams/${team.teamId}/invites`).send({ email, role });
/** the text of the latest message to an address, from the team's outbox */
async function messageTo(email: string) {
  const outbox = `/api/teams/${team.teamId}/outbox`;
  const { messages } = (await team.agents.admin.get(outbox).expect(200)).body;
  const { id } = messages.find((message: { to: string }) => message.to === email);
  const reply = await team.agents.admin.get(`${outbox}/${id}`).expect(200);
  return reply.body as { id: string; subject: string; text: string; status: string };
}
const pathIn = (text: string) => `/api/invites/${/localhost:4173\/invite\/([\w-]{43})/.exec(text)![1]}`;
async function invited(email: string, role?: string) {
  await send(email, role).expect(200);
  return pathIn((await messageTo(email)).text);
}

describe('an invite', () => {
  it('brings a new person into the team with the role', async () => {
    const email = newAddress();
    const path = await invited(email);
    await server.request
      .get(path)
      .expect(200, { teamName: 'Shore team', email, role: 'modeller', hasAccount: false });
    const agent = server.agent();
    const { body } = await agent.post(path).send({ name: 'New', password: newPassword }).expect(200);
    expect(body).toMatchObject({ person: { email, name: 'New' }, memberships: [{ role: 'modeller' }] });
    await agent.get(`/api/teams/${team.teamId}/members`).expect(200);
    await server.request.get(path).expect(410);
    await server.request.post(path).send({ name: 'New', password: newPassword }).expect(410);
  });

  it('brings in somebody with an account by their present password alone', async () => {
    const person = await makePerson(server, 'Old');
    const path = await invited(person.email, 'trainer');
    expect((await server.request.get(path)).body.hasAccount).toBe(true);
    const wrong = await server.request.post(path).send({ password: newPassword }).expect(401);
    expect(wrong.headers['set-cookie']).toBeUndefined();
    const { body } = await server.request.post(path).send({ password: testPassword }).expect(200);
    expect(body).toMatchObject({
      person: { id: person.id, name: 'Old' },
      memberships: [{ role: 'trainer' }],
    });
  });

  it('asks a new person for a name and a good password', async () => {
    const path = await invited(newAddress());
    const nameless = await server.request.post(path).send({ password: newPassword }).expect(400);
    expect(nameless.body.fields).toEqual([{ field: 'name', message: 'Give your name' }]);
    const weak = await server.request.post(path).send({ name: 'New', password: 'short' }).expect(400);
    expect(weak.body.fields).toEqual([{ field: 'password', message: 'At least 10 characters' }]);
    await server.request.post(path).send({ name: 'New', password: newPassword }).expect(200);
  });

  it('works once even when it is used twice at the same moment', async () => {
    const path = await invited(newAddress());
    const accept = () => server.request.post(path).send({ name: 'New', password: newPassword });
    const replies = await Promise.all([accept(), accept()]);
    expect(replies.map((reply) => reply.status).sort()).toEqual([200, 410]);
  });

  it('makes one account even when two teams’ invites are accepted at the same moment', async () => {
    const email = newAddress();
    const other = await makeTeam(server, 'Other shore');
    await other.agents.admin
      .post(`/api/teams/${other.teamId}/invites`)
      .send({ email, role: 'trainer' })
      .expect(200);
    const [{ text }] = await server.services.dataSource.query<{ text: string }[]>(
      `SELECT text FROM outbox_message WHERE recipient = '${email}'`,
    );
    const paths = [pathIn(text), await invited(email)];
    const replies = await Promise.all(
      paths.map((path) => server.request.post(path).send({ name: 'New', password: newPassword })),
    );
    expect(replies.map((reply) => reply.status).sort()).toEqual([200, 409]);
    // The invite that was refused still stands, now for the account that exists.
    const left = paths[replies.findIndex((reply) => reply.status === 409)];
    const joined = await server.request.post(left).send({ password: newPassword }).expect(200);
    expect(joined.body.memberships).toHaveLength(2);
  });

  it('is listed while it waits, and ends when it is withdrawn', async () => {
    const email = newAddress();
    const path = await invited(email);
    const list = `/api/teams/${team.teamId}/invites`;
    const { invites } = (await team.agents.admin.get(list).expect(200)).body;
    const invite = invites.find((entry: { email: string }) => entry.email === email);
    expect(invite).toMatchObject({ role: 'modeller', invitedBy: 'Shore team: admin' });
    expect(Object.keys(invite)).not.toContain('tokenHash');
    await team.agents.admin.delete(`${list}/${invite.id}`).expect(204);
    await team.agents.admin.delete(`${list}/${invite.id}`).expect(404);
    await server.request.get(path).expect(410);
  });

  it('replaces the one before to the same address', async () => {
    const email = newAddress();
    const first = await invited(email);
    server.pass(1000);
    const second = await invited(email, 'manager');
    await server.request.get(first).expect(410);
    expect((await server.request.get(second).expect(200)).body.role).toBe('manager');
  });

  it('runs out after seven days', async () => {
    const server = await testServer();
    const team = await makeTeam(server);
    const email = newAddress();
    const { body } = await team.agents.admin
      .post(`/api/teams/${team.teamId}/invites`)
      .send({ email, role: 'trainer' })
      .expect(200);
    expect(Date.parse(body.expiresAt) - Date.parse(body.sentAt)).toBe(7 * 86_400_000);
    const row = `SELECT text FROM outbox_message WHERE recipient = '${email}'`;
    const [{ text }] = await server.services.dataSource.query<{ text: string }[]>(row);
    server.pass(7 * 86_400_000 - 60_000);
    await server.request.get(pathIn(text)).expect(200);
    server.pass(60_000);
    await server.request.get(pathIn(text)).expect(410);
    await server.close();
  });

  it('is refused for somebody who is in the team', async () => {
    const refused = await send(team.people.manager.email).expect(409);
    expect(refused.body.detail).toContain('already in this team');
  });

  it('is not accepted twice by somebody who joined meanwhile', async () => {
    const person = await makePerson(server);
    const path = await invited(person.email);
    await server.services.write((manager) =>
      manager.query(`INSERT INTO membership VALUES (?, ?, 'trainer', '2026-01-01T00:00:00.000Z')`, [
        team.teamId,
        person.id,
      ]),
    );
    await server.request.post(path).send({ password: testPassword }).expect(409);
    const agent = await signInAs(server, person);
    expect((await agent.get('/api/session')).body.memberships).toMatchObject([{ role: 'trainer' }]);
  });

  it('is stored as a hash', async () => {
    const email = newAddress();
    const path = await invited(email);
    const rows = await server.services.dataSource.getRepository(InviteEntity).findBy({ email });
    expect(rows).toHaveLength(1);
    expect(JSON.stringify(rows)).not.toContain(path.split('/').at(-1));
  });
});

describe('the outbox', () => {
  it('shows what was sent, as text and as a file', async () => {
    const email = newAddress();
    await invited(email);
    const message = await messageTo(email);
    expect(message).toMatchObject({ subject: 'Join Shore team on Foothold', status: 'outbox', error: null });
    expect(message.text).toContain('Shore team: admin invites you to join the team "Shore team"');
    const path = `/api/teams/${team.teamId}/outbox/${message.id}/message.eml`;
    const file = await readBytes(team.agents.admin.get(path));
    expect(file).toMatch(/^From: Foothold <foothold@localhost>\r\nTo: new\d+@people\.example\r\n/);
    const { headers } = await team.agents.admin.get(path);
    expect(headers['content-type']).toBe('message/rfc822');
    expect(headers['content-disposition']).toBe('attachment; filename="Join Shore team on Foothold.eml"');
  });

  it('of another team cannot be read through one’s own', async () => {
    const email = newAddress();
    await invited(email);
    const { id } = await messageTo(email);
    const other = await makeTeam(server);
    await other.agents.admin.get(`/api/teams/${other.teamId}/outbox/${id}`).expect(404);
  });
});
