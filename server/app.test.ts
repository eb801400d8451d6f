import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { testServer, type TestServer } from '#server/testing/test-server.ts';

let server: TestServer;
beforeAll(async () => {
  server = await testServer();
});
afterAll(() => server.close());

describe('the app', () => {
  it('says that it is ready', async () => {
    const reply = await server.request.get('/api/health').expect(200);
    expect(reply.body).toEqual({ status: 'ok', version: expect.stringMatching(/^\d+\.\d+\.\d+$/) });
  });

  it('answers with a problem where nothing is mounted', async () => {
    const reply = await server.request.get('/api/nothing').expect(404);
    expect(reply.type).toBe('application/problem+json');
    expect(reply.body).toMatchObject({ type: '/problems/not-found', status: 404, code: 'not-found' });
  });
});
