import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query';
import { endMySession, listMySessions } from '#contract/people.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

export const mySessionsQuery = queryOptions({
  queryKey: ['my-sessions'],
  queryFn: async ({ signal }) => (await callEndpoint(listMySessions, { signal })).sessions,
});

export const endMySessionMutation = (queryClient: QueryClient) =>
  mutationOptions({
    mutationFn: (sessionId: string) => callEndpoint(endMySession, { params: { sessionId } }),
    onSettled: () => queryClient.invalidateQueries({ queryKey: mySessionsQuery.queryKey }),
  });
