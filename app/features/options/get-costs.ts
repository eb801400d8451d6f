import { queryOptions } from '@tanstack/react-query';
import { getCosts } from '#contract/costs.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { siteKey } from '#app/lib/site-cache.ts';

/** What works cost on a site, and the budget. */
export const costsQuery = (siteId: string) =>
  queryOptions({
    queryKey: [...siteKey(siteId), 'costs'],
    queryFn: ({ signal }) => callEndpoint(getCosts, { params: { siteId }, signal }),
  });
