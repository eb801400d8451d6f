import { Validator } from '@seriousme/openapi-schema-validator';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { testServer, type TestServer } from '#server/testing/test-server.ts';
import { allRoutes } from '#server/routes.ts';
import { describeApi, type ApiDescription } from './describe-api.ts';

let server: TestServer;
let description: ApiDescription;
beforeAll(async () => {
  server = await testServer();
  description = describeApi(allRoutes(server.services));
});
afterAll(() => server.close());

test('is OpenAPI 3.1, by the published schema of OpenAPI', async () => {
  const { valid, errors } = await new Validator().validate(structuredClone(description));
  expect(errors).toBeUndefined();
  expect(valid).toBe(true);
});

test('describes every route, with what it takes, gives and refuses, and who may use it', () => {
  const described = Object.values(description.paths).flatMap((methods) => Object.values(methods));
  expect(described).toHaveLength(allRoutes(server.services).length);
  expect(new Set(described.map(({ operationId }) => operationId)).size).toBe(described.length);
  for (const { summary, description: who, responses, tags } of described) {
    expect(summary).toMatch(/^[A-Z]/);
    expect(who).toMatch(/no account|signed in|role/);
    expect(tags).toHaveLength(1);
    expect(Object.keys(responses)).toContain('default');
  }
});

test('a route in full', () => {
  const { patch } = description.paths['/api/sites/{siteId}'];
  expect(patch).toMatchObject({
    operationId: 'renameSite',
    tags: ['Sites'],
    parameters: [{ name: 'siteId', in: 'path', required: true, schema: { type: 'string', format: 'uuid' } }],
    requestBody: {
      content: {
        'application/json': {
          schema: { $ref: '#/components/schemas/RenameSiteBody' },
        },
      },
    },
    security: [{ session: [] }, { token: [] }],
  });
  expect(patch.responses['200'].content).toEqual({
    'application/json': { schema: { $ref: '#/components/schemas/Site' } },
  });
  expect(description.components.schemas.RenameSiteBody).toMatchObject({
    type: 'object',
    properties: { name: { type: 'string', maxLength: 100 } },
    required: ['name'],
  });
  expect(patch.description).toMatch(/modeller, admin.*By access tokens that may read and write/);
  expect(description.components.securitySchemes.token).toMatchObject({ type: 'http', scheme: 'bearer' });
  const account = description.paths['/api/account'].patch;
  expect(account.security).toEqual([{ session: [] }]);
  expect(account.description).toContain('Not by access token');
});

test('every reference leads somewhere', () => {
  const text = JSON.stringify(description);
  const refs = new Set([...text.matchAll(/"\$ref":"([^"]*)"/g)].map(([, ref]) => ref));
  expect(refs.size).toBeGreaterThan(20);
  const known = Object.keys(description.components.schemas).map((name) => `#/components/schemas/${name}`);
  for (const ref of refs) expect(known).toContain(ref);
});

test('is served to whoever asks, and as a page', async () => {
  const { body } = await server.request.get('/api/openapi.json').expect(200);
  expect(body).toEqual(JSON.parse(JSON.stringify(description)));
  const page = await server.request
    .get('/api/docs')
    .expect(200)
    .expect('content-type', /text\/html/);
  expect(page.text).toContain('PATCH</b> /api/sites/{siteId}');
  expect(page.text).not.toMatch(/<script|https?:\/\//);
});
