import { In, MoreThan, type EntityManager } from 'typeorm';
import type { Member, Role } from '#contract/people.ts';
import { MembershipEntity } from '#server/database/entities/membership.ts';
import { PersonEntity } from '#server/database/entities/person.ts';
import { SessionEntity } from '#server/database/entities/session.ts';

/** The members of a team by name, with the number of their open sessions. */
export async function listMembersOf(manager: EntityManager, teamId: string, now: Date): Promise<Member[]> {
  const rows = await manager.getRepository(MembershipEntity).findBy({ teamId });
  const ids = In(rows.map((row) => row.personId));
  const people = await manager.getRepository(PersonEntity).findBy({ id: ids });
  const sessions = await manager
    .getRepository(SessionEntity)
    .findBy({ personId: ids, expiresAt: MoreThan(now.toISOString()) });
  const members = rows.map(({ personId, role, joinedAt }) => {
    const { name, email } = people.find((person) => person.id === personId)!;
    const openSessions = sessions.filter((session) => session.personId === personId).length;
    return { personId, name, email, role, joinedAt, openSessions };
  });
  return members.sort((a, b) => a.name.localeCompare(b.name, 'en') || a.email.localeCompare(b.email));
}

export const findMembership = (manager: EntityManager, teamId: string, personId: string) =>
  manager.getRepository(MembershipEntity).findOneBy({ teamId, personId });

export const countAdmins = (manager: EntityManager, teamId: string): Promise<number> =>
  manager.getRepository(MembershipEntity).countBy({ teamId, role: 'admin' });

export const setRole = (manager: EntityManager, teamId: string, personId: string, role: Role) =>
  manager.getRepository(MembershipEntity).update({ teamId, personId }, { role });

export const dropMembership = (manager: EntityManager, teamId: string, personId: string) =>
  manager.getRepository(MembershipEntity).delete({ teamId, personId });
