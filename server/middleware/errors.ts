import type { ErrorRequestHandler, RequestHandler } from 'express';
import type { Problem, ProblemCode } from '#contract/problem.ts';
import { classifyError } from './classify-error.ts';
import { notFound, statusOf, titleOf } from './problem-error.ts';

/** What tells programs how to sign in (RFC 6750). Browsers ask for nothing upon `Bearer`. */
const challenges: Partial<Record<ProblemCode, string>> = {
  'not-signed-in': 'Bearer realm="Foothold"',
  'token-refused': 'Bearer realm="Foothold", error="invalid_token"',
};

/** Writes every error out as an RFC 9457 problem; what is not known is logged with the request's number. */
export const problemWriter: ErrorRequestHandler = (error: unknown, request, response, next) => {
  const problem = classifyError(error);
  if (problem.code === 'internal') request.log.error({ err: error }, 'request failed');
  if (response.headersSent) {
    // Half a reply is out already: cutting the connection is the one honest sign left.
    next(error);
    return;
  }
  const status = statusOf(problem.code);
  const body: Problem = {
    type: `/problems/${problem.code}`,
    title: titleOf(problem.code),
    status,
    detail: problem.message,
    instance: `urn:uuid:${request.id as string}`,
    code: problem.code,
    ...problem.extra,
  };
  const challenge = challenges[problem.code];
  if (challenge) response.set('WWW-Authenticate', challenge);
  response.status(status).set('Cache-Control', 'no-store').type('application/problem+json');
  response.send(JSON.stringify(body));
};

/** The end of /api: nothing answers there unless a route was mounted for it. */
export const nothingHere: RequestHandler = (_request, _response, next) => next(notFound());
