import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import { changeLayer, deleteLayer, setClasses } from '#contract/ground.ts';
import { type HabitatClass, type ValueUnit } from '#contract/layers.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { keepSite } from '#app/lib/site-cache.ts';

/** Says what the values of a layer mean. */
export const changeUnitMutation = (queryClient: QueryClient, siteId: string, layerId: string) =>
  mutationOptions({
    mutationFn: (unit: ValueUnit) =>
      callEndpoint(changeLayer, { params: { siteId, layerId }, body: { unit } }),
    onSuccess: (site) => keepSite(queryClient, site),
  });

/** Sets the class table of habitat. */
export const setClassesMutation = (queryClient: QueryClient, siteId: string, layerId: string) =>
  mutationOptions({
    mutationFn: (classes: HabitatClass[]) =>
      callEndpoint(setClasses, { params: { siteId, layerId }, body: { classes } }),
    onSuccess: (site) => keepSite(queryClient, site),
  });

/** Takes a layer off the site. */
export const deleteLayerMutation = (queryClient: QueryClient, siteId: string, layerId: string) =>
  mutationOptions({
    mutationFn: () => callEndpoint(deleteLayer, { params: { siteId, layerId } }),
    onSuccess: (site) => keepSite(queryClient, site),
  });
