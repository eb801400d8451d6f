import { queryOptions } from '@tanstack/react-query';
import { useSyncExternalStore } from 'react';
import type { Site } from '#contract/sites.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { rasterSources, type LayerSource, type LayerSources } from '#sim-core/spec/run-spec.ts';
import { cells } from '#app/workers/cells-client.ts';
import type { PackedLayers } from '#app/workers/run-loop.ts';
import { fetchLayer } from './layer-values.ts';

/** A raster that a source may name by its hash, with its value for no data. */
export interface NamedRaster {
  readonly hash: string;
  readonly noData: number | null;
}

/** Where ground comes from: the site that keeps the rasters, its cells, and the rasters that sources may name. */
export interface GroundOrigin {
  readonly siteId: string;
  readonly grid: Grid;
  readonly rasters: readonly NamedRaster[];
}

/** The ground of a site as it stands. */
export const siteOrigin = ({ id, grid, layers }: Pick<Site, 'id' | 'grid' | 'layers'>): GroundOrigin => ({
  siteId: id,
  grid,
  rasters: layers.map(({ hash, noData }) => ({ hash, noData })),
});

/**
 * The rasters that sources name, as they are stored.
 * @throws ProblemError where one cannot be fetched
 */
export async function fetchLayers(
  { siteId, rasters }: Pick<GroundOrigin, 'siteId' | 'rasters'>,
  sources: readonly LayerSource[],
  signal?: AbortSignal,
): Promise<PackedLayers> {
  const named = sources.flatMap((source) => rasterSources(source)).map(({ raster }) => raster);
  const hashes = new Set(named.flatMap((raster) => ('layer' in raster ? [raster.layer] : [])));
  return new Map(
    await Promise.all(
      [...hashes].map(async (hash) => {
        const noData = rasters.find((raster) => raster.hash === hash)?.noData ?? null;
        return [hash, { packed: await fetchLayer(siteId, hash, signal), noData }] as const;
      }),
    ),
  );
}

/** Worked out from bytes that never change, so once; large, so let go soon. */
const held = { staleTime: Infinity, gcTime: 20_000, structuralSharing: false } as const;

/** round(255 × share) of every cell, from one source. */
export const sourceBytesQuery = (origin: GroundOrigin, source: LayerSource) =>
  queryOptions({
    queryKey: ['source-bytes', origin, source],
    queryFn: async ({ signal }) =>
      cells.sourceBytes(await fetchLayers(origin, [source], signal), source, origin.grid),
    ...held,
  });

/** How far the ground that is being worked out is, 0..1; undefined while none is. */
let progress: number | undefined;
const listeners = new Set<() => void>();
const tellProgress = (share: number | undefined) => {
  progress = share;
  listeners.forEach((listener) => listener());
};
export const useGroundProgress = (): number | undefined =>
  useSyncExternalStore(
    (listener) => {
      listeners.add(listener);
      return () => listeners.delete(listener);
    },
    () => progress,
  );

/** The ground as a run would start from it, with what its maps say in numbers. */
export const engineGroundQuery = (origin: GroundOrigin, sources: LayerSources) =>
  queryOptions({
    queryKey: ['engine-ground', origin, sources],
    queryFn: async ({ signal }) => {
      const layers = await fetchLayers(origin, Object.values(sources), signal);
      try {
        return await cells.engineGround(layers, sources, origin.grid, { onProgress: tellProgress, signal });
      } finally {
        if (!signal.aborted) tellProgress(undefined);
      }
    },
    ...held,
  });

/** Maps of it from afar, for as long as the exact ones are on their way. */
export const coarseGroundQuery = (
  origin: GroundOrigin,
  sources: LayerSources,
  parts: readonly (keyof LayerSources)[],
) =>
  queryOptions({
    queryKey: ['coarse-ground', origin, sources, parts],
    queryFn: async ({ signal }) =>
      cells.coarseGround(
        await fetchLayers(origin, Object.values(sources), signal),
        sources,
        origin.grid,
        parts,
      ),
    ...held,
    gcTime: 0,
    // What it cannot make, the exact work says better.
    retry: false,
  });
