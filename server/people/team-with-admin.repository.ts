import type { EntityManager } from 'typeorm';
import { addMember, addPerson, addTeam, type NewPerson } from './people.repository.ts';

/** Makes a team and a person who is its admin; returns the person's id. */
export async function addTeamWithAdmin(
  manager: EntityManager,
  teamName: string,
  admin: NewPerson,
  now: Date,
): Promise<string> {
  const team = await addTeam(manager, teamName, now);
  const person = await addPerson(manager, admin, now);
  await addMember(manager, team.id, person.id, 'admin', now);
  return person.id;
}
