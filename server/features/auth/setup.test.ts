import { afterEach, describe, expect, it } from 'vitest';
import { demoAccounts } from '#server/demo/demo-accounts.ts';
import { prepareFirstStart } from '#server/first-start.ts';
import { addPerson } from '#server/people/people.repository.ts';
import { makePerson } from '#server/testing/people.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
afterEach(() => server.close());

const firstAdmin = { email: 'first@people.example', password: 'a long enough one', team: 'Shore team' };
const body = {
  teamName: 'Shore team',
  name: 'Ana',
  email: 'ana@people.example',
  password: 'a long enough one',
};
const tokenOf = (link: string | undefined) => /^http:\/\/localhost:4173\/setup\/([\w-]{43})$/.exec(link!)![1];

async function addDemoAdmin({ services }: TestServer) {
  const { email, name, password } = demoAccounts.find((account) => account.role === 'admin')!;
  const passwordHash = await services.passwords.hash(password);
  await services.write((manager) => addPerson(manager, { email, name, passwordHash }, services.clock()));
  return { email, password };
}

describe('the first start', () => {
  it('gives out a link that makes the first team and its admin, once', async () => {
    server = await testServer();
    const { setupLink, demo } = await prepareFirstStart(server.services);
    expect(demo).toBe(false);
    const path = `/api/setup/${tokenOf(setupLink)}`;
    await server.request.get(path).expect(200, { open: true });
    const agent = server.agent();
    const made = await agent.post(path).send(body).expect(200);
    expect(made.body.memberships).toMatchObject([{ teamName: 'Shore team', role: 'admin' }]);
    expect((await agent.get('/api/session')).body.person.name).toBe('Ana');
    await server.request.get(path).expect(410);
    await server.request
      .post(path)
      .send({ ...body, email: 'other@people.example' })
      .expect(410);
  });

  it('replaces the link of the start before, and lets it run out after a day', async () => {
    server = await testServer();
    const first = tokenOf((await prepareFirstStart(server.services)).setupLink);
    const second = tokenOf((await prepareFirstStart(server.services)).setupLink);
    await server.request.get(`/api/setup/${first}`).expect(410);
    await server.request.get(`/api/setup/${second}`).expect(200);
    server.pass(25 * 3_600_000);
    await server.request.get(`/api/setup/${second}`).expect(410);
  });

  it('gives out no link when there is somebody', async () => {
    server = await testServer();
    await makePerson(server);
    expect(await prepareFirstStart(server.services)).toEqual({ demo: false, setupLink: undefined });
  });

  it('makes the admin of the environment, once', async () => {
    server = await testServer({ firstAdmin, demo: 'auto' });
    expect(await prepareFirstStart(server.services)).toEqual({ demo: false, setupLink: undefined });
    await prepareFirstStart(server.services);
    const { email, password } = firstAdmin;
    const reply = await server.request.post('/api/session').send({ email, password }).expect(200);
    expect(reply.body.memberships).toMatchObject([{ teamName: 'Shore team', role: 'admin' }]);
  });

  it('asks for the demo while nobody real is there', async () => {
    server = await testServer({ demo: 'auto' });
    expect((await prepareFirstStart(server.services)).demo).toBe(true);
    await addDemoAdmin(server);
    expect((await prepareFirstStart(server.services)).demo).toBe(true);
    await makePerson(server);
    expect((await prepareFirstStart(server.services)).demo).toBe(false);
  });
});

describe('the demo accounts', () => {
  it('are listed and let in while the demo is on', async () => {
    server = await testServer({ demo: 'auto' });
    expect((await server.request.get('/api/demo-accounts')).body.accounts).toEqual([]);
    const account = await addDemoAdmin(server);
    const { body } = await server.request.get('/api/demo-accounts').expect(200);
    expect(body.accounts).toEqual([{ role: 'admin', ...account }]);
    expect((await server.request.post('/api/session').send(account).expect(200)).body.demo).toBe(true);
  });

  it('open nothing once the demo is off', async () => {
    server = await testServer({ demo: 'auto' });
    const account = await addDemoAdmin(server);
    const agent = server.agent();
    await agent.post('/api/session').send(account).expect(200);
    server.services.config.demo = 'off';
    expect((await prepareFirstStart(server.services)).setupLink).toBeDefined();
    expect((await agent.get('/api/session')).body).toEqual({ person: null, memberships: [], demo: false });
    await server.request.post('/api/session').send(account).expect(401);
    expect((await server.request.get('/api/demo-accounts')).body.accounts).toEqual([]);
  });
});
