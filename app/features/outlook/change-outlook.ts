import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query';
import type { Outlook } from '#contract/outlooks.ts';
import * as endpoints from '#contract/outlook-endpoints.ts';
import type { DroughtRecord } from '#sim-core/spec/drought-record.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { keepSite } from '#app/lib/site-cache.ts';

/** Key of an outlook on a page: the id of a further one, or `main`. */
export type OutlookKey = string;
export const mainKey: OutlookKey = 'main';

export type OutlookChange =
  | { do: 'save'; key: OutlookKey; outlook: Outlook }
  | { do: 'add'; outlook: Outlook }
  | { do: 'delete' | 'make main'; key: OutlookKey };

/** Changes the outlooks of a site. */
export const outlookMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (change: OutlookChange) => {
      switch (change.do) {
        case 'add':
          return callEndpoint(endpoints.addOutlook, { params: { siteId }, body: change.outlook });
        case 'save':
          return change.key === mainKey
            ? callEndpoint(endpoints.setOutlook, { params: { siteId }, body: change.outlook })
            : callEndpoint(endpoints.changeOutlook, {
                params: { siteId, outlookId: change.key },
                body: change.outlook,
              });
        case 'delete':
          return callEndpoint(endpoints.deleteOutlook, { params: { siteId, outlookId: change.key } });
        case 'make main':
          return callEndpoint(endpoints.makeMainOutlook, { params: { siteId, outlookId: change.key } });
      }
    },
    onSuccess: (site) => keepSite(queryClient, site),
  });

const recordsKey = (siteId: string) => ['sites', siteId, 'drought-records'];

/** The drought records of a site with their values, the one in use first. */
export const recordsQuery = (siteId: string) =>
  queryOptions({
    queryKey: recordsKey(siteId),
    queryFn: () => callEndpoint(endpoints.listDroughtRecords, { params: { siteId } }),
  });

/** Stores a drought record, or forgets one by its id. */
export const recordMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (change: { record: DroughtRecord; fileName: string } | { forget: string }) =>
      'forget' in change
        ? callEndpoint(endpoints.deleteDroughtRecord, { params: { siteId, recordId: change.forget } })
        : callEndpoint(endpoints.addDroughtRecord, { params: { siteId }, body: change }),
    onSuccess: (site) => {
      keepSite(queryClient, site);
      void queryClient.invalidateQueries({ queryKey: recordsKey(siteId) });
    },
  });
