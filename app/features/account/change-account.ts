import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { changeMyName, changeMyPassword, createTeam } from '#contract/people.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { sessionKey } from '#app/lib/query-client.ts';
import { mySessionsQuery } from './my-sessions.ts';

export const changeNameMutation = (queryClient: QueryClient) =>
  mutationOptions({
    mutationFn: (body: z.output<typeof changeMyName.body>) => callEndpoint(changeMyName, { body }),
    onSuccess: (session) => queryClient.setQueryData(sessionKey, session),
  });

/** Ends my other sessions, so their list is asked for again. */
export const changePasswordMutation = (queryClient: QueryClient) =>
  mutationOptions({
    mutationFn: (body: z.output<typeof changeMyPassword.body>) => callEndpoint(changeMyPassword, { body }),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: mySessionsQuery.queryKey }),
  });

export const createTeamMutation = (queryClient: QueryClient) =>
  mutationOptions({
    mutationFn: (body: z.output<typeof createTeam.body>) => callEndpoint(createTeam, { body }),
    onSuccess: (session) => queryClient.setQueryData(sessionKey, session),
  });
