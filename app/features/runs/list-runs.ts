import { queryOptions } from '@tanstack/react-query';
import { listRuns } from '#contract/runs.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

/** One page of a site's runs, newest first. */
export const runsQuery = (siteId: string, page: { offset?: number; limit?: number } = {}) =>
  queryOptions({
    queryKey: ['site', siteId, 'runs', page],
    queryFn: ({ signal }) => callEndpoint(listRuns, { params: { siteId }, query: page, signal }),
  });
