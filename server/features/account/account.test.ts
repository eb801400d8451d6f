import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { makePerson, signInAs, testPassword, type Agent, type TestPerson } from '#server/testing/people.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
let person: TestPerson;
let agent: Agent;
beforeAll(async () => {
  server = await testServer();
  person = await makePerson(server, 'Wren');
  agent = await signInAs(server, person);
});
afterAll(() => server.close());

const firefox = 'Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0';
interface Listed {
  id: string;
  current: boolean;
  device: string;
}
const sessionsOf = async (client: Agent): Promise<Listed[]> =>
  (await client.get('/api/account/sessions').expect(200)).body.sessions as Listed[];

async function signInWith(userAgent: string): Promise<Agent> {
  const other = server.agent();
  await other
    .post('/api/session')
    .set('User-Agent', userAgent)
    .send({ email: person.email, password: testPassword })
    .expect(200);
  return other;
}
const personOf = async (client: Agent) =>
  (await client.get('/api/session').expect(200)).body.person as { name: string } | null;

describe('my account', () => {
  it('lists where I am signed in, and ends one of them', async () => {
    const other = await signInWith(firefox);
    const sessions = await sessionsOf(agent);
    expect(sessions.map(({ current, device }) => ({ current, device }))).toEqual(
      expect.arrayContaining([
        { current: true, device: 'A program' },
        { current: false, device: 'Firefox on Linux' },
      ]),
    );
    const { id } = sessions.find((session) => session.device === 'Firefox on Linux')!;
    await agent.delete(`/api/account/sessions/${id}`).expect(204);
    expect(await personOf(other)).toBeNull();
    expect(await personOf(agent)).not.toBeNull();
  });

  it('does not end somebody else’s session', async () => {
    const stranger = await signInAs(server, await makePerson(server));
    const [{ id }] = await sessionsOf(agent);
    await stranger.delete(`/api/account/sessions/${id}`).expect(404);
    expect(await personOf(agent)).not.toBeNull();
  });

  it('says when a session was last used, to the minute', async () => {
    server.pass(5 * 60_000);
    await sessionsOf(agent);
    const { sessions } = (await agent.get('/api/account/sessions')).body;
    const { startedAt, seenAt } = sessions.find((session: Listed) => session.current);
    expect(Date.parse(seenAt) - Date.parse(startedAt)).toBeGreaterThanOrEqual(5 * 60_000);
  });

  it('takes a new name', async () => {
    const { body } = await agent.patch('/api/account').send({ name: '  Wren Hale ' }).expect(200);
    expect(body.person.name).toBe('Wren Hale');
    await agent.patch('/api/account').send({ name: '   ' }).expect(400);
    await agent.patch('/api/account').send({ name: 'x', email: 'y@people.example' }).expect(400);
    expect((await personOf(agent))?.name).toBe('Wren Hale');
  });

  it('takes a new password for the present one, and ends the other sessions', async () => {
    const other = await signInWith(firefox);
    const change = (current: string, password: string) =>
      agent.post('/api/account/password').send({ current, password });
    const wrong = await change('not it', 'another good password').expect(400);
    expect(wrong.body.fields[0].field).toBe('current');
    await change(testPassword, 'short').expect(400);
    expect(await personOf(other)).not.toBeNull();
    await change(testPassword, 'another good password').expect(204);
    expect(await personOf(other)).toBeNull();
    expect(await personOf(agent)).not.toBeNull();
    await server.request
      .post('/api/session')
      .send({ email: person.email, password: testPassword })
      .expect(401);
  });
});
