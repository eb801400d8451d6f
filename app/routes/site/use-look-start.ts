import { useQuery } from '@tanstack/react-query';
import { useMemo } from 'react';
import type { Site } from '#contract/sites.ts';
import { fetchLayers } from '#app/features/layers/engine-ground.ts';
import { composeRunSpec } from '#app/features/runs/compose-run-spec.ts';
import type { QuickLookStart } from '#app/workers/quick-look-desk.ts';
import type { AllowedGround } from './use-allowed.ts';

/**
 * What a quick look starts from, as packed layers, so that the page never holds them; undefined while the ground is not
 * complete. It stays the same object as long as nothing that it rests on changes.
 */
export function useLookStart(site: Site, allowed: AllowedGround): QuickLookStart | undefined {
  const { id, grid, layers, plant, outlook } = site;
  const { spec } = useMemo(
    () => composeRunSpec(site, { works: [] }, { mode: 'mean-field', seed: 'quick look' }),
    [site],
  );
  const rasters = layers.map(({ hash, noData }) => ({ hash, noData }));
  const fetched = useQuery({
    queryKey: ['look-start', id, grid, rasters, plant.rates, outlook, spec?.layers],
    queryFn: async ({ signal }) => {
      if (!spec) throw new Error('The ground is not complete.');
      const ground = await fetchLayers({ siteId: id, rasters }, Object.values(spec.layers), signal);
      return { spec, grid, ground };
    },
    enabled: spec !== undefined,
    staleTime: Infinity,
    gcTime: 60_000,
    structuralSharing: false,
  });
  const { data } = fetched;
  return useMemo(
    () => (data && allowed.known ? { ...data, ...(allowed.cells && { allowed: allowed.cells }) } : undefined),
    [data, allowed.known, allowed.cells],
  );
}
