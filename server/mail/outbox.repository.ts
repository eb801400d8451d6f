import type { DataSource, EntityManager } from 'typeorm';
import { OutboxMessageEntity, type OutboxMessage } from '../database/entities/outbox-message.ts';

export const addMessages = async (manager: EntityManager, messages: OutboxMessage[]): Promise<void> => {
  if (messages.length > 0) await manager.getRepository(OutboxMessageEntity).insert(messages);
};

/** A team's messages, newest first. */
export const listMessages = (dataSource: DataSource, teamId: string): Promise<OutboxMessage[]> =>
  dataSource
    .getRepository(OutboxMessageEntity)
    .find({ where: { teamId }, order: { sentAt: 'DESC', id: 'ASC' }, take: 200 });

export const findMessage = (dataSource: DataSource, teamId: string, id: string) =>
  dataSource.getRepository(OutboxMessageEntity).findOneBy({ teamId, id });
