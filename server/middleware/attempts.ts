import type { Request, RequestHandler, Response } from 'express';
import { ipKeyGenerator, rateLimit } from 'express-rate-limit';
import type { Config } from '../config.ts';
import { ProblemError } from './problem-error.ts';
import { runMiddleware } from './run-middleware.ts';

/** `refused` counts attempts that fail; `all` is for what never fails, such as asking for an e-mail. */
export type CountedAttempts = 'refused' | 'all';

export interface AttemptLimits {
  /** by address alone, before anything is read */
  byAddress: RequestHandler;
  /** by address and account (or link), once the body is read */
  byAccount: RequestHandler;
}

const addressOf = (request: Request) => ipKeyGenerator(request.ip ?? '');

/** Refusals of access tokens, by address. */
export interface TokenAttempts {
  /** @throws ProblemError `too-many-requests` once an address had too many refused */
  refuseTooMany(request: Request): Promise<void>;
  /** Counts one that was refused. */
  count(request: Request, response: Response): Promise<void>;
}

const tooMany = ({ attempts }: Config) =>
  new ProblemError(
    'too-many-requests',
    `Too many attempts. Wait ${Math.ceil(attempts.windowMs / 60_000)} minutes and try again.`,
  );

/** Counts refused tokens alone: a script that asks a thousand times with a good one has tried nothing. */
export function createTokenAttempts(config: Config): TokenAttempts {
  const { windowMs, perAddress: limit } = config.attempts;
  const limiter = rateLimit({
    windowMs,
    limit,
    keyGenerator: addressOf,
    standardHeaders: 'draft-8',
    legacyHeaders: false,
    validate: { xForwardedForHeader: false },
    handler: (_request, _response, next) => next(tooMany(config)),
  });
  return {
    async refuseTooMany(request) {
      const known = await limiter.getKey(addressOf(request));
      if (known && known.totalHits >= limit) throw tooMany(config);
    },
    count: (request, response) => runMiddleware(limiter, request, response),
  };
}

/** A request with an access token has no session. */
const sessionOf = (request: Request) => request.session as Request['session'] | undefined;

/** The account or the link that an attempt is made on. */
function accountOf(request: Request): string {
  const { email } = (request.body ?? {}) as { email?: unknown };
  const account = typeof email === 'string' ? email : (request.params.token ?? sessionOf(request)?.personId);
  return typeof account === 'string' ? account.trim().toLowerCase() : '';
}

/**
 * Limits on guessing at one route. By account they are keyed by address too, so that nobody can lock somebody else out
 * of an account.
 */
export function createAttemptLimits(config: Config, counted: CountedAttempts): AttemptLimits {
  const { attempts } = config;
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
      handler: (_request, _response, next) => next(tooMany(config)),
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
