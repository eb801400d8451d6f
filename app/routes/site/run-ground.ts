import { useQuery, useQueryClient, type QueryClient } from '@tanstack/react-query';
import type { Run } from '#contract/runs.ts';
import type { RasterSource } from '#sim-core/grid/build-ground.ts';
import type { ShareMapping } from '#sim-core/grid/ground.ts';
import { fetchLayer, shareBytesQuery } from '#app/features/layers/layer-values.ts';
import { keepRun } from '#app/features/runs/get-run.ts';
import type { StartParts } from '#app/features/runs/run-manager.ts';
import type { PackedLayers } from '#app/workers/run-loop.ts';

type GroundedRun = Pick<Run, 'siteId' | 'spec' | 'grid' | 'layers'>;

const noDataOf = (run: GroundedRun, hash: string) =>
  run.layers.find((layer) => layer.hash === hash)?.noData ?? null;

/**
 * Every layer that a run's spec names, also those that were replaced since.
 * @throws ProblemError where a layer cannot be fetched
 */
async function loadLayers(run: GroundedRun): Promise<PackedLayers> {
  const sources = Object.values(run.spec.layers).filter((source) => typeof source === 'object');
  const hashes = new Set(sources.flatMap((source) => ('layer' in source ? [source.layer] : [])));
  return new Map(
    await Promise.all(
      [...hashes].map(async (hash) => {
        const packed = await fetchLayer(run.siteId, hash);
        return [hash, { packed, noData: noDataOf(run, hash) }] as const;
      }),
    ),
  );
}

/** What the run manager needs to work on a run. */
export const startParts = (queryClient: QueryClient, run: Run): StartParts => ({
  run,
  loadLayers: () => loadLayers(run),
  onRecord: (record) => keepRun(queryClient, record),
});

/** Capacity of the ground that a run stands on, in 8 bits; undefined while it is on its way. */
export function useRunCapacity(run: GroundedRun): Uint8Array | undefined {
  const source = run.spec.layers.capacity;
  const hash = typeof source === 'object' && 'layer' in source ? source.layer : undefined;
  const mapping = typeof source === 'object' && hash !== undefined ? mappingOf(source) : {};
  const noData = hash === undefined ? null : noDataOf(run, hash);
  return useQuery({
    ...shareBytesQuery(run.siteId, hash ?? '', { ...mapping, noData }),
    enabled: hash !== undefined,
  }).data;
}

const mappingOf = ({ scale, offset, classes, fill }: RasterSource): ShareMapping => ({
  scale,
  offset,
  classes,
  fill,
});

/** What the run manager needs, for pages that start runs. */
export function useStartParts(): (run: Run) => StartParts {
  const queryClient = useQueryClient();
  return (run) => startParts(queryClient, run);
}
