import { queryOptions } from '@tanstack/react-query';
import { downloadOutboxMessage, getOutboxMessage, listOutbox } from '#contract/people.ts';
import { callEndpoint, endpointUrl } from '#app/lib/api-client.ts';

export const outboxQuery = (teamId: string) =>
  queryOptions({
    queryKey: ['team', teamId, 'outbox'],
    queryFn: ({ signal }) => callEndpoint(listOutbox, { params: { teamId }, signal }),
  });

export const outboxMessageQuery = (teamId: string, messageId: string) =>
  queryOptions({
    queryKey: ['team', teamId, 'outbox', messageId],
    queryFn: ({ signal }) => callEndpoint(getOutboxMessage, { params: { teamId, messageId }, signal }),
  });

/** Where the browser downloads a message as an .eml file. */
export const messageFileUrl = (teamId: string, messageId: string): string =>
  endpointUrl(downloadOutboxMessage, { params: { teamId, messageId } });
