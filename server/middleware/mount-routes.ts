import type { IRouter, Request, RequestHandler, Response } from 'express';
import type { z } from 'zod';
import type { Services } from '../services.ts';
import { admit, sessionCaller } from './access.ts';
import { bearerOf, tokenReader, type TokenReader } from './access-token.ts';
import { createAttemptLimits } from './attempts.ts';
import { bodyReader } from './body.ts';
import { problemOfIssues } from './classify-error.ts';
import { ProblemError } from './problem-error.ts';
import type { Route } from './route.ts';
import { runMiddleware } from './run-middleware.ts';
import { sendReply } from './send-reply.ts';
import { sessions } from './session.ts';

function parse(schema: z.ZodType, value: unknown): unknown {
  const parsed = schema.safeParse(value);
  if (!parsed.success) throw problemOfIssues(parsed.error.issues);
  return parsed.data;
}

/** JSON and forms have a body to parse; bytes are the handler's own business. */
function parseBody({ endpoint, options }: Route, request: Request): unknown {
  if (endpoint.bodyKind === 'bytes' || endpoint.method === 'GET' || endpoint.method === 'DELETE')
    return undefined;
  if (request.body === undefined && !options.form && Number(request.get('content-length') ?? 0) > 0)
    throw new ProblemError('invalid-request', 'Expected a body of type application/json.');
  return parse(endpoint.body, request.body);
}

/**
 * What happens to a request, in this order: attempts are counted, the access token is read or else the session is loaded, the
 * access rule speaks, the body is read, everything is parsed, the handler works, its reply is checked.
 */
function answer(route: Route, services: Services, loadSession: RequestHandler, readToken: TokenReader) {
  const { endpoint, options, handle } = route;
  const findCaller = async (request: Request, response: Response) => {
    // A token wins: the cookie beside it is not even read, so it can lend a token nothing.
    const token = bearerOf(request);
    if (token !== undefined) return readToken(token, request, response);
    await runMiddleware(loadSession, request, response);
    return sessionCaller(request, services);
  };
  const limits = options.limitAttempts && createAttemptLimits(services.config, options.limitAttempts);
  const readBody = bodyReader(route);
  return async (request: Request, response: Response): Promise<void> => {
    if (limits) await runMiddleware(limits.byAddress, request, response);
    const caller = await findCaller(request, response);
    const { membership } = await admit(caller, request, route, services);
    await runMiddleware(readBody, request, response);
    if (limits) await runMiddleware(limits.byAccount, request, response);
    const call = {
      params: parse(endpoint.params, request.params),
      query: parse(endpoint.query, request.query),
      body: parseBody(route, request),
      bytes: Buffer.isBuffer(request.body) ? request.body : undefined,
      // Present whenever the rule asks for it: admit has thrown otherwise.
      person: caller.person!,
      membership,
      token: caller.token,
      request,
      response,
    };
    const reply = await handle(call);
    if (response.headersSent) return;
    await sendReply(endpoint, reply, request, response);
  };
}

const methods = { GET: 'get', POST: 'post', PUT: 'put', PATCH: 'patch', DELETE: 'delete' } as const;

/** Mounts every route on an app. Whatever is not mounted does not answer. */
export function mountRoutes(app: IRouter, routes: readonly Route[], services: Services): void {
  const loadSession = sessions(services);
  const readToken = tokenReader(services);
  for (const route of routes) {
    app[methods[route.endpoint.method]](route.endpoint.path, answer(route, services, loadSession, readToken));
  }
}
