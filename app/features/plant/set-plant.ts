import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import type { SitePlant } from '#contract/plants.ts';
import { setPlant } from '#contract/sites.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { keepSite } from '#app/lib/site-cache.ts';

export const setPlantMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (plant: SitePlant) => callEndpoint(setPlant, { params: { siteId }, body: plant }),
    onSuccess: (site) => keepSite(queryClient, site),
  });
