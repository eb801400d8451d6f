import { queryOptions, type QueryClient } from '@tanstack/react-query';
import { getFit, listFits, type Fit } from '#contract/fits.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { siteKey } from '#app/lib/site-cache.ts';

const listKey = (siteId: string) => [...siteKey(siteId), 'fits'] as const;
const fitKey = (siteId: string, fitId: string) => [...siteKey(siteId), 'fit', fitId] as const;

/** The fits of a site, newest first. */
export const fitsQuery = (siteId: string) =>
  queryOptions({
    queryKey: listKey(siteId),
    queryFn: ({ signal }) => callEndpoint(listFits, { params: { siteId }, signal }),
    select: ({ fits }) => fits,
  });

/** A fit with its plan and where it stands. */
export const fitQuery = (siteId: string, fitId: string) =>
  queryOptions({
    queryKey: fitKey(siteId, fitId),
    queryFn: ({ signal }) => callEndpoint(getFit, { params: { siteId, fitId }, signal }),
    structuralSharing: false,
  });

/** After a change: the reply is what the fit looks like now, and the list of its site is asked for again. */
export function keepFit(queryClient: QueryClient, fit: Fit): void {
  queryClient.setQueryData<Fit>(fitKey(fit.siteId, fit.id), fit);
  void queryClient.invalidateQueries({ queryKey: listKey(fit.siteId) });
}
