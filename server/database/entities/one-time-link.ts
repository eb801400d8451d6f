import { EntitySchema } from 'typeorm';
import { PersonEntity } from './person.ts';

/** A link that works once: it is deleted by its use. Set-up links belong to nobody yet. */
export interface OneTimeLink {
  /** SHA-256 of the token in the link */
  tokenHash: string;
  kind: 'setup' | 'password-reset';
  personId: string | null;
  expiresAt: string;
}

export const OneTimeLinkEntity = new EntitySchema<OneTimeLink>({
  name: 'OneTimeLink',
  tableName: 'one_time_link',
  columns: {
    tokenHash: { type: 'text', primary: true },
    kind: { type: 'text' },
    personId: { type: 'text', nullable: true },
    expiresAt: { type: 'text' },
  },
  foreignKeys: [
    {
      name: 'one_time_link_person',
      target: PersonEntity,
      columnNames: ['personId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
  indices: [{ name: 'one_time_link_by_person', columns: ['personId'] }],
});
