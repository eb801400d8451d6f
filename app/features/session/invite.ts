import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { acceptInvite, getInvite } from '#contract/people.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { enterSession } from './session.ts';

export const inviteQuery = (token: string) =>
  queryOptions({
    queryKey: ['invite', token],
    queryFn: ({ signal }) => callEndpoint(getInvite, { params: { token }, signal }),
  });

export const acceptInviteMutation = (queryClient: QueryClient, token: string) =>
  mutationOptions({
    mutationFn: (body: z.output<typeof acceptInvite.body>) =>
      callEndpoint(acceptInvite, { params: { token }, body }),
    onSuccess: (session) => enterSession(queryClient, session),
  });
