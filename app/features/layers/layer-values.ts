import { queryOptions } from '@tanstack/react-query';
import { decodeCellValues } from '#rasters/cells/cell-values.ts';
import { getLayerValues } from '#contract/sites.ts';
import { fetchBytes } from '#app/lib/api-client.ts';

/** The decoded values of a layer's cells. Bytes of a hash never change, so they are fetched once and let go soon. */
export const layerValuesQuery = (siteId: string, hash: string) =>
  queryOptions({
    queryKey: ['layer-values', siteId, hash],
    queryFn: async ({ signal }) =>
      decodeCellValues(await fetchBytes(getLayerValues, { params: { siteId, hash }, signal })),
    staleTime: Infinity,
    gcTime: 60_000,
    // Comparing millions of values to find that they are the same would cost more than it saves.
    structuralSharing: false,
  });
