import { createHash, randomBytes } from 'node:crypto';

/** What is stored of a one-time link: enough to know the token again, not enough to make it. */
export const hashToken = (token: string): string => createHash('sha256').update(token).digest('hex');

/** A new token of 256 random bits for a one-time link, in characters that are safe in an address. */
export function makeToken(): { token: string; tokenHash: string } {
  const token = randomBytes(32).toString('base64url');
  return { token, tokenHash: hashToken(token) };
}
