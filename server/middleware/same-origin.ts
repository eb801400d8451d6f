import type { RequestHandler } from 'express';
import { bearerOf } from './access-token.ts';
import { ProblemError } from './problem-error.ts';

const safe = new Set(['GET', 'HEAD', 'OPTIONS']);

/**
 * Refuses a change that another site's page asks for with the visitor's cookie. Browsers say where a request comes from:
 * by `Sec-Fetch-Site` over https and on localhost, by `Origin` everywhere. A request with neither is no browser's, so it
 * carries nobody's cookie but its own. A request with an access token is judged by that token alone, never by a cookie.
 * @param publicUrl the address that people use; a proxy may hide it from `Host`
 */
export function sameOrigin(publicUrl: string): RequestHandler {
  const publicOrigin = new URL(publicUrl).origin;
  return (request, _response, next) => {
    if (safe.has(request.method) || bearerOf(request) !== undefined) return next();
    const site = request.get('sec-fetch-site');
    const origin = request.get('origin');
    const own = origin === publicOrigin || origin === `${request.protocol}://${request.host}`;
    const allowed = site === undefined ? origin === undefined || own : site === 'same-origin';
    if (allowed) return next();
    next(
      new ProblemError(
        'forbidden',
        `This change was asked for by another site (${origin ?? 'unknown'}). Open Foothold at ${publicOrigin} and do it there.`,
      ),
    );
  };
}
