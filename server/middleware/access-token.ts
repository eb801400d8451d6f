import type { Request, Response } from 'express';
import type { TokenScope } from '#contract/access-tokens.ts';
import type { StoredToken } from '../database/entities/access-token.ts';
import { findAccessToken, markTokenUsed } from '../people/access-tokens.repository.ts';
import { mayEnter } from '../people/may-enter.ts';
import type { Services } from '../services.ts';
import { findSignedIn } from './access.repository.ts';
import { createTokenAttempts } from './attempts.ts';
import { ProblemError } from './problem-error.ts';
import type { SignedIn } from './route.ts';

/** `lastUsedAt` moves at most this often, so that reading does not mean writing. */
const touchEveryMs = 60_000;

/** What an access token allows at most; the person's role may allow less. */
export interface TokenLimits {
  scope: TokenScope;
  /** null: every team of the person */
  teamId: string | null;
}

/** Whoever asks by an access token. */
export interface TokenCaller {
  person: SignedIn;
  token: TokenLimits;
}

/**
 * The token of a request's `Authorization: Bearer`, good or bad; undefined without one. Where there is one, the session
 * cookie is not looked at. Other schemes are not ours: a proxy in front may ask for a password of its own.
 */
export function bearerOf(request: Request): string | undefined {
  const [scheme, ...rest] = (request.get('authorization') ?? '').trim().split(/\s+/);
  return scheme.toLowerCase() === 'bearer' ? rest.join(' ') : undefined;
}

const refuse = (detail: string) => new ProblemError('token-refused', detail);

/** @throws ProblemError `token-refused` that says to whoever holds the token why it does not work */
function checkWorks(row: StoredToken | null, now: Date): asserts row is StoredToken {
  if (!row)
    throw refuse(
      'This access token is not known here. Expected one that starts with fh_, whole, as the account page showed it.',
    );
  if (row.revokedAt)
    throw refuse(`This access token was revoked on ${row.revokedAt}. Make a new one on the account page.`);
  if (Date.parse(row.expiresAt) <= now.getTime())
    throw refuse(`This access token ran out on ${row.expiresAt}. Make a new one on the account page.`);
}

/**
 * Makes what turns a token into its person. Tokens that are refused are counted by address, over all routes together.
 * @throws ProblemError `token-refused`; `too-many-requests` after too many of those
 */
export function tokenReader(services: Services) {
  const { dataSource, write, clock, config } = services;
  const attempts = createTokenAttempts(config);

  async function read(token: string): Promise<TokenCaller> {
    const now = clock();
    const row = await findAccessToken(dataSource.manager, token);
    checkWorks(row, now);
    const person = await findSignedIn(dataSource, row.personId);
    if (!person || !mayEnter(person.email, config))
      throw refuse('The account of this access token is closed.');
    if (!row.lastUsedAt || now.getTime() - Date.parse(row.lastUsedAt) >= touchEveryMs)
      await write((manager) => markTokenUsed(manager, row.id, now));
    return { person, token: { scope: row.scope, teamId: row.teamId } };
  }

  return async (token: string, request: Request, response: Response): Promise<TokenCaller> => {
    await attempts.refuseTooMany(request);
    try {
      return await read(token);
    } catch (error) {
      if (error instanceof ProblemError) await attempts.count(request, response);
      throw error;
    }
  };
}
export type TokenReader = ReturnType<typeof tokenReader>;
