import { mkdirSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { createApp } from '#server/app.ts';
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
    for (const path of ['/api/nothing', '/api', '/api/health/more']) {
      const reply = await server.request.get(path).expect(404);
      expect(reply.type).toBe('application/problem+json');
      expect(reply.body).toMatchObject({ type: '/problems/not-found', status: 404, code: 'not-found' });
    }
    await server.request.put('/api/health').expect(404);
  });

  it('answers with a problem to an address that is not well formed', async () => {
    const reply = await server.request.get('/api/sites/%E0%A4%A').expect(400);
    expect(reply.body.code).toBe('invalid-request');
  });

  it('sends what keeps a page to its own sources, on plain http without asking for https', async () => {
    const { headers } = await server.request.get('/api/health');
    expect(headers['content-security-policy'].split(';')).toEqual([
      "default-src 'self'",
      "script-src 'self' 'wasm-unsafe-eval'",
      "style-src 'self' 'unsafe-inline'",
      "img-src 'self' data: blob:",
      "worker-src 'self' blob:",
      "object-src 'none'",
      "base-uri 'self'",
      "form-action 'self'",
      "frame-ancestors 'none'",
    ]);
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['referrer-policy']).toBe('no-referrer');
    expect(headers['strict-transport-security']).toBeUndefined();
    expect(headers['x-powered-by']).toBeUndefined();
  });

  it('behind an https proxy marks its cookies so, and asks for https from then on', async () => {
    const secure = await testServer({ publicUrl: 'https://shore.example', trustProxy: 1 });
    const { headers } = await secure.request.get('/api/health').set('X-Forwarded-Proto', 'https');
    expect(headers['strict-transport-security']).toContain('max-age');
    expect(headers['content-security-policy']).toContain('upgrade-insecure-requests');
    await secure.close();
  });

  it('serves the client beside the API, and a missing asset as missing', async () => {
    const folder = join(server.services.config.dataDir, 'client');
    mkdirSync(join(folder, 'assets'), { recursive: true });
    writeFileSync(join(folder, 'index.html'), '<title>Foothold</title>');
    const app = supertest(createApp(server.services, folder));
    expect((await app.get('/sites/1').expect(200)).text).toContain('Foothold');
    await app.get('/api/nothing').expect(404);
    const missing = await app.get('/assets/main-old.js').expect(404);
    expect(missing.body.code).toBe('not-found');
  });
});
