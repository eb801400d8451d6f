import express, { type Response } from 'express';
import supertest from 'supertest';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { checkReplies, undescribed } from './check-replies.ts';
import { testServer, type TestServer } from './test-server.ts';

let server: TestServer;
beforeAll(async () => {
  server = await testServer();
});
afterAll(() => server.close());

/** What becomes of an answer of the route of the session. */
async function answer(send: (response: Response) => void) {
  const app = express();
  app.use(checkReplies(server.services));
  app.get('/api/session', (_request, response) => {
    send(response);
  });
  return supertest(app).get('/api/session');
}

test('what is described goes through', async () => {
  const { body } = (await server.request.get('/api/session').expect(200)) as { body: unknown };
  expect((await answer((response) => response.json(body))).status).toBe(200);
  const problem = { type: '/problems/internal', title: 'No', status: 500, detail: 'No', code: 'internal' };
  expect((await answer((r) => r.status(500).type('application/problem+json').json(problem))).status).toBe(
    500,
  );
});

test.each([
  ['a field of the wrong type', (response: Response) => response.json({ person: 7 })],
  ['a refusal that is no problem', (response: Response) => response.status(400).json({ error: 'no' })],
  ['another media type', (response: Response) => response.type('text/html').send('<p>')],
  ['a status that is not described', (response: Response) => response.status(204).end()],
])('%s does not', async (_, send) => {
  const { status } = await answer(send);
  expect(status).toBe(undescribed);
});
