import { useQuery, useQueryClient, type QueryClient } from '@tanstack/react-query';
import type { Run } from '#contract/runs.ts';
import { fetchLayers, sourceBytesQuery } from '#app/features/layers/engine-ground.ts';
import { keepRun } from '#app/features/runs/get-run.ts';
import type { StartParts } from '#app/features/runs/run-manager.ts';

type GroundedRun = Pick<Run, 'siteId' | 'spec' | 'grid' | 'layers'>;

const originOf = ({ siteId, grid, layers }: GroundedRun) => ({
  siteId,
  grid,
  rasters: layers.map(({ hash, noData }) => ({ hash, noData })),
});

/** What the run manager needs to work on a run; its layers include those that were replaced since. */
export const startParts = (queryClient: QueryClient, run: Run): StartParts => ({
  run,
  loadLayers: () => fetchLayers(originOf(run), Object.values(run.spec.layers)),
  onRecord: (record) => keepRun(queryClient, record),
});

/** Capacity of the ground that a run stands on, in 8 bits; undefined while it is on its way. */
export const useRunCapacity = (run: GroundedRun): Uint8Array | undefined =>
  useQuery(sourceBytesQuery(originOf(run), run.spec.layers.capacity)).data;

/** What the run manager needs, for pages that start runs. */
export function useStartParts(): (run: Run) => StartParts {
  const queryClient = useQueryClient();
  return (run) => startParts(queryClient, run);
}
