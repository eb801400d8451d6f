import { In, type DataSource } from 'typeorm';
import type { Session } from '#contract/people.ts';
import { MembershipEntity } from '../database/entities/membership.ts';
import { PersonEntity } from '../database/entities/person.ts';
import { TeamEntity } from '../database/entities/team.ts';
import type { Config } from '../config.ts';
import { demoAccounts, type DemoAccount } from '../demo/demo-accounts.ts';

/** The demo's accounts that can sign in now: none when the demo is off or was never loaded. */
export async function openDemoAccounts(
  dataSource: DataSource,
  demo: Config['demo'],
): Promise<readonly DemoAccount[]> {
  if (demo === 'off') return [];
  const emails = demoAccounts.map((account) => account.email);
  const people = await dataSource.getRepository(PersonEntity).findBy({ email: In(emails) });
  return demoAccounts.filter((account) => people.some((person) => person.email === account.email));
}

/** What the client knows of who is signed in; teams by name. */
export async function viewSession(
  { dataSource, config }: { dataSource: DataSource; config: Config },
  personId: string | undefined,
): Promise<Session> {
  const demo = (await openDemoAccounts(dataSource, config.demo)).length > 0;
  const person = personId
    ? await dataSource.getRepository(PersonEntity).findOneBy({ id: personId })
    : undefined;
  if (!person) return { person: null, memberships: [], demo };
  const rows = await dataSource.getRepository(MembershipEntity).findBy({ personId: person.id });
  const teams = await dataSource.getRepository(TeamEntity).findBy({ id: In(rows.map((row) => row.teamId)) });
  const memberships = teams
    .map((team) => ({
      teamId: team.id,
      teamName: team.name,
      role: rows.find((row) => row.teamId === team.id)!.role,
    }))
    .sort((a, b) => a.teamName.localeCompare(b.teamName, 'en') || a.teamId.localeCompare(b.teamId));
  return { person: { id: person.id, name: person.name, email: person.email }, memberships, demo };
}
