import { replicateSpec, type Comparison } from '#contract/comparisons.ts';
import { fetchLayers } from '#app/features/layers/engine-ground.ts';
import type { PackedLayers } from '#app/workers/run-loop.ts';

/** Where this tab remembers that it works on a study, so that a reload goes on by itself. */
const workKey = (comparisonId: string) => `foothold.study.${comparisonId}`;

export function wasStudying(comparisonId: string): boolean {
  try {
    return window.sessionStorage.getItem(workKey(comparisonId)) !== null;
  } catch {
    return false;
  }
}

export function rememberStudy(comparisonId: string): void {
  try {
    window.sessionStorage.setItem(workKey(comparisonId), 'at work');
  } catch {
    // Without storage a reload asks before it goes on.
  }
}

export function forgetStudy(comparisonId: string): void {
  try {
    window.sessionStorage.removeItem(workKey(comparisonId));
  } catch {
    // Without storage nothing was remembered.
  }
}

/** Fetches the layers that the runs of a comparison stand on. */
export function studyGround({ plan, siteId, layers }: Comparison): () => Promise<PackedLayers> {
  return () => fetchLayers({ siteId, rasters: layers }, Object.values(replicateSpec(plan, 0, 0, 0).layers));
}
