import { useQuery } from '@tanstack/react-query';
import { layerOf, layerSources } from '#contract/layer-sources.ts';
import type { Site } from '#contract/sites.ts';
import type { CellValues } from '#sim-core/grid/ground.ts';
import type { EngineGround } from '#app/workers/engine-ground.ts';
import { engineGroundQuery } from './engine-ground.ts';
import { layerValuesQuery } from './layer-values.ts';

/** Cells of the site's layers as the map takes them: the ground as the engine will see it, one byte a cell. */
export interface GroundRasters extends Partial<EngineGround> {
  /** class numbers; undefined while on their way or where there is no such layer */
  habitat: CellValues | undefined;
  /** what went wrong on the way */
  errors: { habitat?: unknown; ground?: unknown };
  retry: () => void;
}

/** The ground of a site; what it lacks is not waited for. */
export function useGroundRasters(site: Site): GroundRasters {
  const { id: siteId, layers, grid } = site;
  const habitat = layerOf(site, 'habitat');
  const classes = useQuery({
    ...layerValuesQuery(siteId, habitat?.hash ?? ''),
    enabled: habitat !== undefined,
  });
  const rasters = layers.map(({ hash, noData }) => ({ hash, noData }));
  const ground = useQuery({
    ...engineGroundQuery({ siteId, grid, rasters }, layerSources(site)),
    enabled: layers.length > 0,
  });
  return {
    ...ground.data,
    habitat: classes.data?.values,
    errors: { habitat: classes.error ?? undefined, ground: ground.error ?? undefined },
    retry: () => {
      if (classes.error) void classes.refetch();
      if (ground.error) void ground.refetch();
    },
  };
}
