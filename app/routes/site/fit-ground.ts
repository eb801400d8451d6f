import { useQueryClient, type QueryClient } from '@tanstack/react-query';
import type { Fit, FitData } from '#contract/fits.ts';
import { keepFit } from '#app/features/fits/get-fit.ts';
import { fitManager } from '#app/features/fits/live-fits.ts';
import { targetOf } from '#app/features/fits/load-target.ts';
import { fetchLayers, sourceBytesQuery, type GroundOrigin } from '#app/features/layers/engine-ground.ts';
import { layerValuesQuery } from '#app/features/layers/layer-values.ts';
import type { FitTarget } from '#sim-core/fit/fit-target.ts';
import type { LayerSources } from '#sim-core/spec/run-spec.ts';

export const originOfFit = ({ siteId, grid, layers }: Fit): GroundOrigin => ({
  siteId,
  grid,
  rasters: layers,
});

/** What the runs of a fit are compared with. @throws ProblemError where a raster cannot be fetched */
export async function loadTarget(
  queryClient: QueryClient,
  origin: GroundOrigin,
  { capacity, cover }: Pick<LayerSources, 'capacity' | 'cover'>,
  data: FitData,
): Promise<FitTarget> {
  const [held, start] = await Promise.all([
    queryClient.fetchQuery(sourceBytesQuery(origin, capacity)),
    queryClient.fetchQuery(sourceBytesQuery(origin, cover)),
  ]);
  const maps = new Map(
    await Promise.all(
      data.maps.map(async ({ layer }) => {
        const { values } = await queryClient.fetchQuery(layerValuesQuery(origin.siteId, layer));
        const noData = origin.rasters.find(({ hash }) => hash === layer)?.noData ?? null;
        return [layer, { values, noData }] as const;
      }),
    ),
  );
  return targetOf(origin.grid, data, held, start, (layer) => maps.get(layer)!);
}

export const targetOfFit = (queryClient: QueryClient, fit: Fit): Promise<FitTarget> =>
  loadTarget(queryClient, originOfFit(fit), fit.plan.base.layers, fit.plan.data);

/** Where this tab remembers what it works on, so that a reload goes on by itself. */
const workKey = (fitId: string) => `foothold.fit.${fitId}`;

/** Whether this very tab was at work on a fit before it was loaded anew. */
export function wasFitting(fitId: string): boolean {
  try {
    return window.sessionStorage.getItem(workKey(fitId)) !== null;
  } catch {
    return false;
  }
}

function remember(fitId: string, working: boolean): void {
  try {
    if (working) window.sessionStorage.setItem(workKey(fitId), 'at work');
    else window.sessionStorage.removeItem(workKey(fitId));
  } catch {
    // Without storage a reload asks before it goes on.
  }
}

export const forgetFitting = (fitId: string): void => remember(fitId, false);

/** Takes up a fit in this tab, from what is stored of it. */
export function useWorkOnFit(): (fit: Fit) => void {
  const queryClient = useQueryClient();
  return (fit) => {
    remember(fit.id, true);
    fitManager.start({
      fit,
      loadLayers: () => fetchLayers(originOfFit(fit), Object.values(fit.plan.base.layers)),
      loadTarget: () => targetOfFit(queryClient, fit),
      onRecord: (record) => {
        remember(record.id, false);
        keepFit(queryClient, record);
      },
    });
  };
}
