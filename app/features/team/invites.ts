import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { listInvites, sendInvite, withdrawInvite } from '#contract/people.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

export const invitesQuery = (teamId: string) =>
  queryOptions({
    queryKey: ['team', teamId, 'invites'],
    queryFn: async ({ signal }) => (await callEndpoint(listInvites, { params: { teamId }, signal })).invites,
  });

/** An invite is also a message, so the outbox is asked for again with the list (all under the team's key). */
const refresh = (queryClient: QueryClient, teamId: string) => () =>
  queryClient.invalidateQueries({ queryKey: ['team', teamId] });

export const sendInviteMutation = (queryClient: QueryClient, teamId: string) =>
  mutationOptions({
    mutationFn: (body: z.output<typeof sendInvite.body>) =>
      callEndpoint(sendInvite, { params: { teamId }, body }),
    onSuccess: refresh(queryClient, teamId),
  });

export const withdrawInviteMutation = (queryClient: QueryClient, teamId: string) =>
  mutationOptions({
    mutationFn: (inviteId: string) => callEndpoint(withdrawInvite, { params: { teamId, inviteId } }),
    onSettled: refresh(queryClient, teamId),
  });
