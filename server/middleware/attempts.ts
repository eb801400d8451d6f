import type { Request, RequestHandler } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import type { Config } from '../config.ts';
import { ProblemError } from './problem-error.ts';

/** `refused` counts attempts that fail; `all` is for what never fails, such as asking for an e-mail. */
export type CountedAttempts = 'refused' | 'all';

export interface AttemptLimits {
  /** by address alone, before anything is read */
  byAddress: RequestHandler;
  /** by address and account (or link), once the body is read */
  byAccount: RequestHandler;
}

const addressOf = (request: Request) => ipKeyGenerator(request.ip ?? '');

/** The account or the link that an attempt is made on. */
function accountOf(request: Request): string {
  const { email } = (request.body ?? {}) as { email?: unknown };
  const account = typeof email === 'string' ? email : (request.params.token ?? request.session.personId);
  return typeof account === 'string' ? account.trim().toLowerCase() : '';
}

/**
 * Limits on guessing at one route. By account they are keyed by address too, so that nobody can lock somebody else out
 * of an account.
 */
export function createAttemptLimits({ attempts }: Config, counted: CountedAttempts): AttemptLimits {
  const limiter = (
    limit: number,
    keyGenerator: (request: Request) => string,
    skipSuccessfulRequests: boolean,
  ) =>
    rateLimit({
      windowMs: attempts.windowMs,
      limit,
      keyGenerator,
      skipSuccessfulRequests,
      standardHeaders: 'draft-8',
      legacyHeaders: false,
      validate: { xForwardedForHeader: false },
      handler: (_request, _response, next) =>
        next(
          new ProblemError(
            'too-many-requests',
            `Too many attempts. Wait ${Math.ceil(attempts.windowMs / 60_000)} minutes and try again.`,
          ),
        ),
    });
  return {
    byAddress: limiter(attempts.perAddress, addressOf, false),
    byAccount: limiter(
      attempts.perAccount,
      (request) => `${addressOf(request)} ${accountOf(request)}`,
      counted === 'refused',
    ),
  };
}
