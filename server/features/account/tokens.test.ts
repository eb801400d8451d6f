import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { makePerson, makeTeam, signInAs, type Agent, type TestTeam } from '#server/testing/people.ts';
import { makeSite } from '#server/testing/sites.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';
import { addMember, addTeam } from '#server/people/people.repository.ts';

let server: TestServer;
let team: TestTeam;
let agent: Agent;
beforeAll(async () => {
  server = await testServer();
  team = await makeTeam(server, 'Marsh team');
  agent = team.agents.modeller;
});
afterAll(() => server.close());

const day = 86_400_000;
const inDays = (days: number) => new Date(server.services.clock().getTime() + days * day).toISOString();
const wanted = (changes: object = {}) => ({
  name: 'Nightly export',
  scope: 'write',
  teamId: null,
  expiresAt: inDays(30),
  ...changes,
});

interface Made {
  token: string;
  made: { id: string; start: string; lastUsedAt: string | null; revokedAt: string | null };
}
const make = async (changes: object = {}, by = agent): Promise<Made> =>
  (await by.post('/api/account/tokens').send(wanted(changes)).expect(200)).body as Made;
const listed = async (id: string, by = agent) =>
  ((await by.get('/api/account/tokens').expect(200)).body.tokens as Made['made'][]).find((t) => t.id === id);
const as = (token: string) => ({ Authorization: `Bearer ${token}` });
const sitesPath = () => `/api/teams/${team.teamId}/sites`;
const sites = (token: string) => server.request.get(sitesPath()).set(as(token));

describe('an access token', () => {
  it('is shown once, kept as a hash, and opens what its person may see', async () => {
    const { token, made } = await make();
    expect(token).toMatch(/^fh_[\w-]{43}$/);
    expect(token.startsWith(made.start)).toBe(true);
    expect(made.start.length).toBeLessThan(10);
    const list = await agent.get('/api/account/tokens').expect(200);
    expect(list.text).not.toContain(token.slice(10));
    const rows = await server.services.dataSource.query<object[]>('SELECT * FROM access_token');
    expect(JSON.stringify(rows)).not.toContain(token.slice(10));
    await sites(token).expect(200);
    await server.request.get(sitesPath()).set('Authorization', `bearer ${token}`).expect(200);
  });

  it('says when it was last used, to the minute', async () => {
    const { token, made } = await make();
    expect((await listed(made.id))?.lastUsedAt).toBeNull();
    await sites(token).expect(200);
    const first = (await listed(made.id))!.lastUsedAt!;
    await sites(token).expect(200);
    expect((await listed(made.id))?.lastUsedAt).toBe(first);
    server.pass(61_000);
    await sites(token).expect(200);
    expect(Date.parse((await listed(made.id))!.lastUsedAt!)).toBeGreaterThan(Date.parse(first));
  });

  it('that is revoked, over or unknown is refused with words and a challenge', async () => {
    const revoked = await make();
    await agent.delete(`/api/account/tokens/${revoked.made.id}`).expect(204);
    await agent.delete(`/api/account/tokens/${revoked.made.id}`).expect(404);
    const over = await make({ expiresAt: inDays(1) });
    server.pass(day + 1000);
    for (const [token, words] of [
      [revoked.token, 'was revoked on'],
      [over.token, 'ran out on'],
      [`${over.token}x`, 'not known'],
      ['', 'not known'],
    ]) {
      const reply = await sites(token).expect(401);
      expect(reply.body).toMatchObject({ code: 'token-refused', detail: expect.stringContaining(words) });
      expect(reply.headers['www-authenticate']).toMatch(/^Bearer .*invalid_token/);
    }
    expect((await listed(revoked.made.id))?.revokedAt).not.toBeNull();
    const nobody = await server.request.get(sitesPath()).expect(401);
    expect(nobody.headers['www-authenticate']).toMatch(/^Bearer/);
  });

  it('is forgotten 30 days after its end', async () => {
    const later = await testServer();
    const person = await makePerson(later);
    const expiresAt = new Date(Date.now() + day).toISOString();
    // Sessions end before 30 days are over.
    const over = await make({ expiresAt }, await signInAs(later, person));
    const stillThere = async (days: number) => {
      later.pass(days * day);
      const own = await signInAs(later, person);
      const end = new Date(later.services.clock().getTime() + day).toISOString();
      await make({ expiresAt: end }, own);
      return (await listed(over.made.id, own)) !== undefined;
    };
    expect(await stillThere(30)).toBe(true);
    expect(await stillThere(2)).toBe(false);
    await later.close();
  });

  it('that may only read is refused a change with words, HEAD is reading', async () => {
    const { token } = await make({ scope: 'read' });
    await sites(token).expect(200);
    await server.request.head(sitesPath()).set(as(token)).expect(200);
    const reply = await server.request.post(sitesPath()).set(as(token)).expect(403);
    expect(reply.body.detail).toContain('may only read; found POST');
  });

  it('needs no same-origin check, and a bad one does not get around it with a cookie', async () => {
    const site = await makeSite(agent, team.teamId);
    const { token } = await make();
    const rename = (header: object, client = server.request) =>
      client
        .patch(`/api/sites/${site.id}`)
        .set({ Origin: 'http://elsewhere.example', ...header })
        .send({ name: 'Renamed' });
    await rename(as(token)).expect(200);
    await rename({}, agent as never).expect(403);
    await rename(as('fh_wrong'), agent as never).expect(401);
    await rename({ Authorization: 'Basic Zm9vOmJhcg==' }, agent as never).expect(403);
  });

  it('wins over a session cookie in the same request', async () => {
    const { token } = await make({ scope: 'read' });
    await agent.post('/api/teams').set(as(token)).send({ name: 'Another' }).expect(403);
    const reply = await team.agents.trainer.get('/api/teams').set(as(token)).expect(200);
    expect(reply.body.teams[0].role).toBe('modeller');
    // A proxy may ask for a password of its own: that is none of our tokens.
    await agent.get(sitesPath()).set('Authorization', 'Basic Zm9vOmJhcg==').expect(200);
  });

  it('reaches the teams of its person, or the one that it is for', async () => {
    const { write, clock } = server.services;
    const { id } = await write((manager) => addTeam(manager, 'Second team', clock()));
    await write((manager) => addMember(manager, id, team.people.modeller.id, 'trainer', clock()));
    const names = async (token: string) =>
      (
        (await server.request.get('/api/teams').set(as(token)).expect(200)).body as {
          teams: { teamName: string; role: string }[];
        }
      ).teams.map(({ teamName, role }) => `${teamName}: ${role}`);
    expect(await names((await make()).token)).toEqual(['Marsh team: modeller', 'Second team: trainer']);
    const limited = await make({ teamId: id });
    expect(await names(limited.token)).toEqual(['Second team: trainer']);
    await sites(limited.token).expect(404);
    await server.request.get(`/api/teams/${id}/sites`).set(as(limited.token)).expect(200);
  });

  it('follows its person’s role and membership at once', async () => {
    const person = await makePerson(server, 'Newcomer');
    const { write, clock } = server.services;
    await write((manager) => addMember(manager, team.teamId, person.id, 'modeller', clock()));
    const { token } = await make({}, await signInAs(server, person));
    const send = () => server.request.post(sitesPath()).set(as(token));
    await send().expect(400);
    const member = `/api/teams/${team.teamId}/members/${person.id}`;
    await team.agents.admin.patch(member).send({ role: 'trainer' }).expect(200);
    await send().expect(403);
    await team.agents.admin.delete(member).expect(204);
    await sites(token).expect(404);
  });

  it('ends when an admin signs its person out everywhere, not with a session', async () => {
    const person = await makePerson(server, 'Leaver');
    const { write, clock } = server.services;
    await write((manager) => addMember(manager, team.teamId, person.id, 'trainer', clock()));
    const own = await signInAs(server, person);
    const { token } = await make({}, own);
    await own.delete('/api/session').expect(204);
    await sites(token).expect(200);
    await team.agents.admin.delete(`/api/teams/${team.teamId}/members/${person.id}/sessions`).expect(204);
    await sites(token).expect(401);
  });
});

describe('making a token', () => {
  const refused = async (changes: object, field: string) => {
    const { body } = await agent.post('/api/account/tokens').send(wanted(changes)).expect(400);
    expect(body.fields[0].field).toBe(field);
    return body.detail as string;
  };
  it('refuses an end in the past or too far off, a strange team, a scope that does not exist', async () => {
    expect(await refused({ expiresAt: inDays(-1) }, 'expiresAt')).toContain('expected one to come');
    expect(await refused({ expiresAt: inDays(400) }, 'expiresAt')).toContain('at most 366');
    const other = await makeTeam(server, 'Strangers');
    await refused({ teamId: other.teamId }, 'teamId');
    await refused({ scope: 'admin' }, 'scope');
    await refused({ name: '  ' }, 'name');
  });

  it('stops at fifty that work', async () => {
    const person = await signInAs(server, await makePerson(server));
    for (let i = 0; i < 50; i++) await make({}, person);
    await person.post('/api/account/tokens').send(wanted()).expect(409);
  });

  it('leaves other people’s tokens alone', async () => {
    const { token, made } = await make();
    await team.agents.trainer.delete(`/api/account/tokens/${made.id}`).expect(404);
    await sites(token).expect(200);
  });
});

describe('guessing tokens', () => {
  let strict: TestServer;
  beforeEach(async () => {
    strict = await testServer({ attempts: { windowMs: 60_000, perAddress: 3, perAccount: 100 } });
    return () => strict.close();
  });
  it('is stopped by address, while good ones are not counted', async () => {
    const { teamId, member } = await makeOneMember();
    const { token } = (await member.post('/api/account/tokens').send(wanted()).expect(200)).body as Made;
    const ask = (given: string) => strict.request.get(`/api/teams/${teamId}/sites`).set(as(given));
    for (let i = 0; i < 6; i++) await ask(token).expect(200);
    for (let i = 0; i < 3; i++) await ask(`fh_guess${i}`).expect(401);
    await ask('fh_guess4').expect(429);
    const { body } = await ask(token).expect(429);
    expect(body.detail).toContain('Too many attempts');
    await member.get(`/api/teams/${teamId}/sites`).expect(200);
  });

  /** One member alone: four sign-ins would be refused here. */
  async function makeOneMember() {
    const { write, clock } = strict.services;
    const person = await makePerson(strict);
    const { id } = await write((manager) => addTeam(manager, 'Small', clock()));
    await write((manager) => addMember(manager, id, person.id, 'modeller', clock()));
    return { teamId: id, member: await signInAs(strict, person) };
  }
});
