import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query';
import { cancelGridChange, getGridChange, listCellSizes, startGridChange } from '#contract/working-grid.ts';
import { callEndpoint } from '#app/lib/api-client.ts';

/** The working cells that a site may have, finest first. */
export const cellSizesQuery = (siteId: string) =>
  queryOptions({
    queryKey: ['cell-sizes', siteId],
    queryFn: async ({ signal }) =>
      (await callEndpoint(listCellSizes, { params: { siteId }, signal })).cellSizes,
    staleTime: 0,
  });

/** The change of the working grid that is under way or has failed; asked for again while it goes on. */
export const gridChangeQuery = (siteId: string) =>
  queryOptions({
    queryKey: ['grid-change', siteId],
    queryFn: async ({ signal }) =>
      (await callEndpoint(getGridChange, { params: { siteId }, signal })).gridChange,
    refetchInterval: ({ state }) => (state.data && state.data.state !== 'failed' ? 700 : false),
  });

export const startGridChangeMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (factor: number) => callEndpoint(startGridChange, { params: { siteId }, body: { factor } }),
    onSuccess: ({ gridChange }) => queryClient.setQueryData(['grid-change', siteId], gridChange),
  });

export const cancelGridChangeMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: () => callEndpoint(cancelGridChange, { params: { siteId } }),
    onSuccess: () => queryClient.setQueryData(['grid-change', siteId], null),
  });
