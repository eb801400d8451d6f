import { EntitySchema } from 'typeorm';
import { TeamEntity } from './team.ts';

/** An e-mail as a team's admin may read it: links that open somebody's account are masked in `text`. */
export interface OutboxMessage {
  id: string;
  teamId: string;
  recipient: string;
  subject: string;
  text: string;
  sentAt: string;
  status: 'outbox' | 'sent' | 'failed';
  error: string | null;
}

export const OutboxMessageEntity = new EntitySchema<OutboxMessage>({
  name: 'OutboxMessage',
  tableName: 'outbox_message',
  columns: {
    id: { type: 'text', primary: true },
    teamId: { type: 'text' },
    recipient: { type: 'text' },
    subject: { type: 'text' },
    text: { type: 'text' },
    sentAt: { type: 'text' },
    status: { type: 'text' },
    error: { type: 'text', nullable: true },
  },
  foreignKeys: [
    {
      name: 'outbox_message_team',
      target: TeamEntity,
      columnNames: ['teamId'],
      referencedColumnNames: ['id'],
      onDelete: 'CASCADE',
    },
  ],
  indices: [{ name: 'outbox_message_by_team', columns: ['teamId', 'sentAt'] }],
});
