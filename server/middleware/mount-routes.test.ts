import { Readable } from 'node:stream';
import express from 'express';
import supertest from 'supertest';
import { afterAll, beforeAll, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { endpoint } from '#contract/endpoint.ts';
import { testServer, type TestServer } from '#server/testing/test-server.ts';
import { problemWriter } from './errors.ts';
import { mountRoutes } from './mount-routes.ts';
import { requestLog } from './request-log.ts';
import { route, type BytesReply, type Route } from './route.ts';

let server: TestServer;
beforeAll(async () => {
  server = await testServer();
});
afterAll(() => server.close());

/** An app with nothing but the routes given. */
function appWith(...routes: Route[]) {
  const app = express();
  app.use(requestLog(server.services.log));
  mountRoutes(app, routes, server.services);
  app.use(problemWriter);
  return supertest(app);
}

const echo = endpoint({
  method: 'POST',
  path: '/echo/:number',
  summary: 'Says what it got',
  params: z.object({ number: z.coerce.number().int() }),
  query: z.object({ q: z.string().default('none') }),
  body: z.strictObject({ deep: z.object({ list: z.array(z.number()) }) }),
  reply: z.object({ number: z.number(), q: z.string(), list: z.array(z.number()) }),
});
const echoRoute = route(echo, 'anyone', ({ params, query, body }) => ({
  number: params.number,
  q: query.q,
  list: body.deep.list,
}));

describe('a route', () => {
  it('hands its handler what the schemas made of the request', async () => {
    const reply = await appWith(echoRoute)
      .post('/echo/7?q=x')
      .send({ deep: { list: [1, 2] } })
      .expect(200);
    expect(reply.body).toEqual({ number: 7, q: 'x', list: [1, 2] });
    expect(reply.headers['cache-control']).toBe('no-store');
  });

  it('names every field that is wrong by its path', async () => {
    const reply = await appWith(echoRoute)
      .post('/echo/7')
      .send({ deep: { list: [1, 'two', null] } })
      .expect(400);
    expect(reply.type).toBe('application/problem+json');
    expect(reply.body).toMatchObject({ code: 'invalid-request', status: 400, title: expect.any(String) });
    expect(reply.body.fields.map((f: { field: string }) => f.field)).toEqual(['deep.list.1', 'deep.list.2']);
    expect(reply.body.instance).toBe(`urn:uuid:${reply.headers['x-request-id']}`);
  });

  it('refuses a body that is no JSON, of another type, or too large', async () => {
    const app = appWith(echoRoute);
    const json = (text: string) => app.post('/echo/7').set('Content-Type', 'application/json').send(text);
    expect((await json('{"deep":').expect(400)).body.detail).toContain('not JSON');
    const plain = await app.post('/echo/7').set('Content-Type', 'text/plain').send('{}').expect(400);
    expect(plain.body.detail).toContain('application/json');
    expect((await json(`"${'x'.repeat(2 * 1024 * 1024)}"`).expect(413)).body.code).toBe('too-large');
  });

  it('does not read the body of whoever is refused', async () => {
    const form = vi.fn<express.RequestHandler>((_request, _response, next) => next());
    const upload = endpoint({ method: 'POST', path: '/upload', summary: 'Takes a file', bodyKind: 'form' });
    const app = appWith(route(upload, 'signed-in', () => undefined, { form }));
    await app.post('/upload').send('anything').expect(401);
    expect(form).not.toHaveBeenCalled();
  });

  it('cannot be made where its access rule has nothing to look at', () => {
    const make = () => route(echo, { site: ['admin'] }, () => ({ number: 1, q: '', list: [] }));
    expect(make).toThrow('has no :siteId');
  });

  it('does not let out what the schema of its reply does not name', async () => {
    const get = endpoint({
      method: 'GET',
      path: '/row',
      summary: 'A row',
      reply: z.object({ name: z.string() }),
    });
    const row = { name: 'Wren', passwordHash: 'secret' };
    const reply = await appWith(route(get, 'anyone', () => row))
      .get('/row')
      .expect(200);
    expect(reply.body).toEqual({ name: 'Wren' });
  });

  it('tells outsiders nothing of an error that nobody foresaw', async () => {
    const get = endpoint({ method: 'GET', path: '/broken', summary: 'Breaks' });
    const handler = () => Promise.reject(new Error('SELECT secret FROM table'));
    const reply = await appWith(route(get, 'anyone', handler))
      .get('/broken')
      .expect(500);
    expect(reply.body.code).toBe('internal');
    expect(reply.text).not.toContain('secret');
  });

  it('reads bytes under its limit', async () => {
    const put = endpoint({ method: 'PUT', path: '/bytes', summary: 'Takes bytes', bodyKind: 'bytes' });
    const seen: (Buffer | undefined)[] = [];
    const handler = ({ bytes }: { bytes: Buffer | undefined }) => void seen.push(bytes);
    const app = appWith(route(put, 'anyone', handler, { bodyLimit: 4 }));
    const send = (bytes: number[]) =>
      app.put('/bytes').set('Content-Type', 'application/octet-stream').send(Buffer.from(bytes));
    await send([1, 2, 3, 4]).expect(204);
    expect(seen).toEqual([Buffer.from([1, 2, 3, 4])]);
    expect((await send([1, 2, 3, 4, 5]).expect(413)).body.code).toBe('too-large');
  });
});

describe('a reply of bytes', () => {
  const get = endpoint({ method: 'GET', path: '/file', summary: 'A file', replyKind: 'bytes' });
  const serving = (reply: () => BytesReply) => appWith(route(get, 'anyone', reply));

  it('is a download with its name, and is asked for anew unless it never changes', async () => {
    const reply = () => ({
      bytes: Buffer.from('a,b\r\n'),
      type: 'text/csv',
      fileName: 'Säume.csv',
      etag: 'e1',
    });
    const { headers, text } = await serving(reply).get('/file').expect(200);
    expect(text).toBe('a,b\r\n');
    expect(headers).toMatchObject({
      'content-type': 'text/csv; charset=utf-8',
      'content-length': '5',
      etag: '"e1"',
      'cache-control': 'private, no-cache',
    });
    expect(headers['content-disposition']).toContain("filename*=UTF-8''S%C3%A4ume.csv");
  });

  it('is not sent again to whoever has it, and its stream is let go', async () => {
    const stream = Readable.from([Buffer.from('abc')]);
    const reply = () => ({ bytes: stream, type: 'image/tiff', etag: 'e1', immutable: true, length: 3 });
    const response = await serving(reply).get('/file').set('If-None-Match', '"e1"').expect(304);
    expect(response.headers['cache-control']).toBe('private, max-age=31536000, immutable');
    expect(stream.destroyed).toBe(true);
  });

  it('is cut off, not ended, when its source fails half-way', async () => {
    function* source() {
      yield Buffer.from('abc');
      throw new Error('disk failed');
    }
    const reply = () => ({ bytes: Readable.from(source()), type: 'image/tiff' });
    await expect(serving(reply).get('/file')).rejects.toThrow(/aborted|hang up/);
  });
});
