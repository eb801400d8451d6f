import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
beforeAll(async () => {
  server = await testServer({ publicUrl: 'http://shore.example' });
});
afterAll(() => server.close());

/** The status of a sign-out with these headers: 204 unless it is refused. */
const statusWith = async (headers: Record<string, string>) =>
  (await server.request.delete('/api/session').set({ Host: 'shore.example', ...headers })).status;

describe('a change', () => {
  it.each([
    ['by a program, which says nothing of where it comes from', {}, 204],
    ['from our own page', { 'Sec-Fetch-Site': 'same-origin', Origin: 'http://shore.example' }, 204],
    ['from our own page over plain http', { Origin: 'http://shore.example' }, 204],
    ['from another site', { 'Sec-Fetch-Site': 'cross-site', Origin: 'http://evil.example' }, 403],
    ['from another site over plain http', { Origin: 'http://evil.example' }, 403],
    ['from a neighbour under the same domain', { 'Sec-Fetch-Site': 'same-site' }, 403],
    ['from another port', { Origin: 'http://shore.example:8080' }, 403],
    ['from a page that hides its origin', { Origin: 'null' }, 403],
    ['from https to http', { Origin: 'https://shore.example' }, 403],
  ])('%s', async (_case, headers, status) => {
    expect(await statusWith(headers as Record<string, string>)).toBe(status);
  });

  it('is possible at the public address though a proxy hides it', async () => {
    expect(await statusWith({ Host: '10.0.0.7:4173', Origin: 'http://shore.example' })).toBe(204);
  });

  it('is refused with words', async () => {
    const reply = await server.request
      .post('/api/session')
      .set('Origin', 'http://evil.example')
      .send({})
      .expect(403);
    expect(reply.body).toMatchObject({ code: 'forbidden', detail: expect.stringContaining('another site') });
  });
});

it('reading is open to links from elsewhere', async () => {
  await server.request.get('/api/health').set('Sec-Fetch-Site', 'cross-site').expect(200);
});
