import { queryOptions } from '@tanstack/react-query';
import { getSite } from '#contract/sites.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { siteKey } from '#app/lib/site-cache.ts';

/** A site with its layers, plant and outlook. */
export const siteQuery = (siteId: string) =>
  queryOptions({
    queryKey: siteKey(siteId),
    queryFn: ({ signal }) => callEndpoint(getSite, { params: { siteId }, signal }),
  });
