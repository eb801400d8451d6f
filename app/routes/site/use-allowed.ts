import { useQuery } from '@tanstack/react-query';
import { allowedSource } from '#contract/layer-sources.ts';
import type { Site } from '#contract/sites.ts';
import { siteOrigin, sourceBytesQuery } from '#app/features/layers/engine-ground.ts';

export interface AllowedGround {
  /** not 0 where works may go, one byte a cell; undefined where the site says nothing, or while it is worked out */
  readonly cells: Uint8Array | undefined;
  /** what the site says about it is here, or it says nothing */
  readonly known: boolean;
}

/** Where works may go on a site: where its `allowed` layer or an allowed area says so, or everywhere without either. */
export function useAllowed(site: Site): AllowedGround {
  const source = allowedSource(site);
  const worked = useQuery({
    ...sourceBytesQuery(siteOrigin(site), source ?? 1),
    enabled: source !== undefined,
  });
  return {
    cells: source === undefined ? undefined : worked.data,
    known: source === undefined || worked.data !== undefined,
  };
}
