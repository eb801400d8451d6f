import type { AccessToken, TokenScope } from '#contract/access-tokens.ts';
import { formatDate } from '#app/lib/formats.ts';

export const scopeWords: Record<TokenScope, string> = { read: 'read', write: 'read and write' };

/** `may read, in all my teams`. */
export const tokenMay = ({ scope, team }: Pick<AccessToken, 'scope' | 'team'>): string =>
  `may ${scopeWords[scope]}, in ${team ? team.teamName : 'all my teams'}`;

export const hasEnded = ({ expiresAt, revokedAt }: AccessToken, now: Date): boolean =>
  revokedAt !== null || Date.parse(expiresAt) <= now.getTime();

/** `ends 1 Mar 2027`, or how it ended. */
export function tokenEndWords(token: AccessToken, now: Date): string {
  if (token.revokedAt) return `revoked ${formatDate(token.revokedAt)}`;
  return `${hasEnded(token, now) ? 'ran out' : 'ends'} ${formatDate(token.expiresAt)}`;
}
