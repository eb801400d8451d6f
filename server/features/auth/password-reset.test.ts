import { readdir, readFile, stat } from 'node:fs/promises';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { OneTimeLinkEntity } from '#server/database/entities/one-time-link.ts';
import { makePerson, makeTeam, signInAs, testPassword } from '#server/testing/people.ts';
import { readBytes } from '#server/testing/read-bytes.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
beforeAll(async () => {
  server = await testServer();
});
afterAll(() => server.close());

const outbox = () => join(server.services.config.dataDir, 'outbox');
/** The texts of the .eml files for an address, oldest first, with soft line breaks undone. */
async function lettersTo(email: string): Promise<string[]> {
  const files = await readdir(outbox()).catch(() => []);
  const texts = await Promise.all(files.sort().map((file) => readFile(join(outbox(), file), 'utf8')));
  return texts.map((text) => text.replace(/=\r\n/g, '')).filter((text) => text.includes(`To: ${email}`));
}
const tokenIn = (text: string) => /\/reset\/([\w-]+)/.exec(text)![1];

async function ask(email: string) {
  const reply = await server.request.post('/api/password-resets').send({ email });
  await server.services.mail.idle();
  return reply;
}
const complete = (token: string, password = 'another good password') =>
  server.request.post(`/api/password-resets/${token}`).send({ password });

describe('a password reset', () => {
  it('answers the same whether or not there is an account', async () => {
    const person = await makePerson(server);
    const known = await ask(person.email);
    const unknown = await ask('nobody@people.example');
    expect([known.status, known.text]).toEqual([204, '']);
    expect([unknown.status, unknown.text]).toEqual([204, '']);
    expect(await lettersTo(person.email)).toHaveLength(1);
    expect(await lettersTo('nobody@people.example')).toHaveLength(0);
  });

  it('sets a new password once, and ends all sessions', async () => {
    const person = await makePerson(server);
    const agent = await signInAs(server, person);
    await ask(person.email);
    const token = tokenIn((await lettersTo(person.email))[0]);
    await complete(token).expect(204);
    expect((await agent.get('/api/session')).body.person).toBeNull();
    const signIn = (password: string) =>
      server.request.post('/api/session').send({ email: person.email, password });
    await signIn(testPassword).expect(401);
    await signIn('another good password').expect(200);
    expect((await complete(token).expect(410)).body.code).toBe('gone');
  });

  it('works once even when it is used twice at the same moment', async () => {
    const person = await makePerson(server);
    await ask(person.email);
    const token = tokenIn((await lettersTo(person.email))[0]);
    const replies = await Promise.all([complete(token), complete(token)]);
    expect(replies.map((reply) => reply.status).sort()).toEqual([204, 410]);
  });

  it('runs out after an hour, and is replaced by a later one', async () => {
    const person = await makePerson(server);
    await ask(person.email);
    await ask(person.email);
    const tokens = (await lettersTo(person.email)).map(tokenIn);
    const replies = await Promise.all(tokens.map((token) => complete(token, 'short')));
    // The password is checked first, and wrong for both: neither link is used up by that.
    expect(replies.map((reply) => reply.status)).toEqual([400, 400]);
    const rows = await server.services.dataSource
      .getRepository(OneTimeLinkEntity)
      .findBy({ personId: person.id });
    expect(rows).toHaveLength(1);
    server.pass(61 * 60_000);
    for (const token of tokens) await complete(token).expect(410);
  });

  it('refuses a token that was never given out', async () => {
    await complete('x'.repeat(43)).expect(410);
    await complete('short').expect(400);
  });

  it('is stored as a hash', async () => {
    const person = await makePerson(server);
    await ask(person.email);
    const token = tokenIn((await lettersTo(person.email))[0]);
    const rows = await server.services.dataSource
      .getRepository(OneTimeLinkEntity)
      .findBy({ personId: person.id });
    expect(rows).toHaveLength(1);
    expect(JSON.stringify(rows)).not.toContain(token);
  });

  it('lets an admin see that it was sent, never the link', async () => {
    const { teamId, people, agents } = await makeTeam(server);
    await ask(people.trainer.email);
    const token = tokenIn((await lettersTo(people.trainer.email))[0]);
    const list = await agents.admin.get(`/api/teams/${teamId}/outbox`).expect(200);
    expect(list.body.messages).toHaveLength(1);
    const { id } = list.body.messages[0];
    const message = await agents.admin.get(`/api/teams/${teamId}/outbox/${id}`).expect(200);
    expect(message.body.text).toContain('The link is left out here');
    const file = await readBytes(agents.admin.get(`/api/teams/${teamId}/outbox/${id}/message.eml`));
    expect(file).toContain(`To: ${people.trainer.email}`);
    expect(message.text + file.replace(/=\r\n/g, '')).not.toContain(token);
  });

  it('is kept in files that only whoever runs the server can read', async () => {
    const person = await makePerson(server);
    await ask(person.email);
    const files = await readdir(outbox());
    const modes = await Promise.all(
      files.map(async (file) => (await stat(join(outbox(), file))).mode & 0o777),
    );
    expect(new Set(modes)).toEqual(new Set([0o600]));
  });
});
