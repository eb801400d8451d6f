import { EntitySchema } from 'typeorm';
import type { Role } from '#contract/people.ts';
import { PersonEntity } from './person.ts';
import { TeamEntity } from './team.ts';

/** A person's one role in a team. */
export interface Membership {
  teamId: string;
  personId: string;
  role: Role;
  joinedAt: string;
}

export const MembershipEntity = new EntitySchema<Membership>({
  name: 'Membership',
  tableName: 'membership',
  columns: {
    teamId: { type: 'text', primary: true },
    personId: { type: 'text', primary: true },
    role: { type: 'text' },
    joinedAt: { type: 'text' },
  },
  foreignKeys: [
    {
      name: 'membership_team',
      target: TeamEntity,
      columnNames: ['teamId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
    {
      name: 'membership_person',
      target: PersonEntity,
      columnNames: ['personId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
  indices: [{ name: 'membership_by_person', columns: ['personId'] }],
});
