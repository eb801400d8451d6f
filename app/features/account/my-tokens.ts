import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { listMyTokens, makeMyToken, revokeMyToken } from '#contract/access-tokens.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

export const myTokensQuery = queryOptions({
  queryKey: ['my-tokens'],
  queryFn: async ({ signal }) => (await callEndpoint(listMyTokens, { signal })).tokens,
});

const askAgain = (queryClient: QueryClient) =>
  queryClient.invalidateQueries({ queryKey: myTokensQuery.queryKey });

/** Its answer is not kept (`gcTime`): it holds the token itself. */
export const makeTokenMutation = (queryClient: QueryClient) =>
  mutationOptions({
    mutationFn: (body: z.output<typeof makeMyToken.body>) => callEndpoint(makeMyToken, { body }),
    onSuccess: () => askAgain(queryClient),
    gcTime: 0,
  });

export const revokeTokenMutation = (queryClient: QueryClient) =>
  mutationOptions({
    mutationFn: (tokenId: string) => callEndpoint(revokeMyToken, { params: { tokenId } }),
    onSettled: () => askAgain(queryClient),
  });
