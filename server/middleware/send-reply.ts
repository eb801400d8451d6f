import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { Request, Response } from 'express';
import type { Endpoint } from '#contract/endpoint.ts';
import type { BytesReply } from './route.ts';

async function sendBytes(reply: BytesReply, request: Request, response: Response): Promise<void> {
  if (reply.fileName) response.attachment(reply.fileName);
  response.type(reply.type);
  if (reply.etag) {
    response.set('ETag', `"${reply.etag}"`);
    response.set('Cache-Control', `private, ${reply.immutable ? 'max-age=31536000, immutable' : 'no-cache'}`);
    if (request.fresh) {
      if (reply.bytes instanceof Readable) reply.bytes.destroy();
      response.status(304).end();
      return;
    }
  }
  const length = reply.bytes instanceof Readable ? reply.length : reply.bytes.byteLength;
  if (length !== undefined) response.set('Content-Length', String(length));
  if (!(reply.bytes instanceof Readable)) {
    response.end(reply.bytes);
    return;
  }
  try {
    await pipeline(reply.bytes, response);
  } catch (error) {
    // The reader went away: nobody is left to be told.
    if ((error as NodeJS.ErrnoException).code !== 'ERR_STREAM_PREMATURE_CLOSE') throw error;
  }
}

/**
 * Writes out what a handler returned. JSON passes through the endpoint's schema, which drops whatever it does not name: a
 * column that is added to a table does not reach outsiders by itself.
 */
export async function sendReply(
  endpoint: Endpoint,
  reply: unknown,
  request: Request,
  response: Response,
): Promise<void> {
  response.set('Cache-Control', 'no-store');
  if (endpoint.replyKind === 'none') response.status(204).end();
  else if (endpoint.replyKind === 'bytes') await sendBytes(reply as BytesReply, request, response);
  else {
    const parsed = endpoint.reply.safeParse(reply);
    if (!parsed.success)
      throw new Error(`${endpoint.method} ${endpoint.path} made a wrong reply: ${parsed.error.message}`);
    response.json(parsed.data);
  }
}
