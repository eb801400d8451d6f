import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import { setOutlook } from '#contract/outlook-endpoints.ts';
import type { Outlook } from '#contract/outlooks.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { keepSite } from '#app/lib/site-cache.ts';

export const setOutlookMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (outlook: Outlook) => callEndpoint(setOutlook, { params: { siteId }, body: outlook }),
    onSuccess: (site) => keepSite(queryClient, site),
  });
