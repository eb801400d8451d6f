import { queryOptions } from '@tanstack/react-query';
import { getLayerValues } from '#contract/ground.ts';
import { maximumCells } from '#sim-core/spec/limits.ts';
import { fetchBlob } from '#app/lib/api-client.ts';
import { cells } from '#app/workers/cells-client.ts';

const limits = { cells: maximumCells };
/** Bytes of a hash never change, so they are fetched once; they are large, so they are let go soon. */
const held = { staleTime: Infinity, gcTime: 60_000, structuralSharing: false } as const;

/** A layer's cells as they are stored, from the browser's own cache where it has them. */
export const fetchLayer = (siteId: string, hash: string, signal?: AbortSignal) =>
  fetchBlob(getLayerValues, { params: { siteId, hash }, signal });

/** The decoded values of a layer's cells. */
export const layerValuesQuery = (siteId: string, hash: string) =>
  queryOptions({
    queryKey: ['layer-values', siteId, hash],
    queryFn: async ({ signal }) => cells.unpack(await fetchLayer(siteId, hash, signal), limits),
    ...held,
  });
