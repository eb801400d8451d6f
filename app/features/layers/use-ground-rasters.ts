import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { layerSources } from '#contract/layer-sources.ts';
import type { Site } from '#contract/sites.ts';
import type { LayerSources } from '#sim-core/spec/run-spec.ts';
import { coarseStride } from '#app/workers/coarse-ground.ts';
import type { EngineGround } from '#app/workers/engine-ground.ts';
import { coarseGroundQuery, engineGroundQuery, siteOrigin, useGroundProgress } from './engine-ground.ts';

/** The ground of a site as the engine will see it, one byte a cell; its parts are undefined while on their way. */
export interface GroundRasters extends Partial<EngineGround> {
  /** what went wrong on the way */
  error: Error | null;
  /** an older state stands until the new one is worked out */
  outdated: boolean;
  /** maps from afar stand until the exact ones are worked out; the facts are those of before */
  coarse: boolean;
  /** how far the exact work is, 0..1, where it is long enough to tell */
  progress: number | undefined;
  retry: () => void;
}

const none: readonly never[] = [];

/**
 * The ground of a site; what it lacks is not waited for.
 * @param first maps that a large site shows from afar while the exact ones are worked out
 */
export function useGroundRasters(site: Site, first: readonly (keyof LayerSources)[] = none): GroundRasters {
  const [origin, sources] = [siteOrigin(site), layerSources(site)];
  const enabled = site.layers.length > 0;
  const ground = useQuery({
    ...engineGroundQuery(origin, sources),
    enabled,
    placeholderData: keepPreviousData,
  });
  const waiting = enabled && ground.isFetching && (ground.isPlaceholderData || ground.data === undefined);
  const afar = useQuery({
    ...coarseGroundQuery(origin, sources, first),
    enabled: waiting && first.length > 0 && coarseStride(site.grid) > 1,
  });
  const progress = useGroundProgress();
  const coarse = waiting && afar.data !== undefined;
  return {
    ...ground.data,
    ...(coarse ? afar.data : {}),
    error: ground.error,
    outdated: ground.isPlaceholderData,
    coarse,
    progress: waiting ? progress : undefined,
    retry: () => void ground.refetch(),
  };
}
