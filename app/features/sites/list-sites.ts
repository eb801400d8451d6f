import { queryOptions } from '@tanstack/react-query';
import { listSites } from '#contract/sites.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

export const sitesQuery = (teamId: string) =>
  queryOptions({
    queryKey: ['team', teamId, 'sites'],
    queryFn: async ({ signal }) => (await callEndpoint(listSites, { params: { teamId }, signal })).sites,
  });
