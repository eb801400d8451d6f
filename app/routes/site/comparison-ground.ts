import { useQuery, useQueryClient } from '@tanstack/react-query';
import { replicateSpec, type Comparison } from '#contract/comparisons.ts';
import { keepComparison } from '#app/features/comparisons/get-comparison.ts';
import { comparisonManager } from '#app/features/comparisons/live-comparisons.ts';
import { fetchLayers, sourceBytesQuery } from '#app/features/layers/engine-ground.ts';

const originOf = ({ siteId, grid, layers }: Comparison) => ({ siteId, grid, rasters: layers });

/** Where this tab remembers what it works on, so that a reload goes on by itself. */
const workKey = (comparisonId: string) => `foothold.comparison.${comparisonId}`;

/** Whether this very tab was at work on a comparison before it was loaded anew. */
export function wasAtWork(comparisonId: string): boolean {
  try {
    return window.sessionStorage.getItem(workKey(comparisonId)) !== null;
  } catch {
    return false;
  }
}

export function forgetWork(comparisonId: string): void {
  try {
    window.sessionStorage.removeItem(workKey(comparisonId));
  } catch {
    // Without storage nothing was remembered.
  }
}

/** Takes up a comparison in this tab, from what is stored of it. */
export function useWorkOnComparison(): (comparison: Comparison) => void {
  const queryClient = useQueryClient();
  return (comparison) => {
    try {
      window.sessionStorage.setItem(workKey(comparison.id), 'at work');
    } catch {
      // Without storage a reload asks before it goes on.
    }
    const { layers } = replicateSpec(comparison.plan, 0, 0, 0);
    comparisonManager.start({
      comparison,
      loadLayers: () => fetchLayers(originOf(comparison), Object.values(layers)),
      onRecord: (record) => {
        forgetWork(record.id);
        keepComparison(queryClient, record);
      },
    });
  };
}

/** Capacity of the ground that a comparison stands on, in 8 bits; undefined while it is on its way. */
export const useComparisonCapacity = (comparison: Comparison): Uint8Array | undefined =>
  useQuery(sourceBytesQuery(originOf(comparison), comparison.plan.common.layers.capacity)).data;
