import { addAccessToken, revokeTokensOf, type NewToken } from '#server/people/access-tokens.repository.ts';
import type { TestServer } from './test-server.ts';

/** Callers that come with an access token of an admin, but for the trainer's. */
export const tokenCallers = [
  'read token',
  'write token',
  'trainer’s token',
  'expired token',
  'revoked token',
  'other team’s token',
  'unknown token',
] as const;
export type TokenCaller = (typeof tokenCallers)[number];

/** An access token for a person, for a day unless said. */
export async function makeToken(
  { services: { write, clock } }: TestServer,
  personId: string,
  changes: Partial<NewToken> = {},
): Promise<{ token: string; id: string }> {
  const expiresAt = new Date(clock().getTime() + 86_400_000).toISOString();
  const wanted: NewToken = { name: 'A script', scope: 'write', teamId: null, expiresAt, ...changes };
  const { token, row } = await write((manager) => addAccessToken(manager, personId, wanted, clock()));
  return { token, id: row.id };
}

/** The tokens of all callers, by caller. */
export async function makeCallerTokens(
  server: TestServer,
  people: { admin: { id: string }; trainer: { id: string } },
  otherTeamId: string,
): Promise<Record<TokenCaller, string>> {
  const { write, clock } = server.services;
  const admin = people.admin.id;
  const revoked = await makeToken(server, admin);
  await write((manager) => revokeTokensOf(manager, admin, clock(), revoked.id));
  const make = async (personId: string, changes: Partial<NewToken>) =>
    (await makeToken(server, personId, changes)).token;
  return {
    'read token': await make(admin, { scope: 'read' }),
    'write token': await make(admin, { scope: 'write' }),
    'trainer’s token': await make(people.trainer.id, { scope: 'write' }),
    'expired token': await make(admin, { expiresAt: new Date(clock().getTime() - 1000).toISOString() }),
    'revoked token': revoked.token,
    'other team’s token': await make(admin, { teamId: otherTeamId }),
    'unknown token': `fh_${'x'.repeat(43)}`,
  };
}
