import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query';
import { getCosts, setCosts } from '#contract/costs.ts';
import type { UnitCosts } from '#sim-core/spec/unit-costs.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { siteKey } from '#app/lib/site-cache.ts';

/** What works cost on a site; `changedAt` is null while nobody has set it, and then there are no amounts to show. */
export const costsQuery = (siteId: string) =>
  queryOptions({
    queryKey: [...siteKey(siteId), 'costs'],
    queryFn: ({ signal }) => callEndpoint(getCosts, { params: { siteId }, signal }),
  });

export const setCostsMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (body: UnitCosts) => callEndpoint(setCosts, { params: { siteId }, body }),
    onSuccess: (costs) => queryClient.setQueryData(costsQuery(siteId).queryKey, costs),
  });
