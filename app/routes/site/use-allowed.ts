import { useQuery } from '@tanstack/react-query';
import { layerOf } from '#contract/layer-sources.ts';
import { valueUnitScale } from '#contract/layers.ts';
import type { Site } from '#contract/sites.ts';
import { sourceBytesQuery } from '#app/features/layers/engine-ground.ts';

export interface AllowedGround {
  /** not 0 where works may go, one byte a cell; undefined where the site says nothing, or while it is fetched */
  readonly cells: Uint8Array | undefined;
  /** what the site says about it is here, or it says nothing */
  readonly known: boolean;
}

/** Where works may go on a site: where its `allowed` layer says so, or everywhere without one. */
export function useAllowed(site: Site): AllowedGround {
  const layer = layerOf(site, 'allowed');
  const rasters = layer ? [{ hash: layer.hash, noData: layer.noData }] : [];
  const fetched = useQuery({
    ...sourceBytesQuery(
      { siteId: site.id, grid: site.grid, rasters },
      layer ? { layer: layer.hash, scale: valueUnitScale[layer.unit] } : 1,
    ),
    enabled: layer !== undefined,
  });
  return { cells: layer && fetched.data, known: layer === undefined || fetched.data !== undefined };
}
