import { useQuery, useQueryClient, type QueryClient } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Run } from '#contract/runs.ts';
import { buildGround } from '#sim-core/index.ts';
import { toBytes, toShares, type Ground } from '#sim-core/grid/ground.ts';
import { layerValuesQuery } from '#app/features/layers/layer-values.ts';
import { keepRun } from '#app/features/runs/get-run.ts';
import type { StartParts } from '#app/features/runs/run-manager.ts';

type GroundedRun = Pick<Run, 'siteId' | 'spec' | 'grid' | 'layers'>;

const noDataOf = (run: GroundedRun, hash: string) =>
  run.layers.find((layer) => layer.hash === hash)?.noData ?? null;

/**
 * The ground that a run stands on, from the layers that its spec names, also those that were replaced since.
 * @throws ProblemError where a layer cannot be fetched; RunProblem where its numbers do not become shares
 */
async function loadGround(queryClient: QueryClient, run: GroundedRun): Promise<Ground> {
  const { siteId, spec, grid } = run;
  const sources = Object.values(spec.layers).filter((source) => typeof source === 'object');
  const hashes = new Set(sources.flatMap((source) => ('layer' in source ? [source.layer] : [])));
  const rasters = new Map(
    await Promise.all(
      [...hashes].map(
        async (hash) => [hash, await queryClient.fetchQuery(layerValuesQuery(siteId, hash))] as const,
      ),
    ),
  );
  return buildGround(spec.layers, grid.width * grid.height, (source) => {
    const hash = 'layer' in source ? source.layer : '';
    const raster = rasters.get(hash);
    if (!raster) throw new Error('The run names a file instead of an uploaded layer.');
    return { values: raster.values, noData: noDataOf(run, hash) };
  });
}

/** What the run manager needs to work on a run. */
export const startParts = (queryClient: QueryClient, run: Run): StartParts => ({
  run,
  loadGround: () => loadGround(queryClient, run),
  onRecord: (record) => keepRun(queryClient, record),
});

/** Capacity of the ground that a run stands on, in 8 bits; undefined while it is on its way. */
export function useRunCapacity(run: GroundedRun): Uint8Array | undefined {
  const source = run.spec.layers.capacity;
  const hash = typeof source === 'object' && 'layer' in source ? source.layer : undefined;
  const values = useQuery({ ...layerValuesQuery(run.siteId, hash ?? ''), enabled: hash !== undefined }).data;
  const noData = hash === undefined ? null : noDataOf(run, hash);
  return useMemo(
    () =>
      values && typeof source === 'object'
        ? toBytes(toShares(values.values, { ...source, noData }))
        : undefined,
    [values, source, noData],
  );
}

/** What the run manager needs, for pages that start runs. */
export function useStartParts(): (run: Run) => StartParts {
  const queryClient = useQueryClient();
  return (run) => startParts(queryClient, run);
}
