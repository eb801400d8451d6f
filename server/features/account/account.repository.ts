import { MoreThan, type DataSource, type EntityManager } from 'typeorm';
import { PersonEntity } from '#server/database/entities/person.ts';
import { SessionEntity, type StoredSession } from '#server/database/entities/session.ts';

/** A person's sessions that are still open, the last used first. */
export const listOpenSessions = (
  dataSource: DataSource,
  personId: string,
  now: Date,
): Promise<StoredSession[]> =>
  dataSource.getRepository(SessionEntity).find({
    where: { personId, expiresAt: MoreThan(now.toISOString()) },
    order: { seenAt: 'DESC', startedAt: 'DESC' },
  });

/** Ends one session by its shown id; false when the person has no such session. */
export const endOneSession = async (manager: EntityManager, personId: string, id: string): Promise<boolean> =>
  (await manager.getRepository(SessionEntity).delete({ id, personId })).affected === 1;

export const renamePerson = (manager: EntityManager, id: string, name: string) =>
  manager.getRepository(PersonEntity).update({ id }, { name });

export const passwordHashOf = async (dataSource: DataSource, id: string): Promise<string> =>
  (await dataSource.getRepository(PersonEntity).findOneByOrFail({ id })).passwordHash;
