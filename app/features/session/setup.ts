import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { completeSetup, getSetup } from '#contract/people.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { enterSession } from './session.ts';

export const setupQuery = (token: string) =>
  queryOptions({
    queryKey: ['setup', token],
    queryFn: ({ signal }) => callEndpoint(getSetup, { params: { token }, signal }),
  });

export const setupMutation = (queryClient: QueryClient, token: string) =>
  mutationOptions({
    mutationFn: (body: z.output<typeof completeSetup.body>) =>
      callEndpoint(completeSetup, { params: { token }, body }),
    onSuccess: (session) => enterSession(queryClient, session),
  });
