import { z } from 'zod';
import { endpoint, id, instant, text } from './endpoint.ts';

/** What an access token may do: `read` nothing but GET and HEAD, `write` whatever its person's role allows. */
export const tokenScopes = ['read', 'write'] as const;
export const tokenScopeSchema = z.enum(tokenScopes);
export type TokenScope = z.infer<typeof tokenScopeSchema>;

/** The longest that an access token may work, days. */
export const longestTokenDays = 366;
/** Most tokens of one person that work at a time. */
export const mostTokens = 50;

export const accessTokenSchema = z.object({
  id,
  name: z.string(),
  /** its first characters, to tell it from others; they open nothing */
  start: z.string(),
  scope: tokenScopeSchema,
  /** the one team that it reaches; null: every team of its person */
  team: z.object({ teamId: id, teamName: z.string() }).nullable(),
  createdAt: instant,
  expiresAt: instant,
  /** to the minute; null: never yet */
  lastUsedAt: instant.nullable(),
  revokedAt: instant.nullable(),
});
export type AccessToken = z.infer<typeof accessTokenSchema>;

/** Those that have ended are listed for another 30 days. */
export const listMyTokens = endpoint({
  method: 'GET',
  path: '/api/account/tokens',
  summary: 'My access tokens, newest first, with when each was last used',
  reply: z.object({ tokens: z.array(accessTokenSchema) }),
});
export const makeMyToken = endpoint({
  method: 'POST',
  path: '/api/account/tokens',
  summary: 'Make an access token for scripts; the reply alone holds the token itself',
  body: z.strictObject({
    name: text(100),
    scope: tokenScopeSchema,
    /** null: every team that I am in, now or later */
    teamId: id.nullable(),
    expiresAt: instant,
  }),
  reply: z.object({
    /** shown this once: the server keeps a hash of it */
    token: z.string(),
    made: accessTokenSchema,
  }),
});
export const revokeMyToken = endpoint({
  method: 'DELETE',
  path: '/api/account/tokens/:tokenId',
  summary: 'Revoke one of my access tokens; it stops working at once',
  params: z.object({ tokenId: id }),
});
