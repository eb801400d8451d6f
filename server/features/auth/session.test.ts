import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { SessionEntity } from '#server/database/entities/session.ts';
import { makePerson, makeTeam, signInAs, testPassword, type TestPerson } from '#server/testing/people.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

const day = 86_400_000;
let server: TestServer;
let person: TestPerson;
beforeAll(async () => {
  server = await testServer();
  person = await makePerson(server, 'Wren');
});
afterAll(() => server.close());

const signIn = (email: string, password: string) =>
  server.request.post('/api/session').send({ email, password });
/** `name=value` of the session cookie in a reply */
const cookieOf = (headers: Record<string, unknown>) => {
  const cookies = (headers['set-cookie'] ?? []) as string[];
  return cookies.find((cookie) => cookie.startsWith('foothold.sid='))?.split(';')[0];
};
const whoIs = async (cookie: string) =>
  (await server.request.get('/api/session').set('Cookie', cookie).expect(200)).body.person as unknown;

describe('sign-in', () => {
  it('opens a session and says who is signed in', async () => {
    const reply = await signIn(person.email.toUpperCase(), testPassword).expect(200);
    expect(reply.body).toEqual({
      person: { id: person.id, name: 'Wren', email: person.email },
      memberships: [],
      demo: false,
    });
    expect(await whoIs(cookieOf(reply.headers)!)).toMatchObject({ id: person.id });
  });

  it('gives a cookie that scripts and other sites do not get', async () => {
    const reply = await signIn(person.email, testPassword).expect(200);
    expect(reply.headers['set-cookie'][0]).toMatch(/; Path=\/; .*HttpOnly; SameSite=Lax$/);
  });

  it('gives a cookie for https alone where the product is served so', async () => {
    const secure = await testServer({ publicUrl: 'https://shore.example', trustProxy: 1 });
    const { email } = await makePerson(secure);
    const reply = await secure.request
      .post('/api/session')
      .set('X-Forwarded-Proto', 'https')
      .send({ email, password: testPassword })
      .expect(200);
    expect(reply.headers['set-cookie'][0]).toMatch(/; Secure;/);
    await secure.close();
  });

  it('answers a wrong password and an unknown address with the same words', async () => {
    const wrong = await signIn(person.email, 'not the password').expect(401);
    const unknown = await signIn('nobody@people.example', 'not the password').expect(401);
    expect(wrong.body.code).toBe('wrong-credentials');
    // The number of the request alone differs.
    expect({ ...wrong.body, instance: '' }).toEqual({ ...unknown.body, instance: '' });
    expect(cookieOf(wrong.headers)).toBeUndefined();
  });

  it('names the field that is wrong', async () => {
    const reply = await signIn('no address', '').expect(400);
    expect(reply.body.fields.map((field: { field: string }) => field.field)).toEqual(['email', 'password']);
  });

  it('makes a new session id each time and ends the one before', async () => {
    const first = cookieOf((await signIn(person.email, testPassword)).headers)!;
    const again = await server.request
      .post('/api/session')
      .set('Cookie', first)
      .send({ email: person.email, password: testPassword })
      .expect(200);
    expect(cookieOf(again.headers)).not.toBe(first);
    expect(await whoIs(first)).toBeNull();
  });

  it('does not take up a session id that somebody else chose', async () => {
    const planted = 'foothold.sid=s%3Aplanted.signature';
    const reply = await server.request
      .post('/api/session')
      .set('Cookie', planted)
      .send({ email: person.email, password: testPassword })
      .expect(200);
    expect(cookieOf(reply.headers)).toMatch(/^foothold\.sid=s%3A(?!planted)/);
    expect(await whoIs(planted)).toBeNull();
  });

  it('keeps no session for whoever is not signed in', async () => {
    const reply = await server.request.get('/api/session').expect(200);
    expect(reply.body.person).toBeNull();
    expect(reply.headers['set-cookie']).toBeUndefined();
  });
});

describe('a session', () => {
  it('ends with sign-out, for whoever kept the cookie too', async () => {
    const cookie = cookieOf((await signIn(person.email, testPassword)).headers)!;
    const reply = await server.request.delete('/api/session').set('Cookie', cookie).expect(204);
    expect(reply.headers['set-cookie'][0]).toMatch(/^foothold\.sid=;.*Expires=Thu, 01 Jan 1970/);
    expect(await whoIs(cookie)).toBeNull();
  });

  it('is stored without its cookie', async () => {
    const cookie = cookieOf((await signIn(person.email, testPassword)).headers)!;
    const sessionId = decodeURIComponent(cookie.split('=')[1]).slice(2).split('.')[0];
    const rows = JSON.stringify(await server.services.dataSource.getRepository(SessionEntity).find());
    expect(rows).not.toContain(sessionId);
  });

  it('lasts 14 days from its last use and 60 days in all', async () => {
    const server = await testServer();
    const agent = await signInAs(server, await makePerson(server));
    const isIn = async () => (await agent.get('/api/session').expect(200)).body.person !== null;
    for (const days of [13, 13, 13, 13]) {
      server.pass(days * day);
      expect(await isIn()).toBe(true);
    }
    server.pass(9 * day);
    expect(await isIn()).toBe(false);

    const idle = await signInAs(server, await makePerson(server));
    server.pass(15 * day);
    expect((await idle.get('/api/session')).body.person).toBeNull();
    await server.close();
  });

  it('is not brought back by a request that was under way when it ended', async () => {
    const cookie = cookieOf((await signIn(person.email, testPassword)).headers)!;
    server.pass(2 * 60_000);
    const requests = [
      server.request.get('/api/session').set('Cookie', cookie),
      server.request.delete('/api/session').set('Cookie', cookie),
      server.request.get('/api/session').set('Cookie', cookie),
    ];
    await Promise.all(requests);
    expect(await whoIs(cookie)).toBeNull();
  });
});

describe('attempts', () => {
  it('are limited for an account, and do not lock out another', async () => {
    const server = await testServer({ attempts: { windowMs: 60_000, perAddress: 1000, perAccount: 3 } });
    const team = await makeTeam(server);
    const attempt = (email: string, password: string) =>
      server.request.post('/api/session').send({ email, password });
    const { modeller, manager } = team.people;
    for (let i = 0; i < 3; i++) await attempt(modeller.email, 'wrong').expect(401);
    const refused = await attempt(modeller.email, testPassword).expect(429);
    expect(refused.body.code).toBe('too-many-requests');
    // Only refused attempts count.
    for (let i = 0; i < 5; i++) await attempt(manager.email, testPassword).expect(200);
    await server.close();
  });

  it('are limited for an address', async () => {
    const server = await testServer({ attempts: { windowMs: 60_000, perAddress: 4, perAccount: 1000 } });
    for (let i = 0; i < 4; i++)
      await server.request
        .post('/api/session')
        .send({ email: `nobody${i}@people.example`, password: 'x' })
        .expect(401);
    await server.request
      .post('/api/session')
      .send({ email: 'nobody@people.example', password: 'x' })
      .expect(429);
    await server.close();
  });
});
