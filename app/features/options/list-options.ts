import { queryOptions } from '@tanstack/react-query';
import { listOptions } from '#contract/options.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { siteKey } from '#app/lib/site-cache.ts';

/** The options of a site, Wait first. */
export const optionsQuery = (siteId: string) =>
  queryOptions({
    queryKey: [...siteKey(siteId), 'options'],
    queryFn: async ({ signal }) => (await callEndpoint(listOptions, { params: { siteId }, signal })).options,
  });
