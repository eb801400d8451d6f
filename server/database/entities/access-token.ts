import { EntitySchema } from 'typeorm';
import type { TokenScope } from '#contract/access-tokens.ts';
import { PersonEntity } from './person.ts';
import { TeamEntity } from './team.ts';

/** A person's key for scripts. It is kept as a hash alone. */
export interface StoredToken {
  /** shown to its owner, opens nothing */
  id: string;
  /** SHA-256 of the token */
  tokenHash: string;
  /** the token's first characters */
  start: string;
  personId: string;
  name: string;
  scope: TokenScope;
  /** null: every team of the person */
  teamId: string | null;
  createdAt: string;
  expiresAt: string;
  lastUsedAt: string | null;
  revokedAt: string | null;
}

export const AccessTokenEntity = new EntitySchema<StoredToken>({
  name: 'AccessToken',
  tableName: 'access_token',
  columns: {
    id: { type: 'text', primary: true },
    tokenHash: { type: 'text' },
    start: { type: 'text' },
    personId: { type: 'text' },
    name: { type: 'text' },
    scope: { type: 'text' },
    teamId: { type: 'text', nullable: true },
    createdAt: { type: 'text' },
    expiresAt: { type: 'text' },
    lastUsedAt: { type: 'text', nullable: true },
    revokedAt: { type: 'text', nullable: true },
  },
  uniques: [{ name: 'access_token_hash', columns: ['tokenHash'] }],
  foreignKeys: [
    {
      name: 'access_token_person',
      target: PersonEntity,
      columnNames: ['personId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
    {
      name: 'access_token_team',
      target: TeamEntity,
      columnNames: ['teamId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
  indices: [{ name: 'access_token_by_person', columns: ['personId'] }],
});
