import { EntitySchema } from 'typeorm';
import { PersonEntity } from './person.ts';

/** One sign-in on one device. The cookie's value is kept as a hash alone. */
export interface StoredSession {
  /** shown to its owner, opens nothing */
  id: string;
  /** SHA-256 of the session id in the cookie */
  tokenHash: string;
  personId: string;
  /** browser and system in words */
  device: string;
  startedAt: string;
  seenAt: string;
  expiresAt: string;
}

export const SessionEntity = new EntitySchema<StoredSession>({
  name: 'Session',
  tableName: 'session',
  columns: {
    id: { type: 'text', primary: true },
    tokenHash: { type: 'text' },
    personId: { type: 'text' },
    device: { type: 'text' },
    startedAt: { type: 'text' },
    seenAt: { type: 'text' },
    expiresAt: { type: 'text' },
  },
  uniques: [{ name: 'session_token', columns: ['tokenHash'] }],
  foreignKeys: [
    {
      name: 'session_person',
      target: PersonEntity,
      columnNames: ['personId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
  indices: [{ name: 'session_by_person', columns: ['personId'] }],
});
