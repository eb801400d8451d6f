import type { DataSource } from 'typeorm';
import type { Role } from '#contract/people.ts';
import { MembershipEntity } from '../database/entities/membership.ts';
import { PersonEntity } from '../database/entities/person.ts';
import type { SignedIn } from './route.ts';

/** The person of a session; undefined when the account is gone. */
export async function findSignedIn(dataSource: DataSource, personId: string): Promise<SignedIn | undefined> {
  const person = await dataSource.getRepository(PersonEntity).findOneBy({ id: personId });
  return person ? { id: person.id, name: person.name, email: person.email } : undefined;
}

/** A person's role in a team at this moment; undefined for whoever is no member. */
export async function findRole(
  dataSource: DataSource,
  teamId: string,
  personId: string,
): Promise<Role | undefined> {
  const membership = await dataSource.getRepository(MembershipEntity).findOneBy({ teamId, personId });
  return membership?.role;
}
