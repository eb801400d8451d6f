import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query';
import {
  changeLayer,
  deleteLayer,
  getLayerDependents,
  getLayerHistory,
  putLayerBack,
  setClasses,
} from '#contract/ground.ts';
import type { HabitatClass, Layer, LayerPart } from '#contract/layers.ts';
import type { Site } from '#contract/sites.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { keepSite } from '#app/lib/site-cache.ts';

const historyKey = (siteId: string, part?: LayerPart) =>
  ['layer-history', siteId, part].slice(0, part ? 3 : 2);

/** The layers that play or have played a part, newest first. */
export const layerHistoryQuery = (siteId: string, part: LayerPart) =>
  queryOptions({
    queryKey: historyKey(siteId, part),
    queryFn: async ({ signal }) =>
      (await callEndpoint(getLayerHistory, { params: { siteId }, query: { part }, signal })).entries,
    // Others replace layers, too, and runs come to stand on them.
    staleTime: 0,
  });

/** What depends on a layer. */
export const dependentsQuery = (siteId: string, layerId: string) =>
  queryOptions({
    queryKey: ['layer-dependents', siteId, layerId],
    queryFn: ({ signal }) => callEndpoint(getLayerDependents, { params: { siteId, layerId }, signal }),
    staleTime: 0,
  });

const kept = (queryClient: QueryClient) => ({
  onSuccess: (site: Site) => {
    keepSite(queryClient, site);
    void queryClient.invalidateQueries({ queryKey: historyKey(site.id) });
  },
});

/** Says what the values of a layer mean, and what people should know about it. */
export const changeLayerMutation = (queryClient: QueryClient, siteId: string, layerId: string) =>
  mutationOptions({
    mutationFn: (
      change: Partial<Pick<Layer, 'unit' | 'note'>> & {
        vertical?: NonNullable<Layer['vertical']>;
        year?: number;
      },
    ) => callEndpoint(changeLayer, { params: { siteId, layerId }, body: change }),
    ...kept(queryClient),
  });

/** Sets the class table of habitat. */
export const setClassesMutation = (queryClient: QueryClient, siteId: string, layerId: string) =>
  mutationOptions({
    mutationFn: (classes: HabitatClass[]) =>
      callEndpoint(setClasses, { params: { siteId, layerId }, body: { classes } }),
    ...kept(queryClient),
  });

/** Takes a layer off the site, or out of its part's history. */
export const deleteLayerMutation = (queryClient: QueryClient, siteId: string, layerId: string) =>
  mutationOptions({
    mutationFn: () => callEndpoint(deleteLayer, { params: { siteId, layerId } }),
    ...kept(queryClient),
  });

/** Lets a layer of the history play its part again. */
export const putBackMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (layerId: string) => callEndpoint(putLayerBack, { params: { siteId, layerId } }),
    ...kept(queryClient),
  });
