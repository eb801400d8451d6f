import { Writable } from 'node:stream';
import express from 'express';
import { pino } from 'pino';
import supertest from 'supertest';
import { expect, it } from 'vitest';
import { loggablePath, requestLog } from './request-log.ts';

it('logs no cookie, body, query or one-time token', async () => {
  const lines: string[] = [];
  const sink = new Writable({
    write(chunk: Buffer, _encoding, done) {
      lines.push(chunk.toString());
      done();
    },
  });
  const app = express();
  app.use(requestLog(pino({ level: 'debug' }, sink)));
  app.use((_request, response) => void response.status(404).set('Set-Cookie', 'foothold.sid=s3cret').end());
  const token = 't0ken'.repeat(9);
  await supertest(app)
    .post(`/api/invites/${token}?q=s3cret`)
    .set('Cookie', 'foothold.sid=s3cret')
    .set('Authorization', 's3cret')
    .send({ password: 's3cret' });
  expect(lines).toHaveLength(1);
  expect(JSON.parse(lines[0])).toMatchObject({
    req: { method: 'POST', path: '/api/invites/…' },
    res: { status: 404 },
  });
  expect(lines[0]).not.toMatch(/s3cret|t0ken/);
});

it.each([
  ['/api/setup/abc', '/api/setup/…'],
  ['/setup/abc', '/setup/…'],
  ['/invite/abc', '/invite/…'],
  ['/reset/abc', '/reset/…'],
  ['/api/password-resets/abc', '/api/password-resets/…'],
  ['/api/password-resets', '/api/password-resets'],
  ['/api/teams/t/invites/i', '/api/teams/t/invites/…'],
  ['/api/sites/s', '/api/sites/s'],
])('%s is logged as %s', (url, logged) => {
  expect(loggablePath(url)).toBe(logged);
});
