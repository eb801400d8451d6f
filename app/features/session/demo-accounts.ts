import { queryOptions } from '@tanstack/react-query';
import { listDemoAccounts } from '#contract/people.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

export const demoAccountsQuery = queryOptions({
  queryKey: ['demo-accounts'],
  queryFn: async ({ signal }) => (await callEndpoint(listDemoAccounts, { signal })).accounts,
  staleTime: Infinity,
});
