import { afterEach, describe, expect, it, vi } from 'vitest';
import { z } from 'zod';
import { endpoint } from '#contract/endpoint.ts';
import { callEndpoint, endpointUrl, fetchBlob, onSignedOut, ProblemError } from './api-client.ts';

const read = endpoint({
  method: 'GET',
  path: '/api/things/:thingId',
  summary: 'A thing',
  params: z.object({ thingId: z.string() }),
  query: z.object({ limit: z.coerce.number().default(5) }),
  reply: z.object({ name: z.string(), size: z.number() }),
});
const write = endpoint({
  method: 'POST',
  path: '/api/things',
  summary: 'Make a thing',
  body: z.strictObject({ name: z.string() }),
});
const upload = endpoint({
  method: 'POST',
  path: '/api/files',
  summary: 'Add a file',
  bodyKind: 'form',
  body: z.strictObject({ part: z.string() }),
  reply: z.object({ ok: z.boolean() }),
});
const put = endpoint({ method: 'PUT', path: '/api/frame', summary: 'Store', bodyKind: 'bytes' });
const bytes = endpoint({ method: 'GET', path: '/api/frame', summary: 'Fetch', replyKind: 'bytes' });

const answer = (status: number, body: BodyInit | null) =>
  vi.spyOn(globalThis, 'fetch').mockImplementation(() => Promise.resolve(new Response(body, { status })));
const problem = (status: number, code: string, more: object = {}) =>
  answer(
    status,
    JSON.stringify({ type: `/problems/${code}`, title: 'No', status, detail: 'Because.', code, ...more }),
  );
const refusal = (call: Promise<unknown>) =>
  call.then(
    () => expect.unreachable('the call should have been refused'),
    (error: unknown) => error as ProblemError,
  );

afterEach(() => {
  vi.restoreAllMocks();
  vi.unstubAllGlobals();
});

describe('callEndpoint', () => {
  it('fills the path, sends the query and parses the reply', async () => {
    const fetched = answer(200, JSON.stringify({ name: 'mound', size: 3, extra: 'dropped' }));
    const reply = await callEndpoint(read, { params: { thingId: 'a/b' }, query: { limit: 2 } });
    expect(reply).toEqual({ name: 'mound', size: 3 });
    expect(fetched.mock.calls[0][0]).toBe('/api/things/a%2Fb?limit=2');
  });

  it('sends JSON and gives undefined where no reply is promised', async () => {
    const fetched = answer(204, null);
    expect(await callEndpoint(write, { body: { name: 'fence' } })).toBeUndefined();
    const init = fetched.mock.calls[0][1];
    expect(init?.body).toBe('{"name":"fence"}');
    expect(init?.headers).toMatchObject({ 'content-type': 'application/json' });
  });

  it('sends bytes as they are and gets bytes back', async () => {
    const fetched = answer(200, Uint8Array.of(7, 8, 9));
    const sent = new Blob([Uint8Array.of(1, 2)]);
    await callEndpoint(put, { bytes: sent });
    expect(fetched.mock.calls[0][1]?.body).toBe(sent);
    expect([...new Uint8Array(await (await fetchBlob(bytes, {})).arrayBuffer())]).toEqual([7, 8, 9]);
  });

  it('reads the report where bytes are refused', async () => {
    problem(404, 'not-found');
    expect(await refusal(fetchBlob(bytes, {}))).toMatchObject({ status: 404, message: 'Because.' });
  });

  it('does not trust a reply that breaks the contract', async () => {
    answer(200, JSON.stringify({ name: 'mound', size: 'three' }));
    const error = await refusal(callEndpoint(read, { params: { thingId: 'a' } }));
    expect(error).toBeInstanceOf(ProblemError);
    expect(error.code).toBe('unreadable');
  });

  it('turns a problem report into an error with its fields and parts', async () => {
    problem(422, 'raster-rotated', {
      found: 'a turned grid',
      expected: 'north up',
      remedy: 'Warp it.',
      fields: [{ field: 'name', message: 'Too long' }],
    });
    const error = await refusal(callEndpoint(write, { body: { name: 'x' } }));
    expect(error).toMatchObject({ status: 422, code: 'raster-rotated', message: 'Because.' });
    expect(error.fields).toEqual({ name: 'Too long' });
    expect(error.problem?.remedy).toBe('Warp it.');
  });

  it('says in plain words that no answer came', async () => {
    vi.spyOn(globalThis, 'fetch').mockRejectedValue(new TypeError('Failed to fetch'));
    const error = await refusal(callEndpoint(write, { body: { name: 'x' } }));
    expect(error).toMatchObject({ status: 0, code: 'unreachable' });
    expect(error.message).not.toContain('fetch');
  });

  it('survives an error page that is no problem report', async () => {
    answer(502, '<html>Bad gateway</html>');
    expect(await refusal(callEndpoint(write, { body: { name: 'x' } }))).toMatchObject({
      status: 502,
      code: 'unreadable',
    });
  });

  it('tells who listens when nobody is signed in any more, and not when a password is wrong', async () => {
    const heard = vi.fn();
    const stop = onSignedOut(heard);
    problem(401, 'wrong-credentials');
    await refusal(callEndpoint(write, { body: { name: 'x' } }));
    expect(heard).not.toHaveBeenCalled();
    problem(401, 'not-signed-in');
    await refusal(callEndpoint(write, { body: { name: 'x' } }));
    expect(heard).toHaveBeenCalledOnce();
    stop();
  });

  it('refuses a form without its file', async () => {
    await expect(callEndpoint(upload, { body: { part: 'cover' } })).rejects.toThrow('needs a file');
  });
});

/** Stands in for the browser's own, whose uploads cannot be watched in a test. */
class FakeXhr {
  static last: FakeXhr;
  upload: { onprogress?: (event: object) => void } = {};
  status = 0;
  responseText = '';
  body: unknown;
  aborted = false;
  onload?: () => void;
  onerror?: () => void;
  onabort?: () => void;
  onloadend?: () => void;
  constructor() {
    FakeXhr.last = this;
  }
  open() {}
  setRequestHeader() {}
  send(body: unknown) {
    this.body = body;
  }
  abort() {
    this.aborted = true;
    this.onabort?.();
    this.onloadend?.();
  }
  answer(status: number, body: string) {
    this.status = status;
    this.responseText = body;
    this.onload?.();
    this.onloadend?.();
  }
}

describe('upload with progress', () => {
  const file = new File(['pixels'], 'cover.tif');
  const start = (signal?: AbortSignal) => {
    vi.stubGlobal('XMLHttpRequest', FakeXhr);
    const onProgress = vi.fn();
    const call = callEndpoint(upload, { body: { part: 'cover' }, file, onProgress, signal });
    return { call, onProgress, xhr: FakeXhr.last };
  };

  it('puts the fields before the file and reports what has gone up', async () => {
    const { call, onProgress, xhr } = start();
    expect([...(xhr.body as FormData).keys()]).toEqual(['part', 'file']);
    xhr.upload.onprogress?.({ loaded: 3, total: 6, lengthComputable: true });
    xhr.upload.onprogress?.({ loaded: 4, total: 0, lengthComputable: false });
    xhr.answer(200, '{"ok":true}');
    expect(await call).toEqual({ ok: true });
    expect(onProgress.mock.calls).toEqual([[{ sent: 3, total: 6 }], [{ sent: 4, total: undefined }]]);
  });

  it('can be cancelled', async () => {
    const controller = new AbortController();
    const { call, xhr } = start(controller.signal);
    controller.abort();
    expect((await refusal(call)).name).toBe('AbortError');
    expect(xhr.aborted).toBe(true);
  });

  it('says that no answer came', async () => {
    const { call, xhr } = start();
    xhr.onerror?.();
    expect(await refusal(call)).toMatchObject({ code: 'unreachable' });
  });
});

describe('endpointUrl', () => {
  it('leaves out what is not given', () => {
    expect(endpointUrl(read, { params: { thingId: '1' } })).toBe('/api/things/1');
  });
  it('names the parameter that is missing', () => {
    expect(() => endpointUrl(read, { params: {} as { thingId: string } })).toThrow('thingId');
  });
});
