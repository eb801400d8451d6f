import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import { setElevationCurves } from '#contract/ground.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { keepSite } from '#app/lib/site-cache.ts';
import type { ElevationDraft } from './curve-draft.ts';

/** Sets what elevation does, and the levels of the tide beside it. */
export const setElevationMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: ({ elevationCurves, tidalDatums }: ElevationDraft) =>
      callEndpoint(setElevationCurves, {
        params: { siteId },
        body: { elevationCurves, tidalDatums: [...tidalDatums] },
      }),
    onSuccess: (site) => keepSite(queryClient, site),
  });
