import { randomUUID } from 'node:crypto';
import { In, IsNull, LessThan, MoreThan, type EntityManager } from 'typeorm';
import type { AccessToken, TokenScope } from '#contract/access-tokens.ts';
import { AccessTokenEntity, type StoredToken } from '../database/entities/access-token.ts';
import { TeamEntity } from '../database/entities/team.ts';
import { hashToken, makeToken } from './tokens.ts';

/** Every access token starts with it, so that one that leaked into a file can be searched for. */
const mark = 'fh_';
/** Characters that lists show: the mark and 30 of the 256 random bits. */
const shownCharacters = mark.length + 5;
const keptAfterEndMs = 30 * 86_400_000;

export interface NewToken {
  name: string;
  scope: TokenScope;
  teamId: string | null;
  expiresAt: string;
}

/** Makes a token of 256 random bits. What is returned beside the row is the only copy of it. */
export async function addAccessToken(
  manager: EntityManager,
  personId: string,
  { name, scope, teamId, expiresAt }: NewToken,
  now: Date,
): Promise<{ token: string; row: StoredToken }> {
  const token = `${mark}${makeToken().token}`;
  const row: StoredToken = {
    id: randomUUID(),
    tokenHash: hashToken(token),
    start: token.slice(0, shownCharacters),
    personId,
    name,
    scope,
    teamId,
    createdAt: now.toISOString(),
    expiresAt: new Date(expiresAt).toISOString(),
    lastUsedAt: null,
    revokedAt: null,
  };
  await manager.getRepository(AccessTokenEntity).insert(row);
  return { token, row };
}

/** The row of a token, whether or not it still works. */
export const findAccessToken = (manager: EntityManager, token: string): Promise<StoredToken | null> =>
  manager.getRepository(AccessTokenEntity).findOneBy({ tokenHash: hashToken(token) });

export const countWorkingTokens = (manager: EntityManager, personId: string, now: Date): Promise<number> =>
  manager
    .getRepository(AccessTokenEntity)
    .countBy({ personId, revokedAt: IsNull(), expiresAt: MoreThan(now.toISOString()) });

export const markTokenUsed = (manager: EntityManager, id: string, now: Date) =>
  manager.getRepository(AccessTokenEntity).update({ id }, { lastUsedAt: now.toISOString() });

/** Revokes a person's tokens that still stand: all, or the one with that id. Returns how many. */
export async function revokeTokensOf(
  manager: EntityManager,
  personId: string,
  now: Date,
  id?: string,
): Promise<number> {
  const { affected } = await manager
    .getRepository(AccessTokenEntity)
    .update({ personId, revokedAt: IsNull(), ...(id && { id }) }, { revokedAt: now.toISOString() });
  return affected ?? 0;
}

/** Forgets tokens that ended so long ago that nobody asks any more why a script stopped. */
export async function forgetEndedTokens(manager: EntityManager, now: Date): Promise<void> {
  const before = LessThan(new Date(now.getTime() - keptAfterEndMs).toISOString());
  await manager.getRepository(AccessTokenEntity).delete({ expiresAt: before });
  await manager.getRepository(AccessTokenEntity).delete({ revokedAt: before });
}

/** A person's tokens as their owner sees them, newest first. */
export async function listAccessTokens(manager: EntityManager, personId: string): Promise<AccessToken[]> {
  const rows = await manager
    .getRepository(AccessTokenEntity)
    .find({ where: { personId }, order: { createdAt: 'DESC' } });
  return viewTokens(manager, rows);
}

/** Rows without what only the server needs, and with the names of their teams. */
export async function viewTokens(
  manager: EntityManager,
  rows: readonly StoredToken[],
): Promise<AccessToken[]> {
  const ids = rows.flatMap(({ teamId }) => teamId ?? []);
  const teams = await manager.getRepository(TeamEntity).findBy({ id: In(ids) });
  const names = new Map(teams.map((team) => [team.id, team.name]));
  return rows.map(
    ({ id, name, start, scope, teamId, createdAt, expiresAt, lastUsedAt, revokedAt }): AccessToken => ({
      id,
      name,
      start,
      scope,
      team: teamId === null ? null : { teamId, teamName: names.get(teamId) ?? '' },
      createdAt,
      expiresAt,
      lastUsedAt,
      revokedAt,
    }),
  );
}
