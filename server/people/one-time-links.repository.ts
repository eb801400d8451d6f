import type { EntityManager } from 'typeorm';
import { OneTimeLinkEntity, type OneTimeLink } from '../database/entities/one-time-link.ts';
import { hashToken, makeToken } from './tokens.ts';

type Kind = OneTimeLink['kind'];

/** Makes a link for a person (or, for set-up, for nobody yet). Links of that kind that they had before stop working. */
export async function makeLink(
  manager: EntityManager,
  kind: Kind,
  personId: string | null,
  expiresAt: Date,
): Promise<string> {
  await dropLinks(manager, kind, personId);
  const { token, tokenHash } = makeToken();
  const row = { tokenHash, kind, personId, expiresAt: expiresAt.toISOString() };
  await manager.getRepository(OneTimeLinkEntity).insert(row);
  return token;
}

/** The link of a token, while it works. */
export async function findLink(
  manager: EntityManager,
  kind: Kind,
  token: string,
  now: Date,
): Promise<OneTimeLink | undefined> {
  const link = await manager
    .getRepository(OneTimeLinkEntity)
    .findOneBy({ tokenHash: hashToken(token), kind });
  return link && Date.parse(link.expiresAt) > now.getTime() ? link : undefined;
}

/** Ends a person's links of a kind; for set-up, every set-up link. */
export const dropLinks = (manager: EntityManager, kind: Kind, personId: string | null) =>
  manager.getRepository(OneTimeLinkEntity).delete(personId === null ? { kind } : { kind, personId });
