import { keepPreviousData, useQuery } from '@tanstack/react-query';
import { layerSources } from '#contract/layer-sources.ts';
import type { Site } from '#contract/sites.ts';
import type { EngineGround } from '#app/workers/engine-ground.ts';
import { engineGroundQuery, siteOrigin } from './engine-ground.ts';

/** The ground of a site as the engine will see it, one byte a cell; its parts are undefined while on their way. */
export interface GroundRasters extends Partial<EngineGround> {
  /** what went wrong on the way */
  error: Error | null;
  /** an older state stands until the new one is worked out */
  outdated: boolean;
  retry: () => void;
}

/** The ground of a site; what it lacks is not waited for. */
export function useGroundRasters(site: Site): GroundRasters {
  const ground = useQuery({
    ...engineGroundQuery(siteOrigin(site), layerSources(site)),
    enabled: site.layers.length > 0,
    placeholderData: keepPreviousData,
  });
  return {
    ...ground.data,
    error: ground.error,
    outdated: ground.isPlaceholderData,
    retry: () => void ground.refetch(),
  };
}
