import { randomUUID } from 'node:crypto';
import { In, Not, type EntityManager } from 'typeorm';
import type { Role } from '#contract/people.ts';
import { MembershipEntity } from '../database/entities/membership.ts';
import { PersonEntity, type Person } from '../database/entities/person.ts';
import { SessionEntity } from '../database/entities/session.ts';
import { TeamEntity, type Team } from '../database/entities/team.ts';

export interface NewPerson {
  email: string;
  name: string;
  passwordHash: string;
}

/** @param email in lower case */
export async function findPersonByEmail(manager: EntityManager, email: string): Promise<Person | undefined> {
  return (await manager.getRepository(PersonEntity).findOneBy({ email })) ?? undefined;
}

export async function addPerson(manager: EntityManager, person: NewPerson, now: Date): Promise<Person> {
  const row = { id: randomUUID(), createdAt: now.toISOString(), ...person };
  await manager.getRepository(PersonEntity).insert(row);
  return row;
}

export async function addTeam(manager: EntityManager, name: string, now: Date): Promise<Team> {
  const row = { id: randomUUID(), name, createdAt: now.toISOString() };
  await manager.getRepository(TeamEntity).insert(row);
  return row;
}

export async function addMember(
  manager: EntityManager,
  teamId: string,
  personId: string,
  role: Role,
  now: Date,
): Promise<void> {
  const row = { teamId, personId, role, joinedAt: now.toISOString() };
  await manager.getRepository(MembershipEntity).insert(row);
}

export const setPasswordHash = (manager: EntityManager, personId: string, passwordHash: string) =>
  manager.getRepository(PersonEntity).update({ id: personId }, { passwordHash });

/** Ends a person's sessions, all of them or all but one (by its shown id). */
export const endSessionsOf = (manager: EntityManager, personId: string, except?: string) =>
  manager.getRepository(SessionEntity).delete({ personId, ...(except ? { id: Not(except) } : {}) });

/** People other than those with the addresses given. */
export const countPeople = (manager: EntityManager, besides: readonly string[] = []): Promise<number> =>
  manager.getRepository(PersonEntity).countBy({ email: Not(In([...besides])) });

export const teamIdsOf = async (manager: EntityManager, personId: string): Promise<string[]> =>
  (await manager.getRepository(MembershipEntity).findBy({ personId })).map((row) => row.teamId);
