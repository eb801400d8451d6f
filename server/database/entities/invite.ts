import { EntitySchema } from 'typeorm';
import type { Role } from '#contract/people.ts';
import { PersonEntity } from './person.ts';
import { TeamEntity } from './team.ts';

/** An invite that waits for an answer; it is deleted once it is used, withdrawn or replaced. */
export interface Invite {
  id: string;
  teamId: string;
  email: string;
  role: Role;
  /** SHA-256 of the token in the link */
  tokenHash: string;
  sentAt: string;
  expiresAt: string;
  invitedById: string | null;
}

export const InviteEntity = new EntitySchema<Invite>({
  name: 'Invite',
  tableName: 'invite',
  columns: {
    id: { type: 'text', primary: true },
    teamId: { type: 'text' },
    email: { type: 'text' },
    role: { type: 'text' },
    tokenHash: { type: 'text' },
    sentAt: { type: 'text' },
    expiresAt: { type: 'text' },
    invitedById: { type: 'text', nullable: true },
  },
  uniques: [
    { name: 'invite_token', columns: ['tokenHash'] },
    { name: 'invite_address', columns: ['teamId', 'email'] },
  ],
  foreignKeys: [
    {
      name: 'invite_team',
      target: TeamEntity,
      columnNames: ['teamId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
    {
      name: 'invite_inviter',
      target: PersonEntity,
      columnNames: ['invitedById'],
      referencedColumnNames: ['id'],
      onDelete: 'SET NULL',
    },
  ],
});
