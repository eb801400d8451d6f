import { randomUUID } from 'node:crypto';
import type { IncomingMessage } from 'node:http';
import type { RequestHandler } from 'express';
import type { Logger } from 'pino';
import { pinoHttp } from 'pino-http';

/** The path as it may be logged: without the query, and without one-time tokens. */
export const loggablePath = (url: string): string =>
  url.split('?')[0].replace(/\/(setup|invites?|password-resets|reset)\/[^/]+/g, '/$1/…');

/** Gives each request a number, in the log and in `X-Request-Id`, and logs it without headers, cookies or bodies. */
export const requestLog = (log: Logger): RequestHandler =>
  pinoHttp({
    logger: log,
    genReqId: (_request, response) => {
      const id = randomUUID();
      response.setHeader('X-Request-Id', id);
      return id;
    },
    customLogLevel: (_request, response, error) =>
      error || response.statusCode >= 500 ? 'error' : response.statusCode >= 400 ? 'info' : 'debug',
    serializers: {
      req: (request: IncomingMessage & { id: unknown }) => ({
        id: request.id,
        method: request.method,
        path: loggablePath(request.url ?? ''),
      }),
      res: (response: { statusCode: number }) => ({ status: response.statusCode }),
    },
  });
