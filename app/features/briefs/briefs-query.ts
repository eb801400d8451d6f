import { queryOptions, type QueryClient } from '@tanstack/react-query';
import {
  getBrief,
  getBriefMap,
  getBriefPdf,
  getBriefVersion,
  listBriefMessages,
  listBriefs,
  type Brief,
} from '#contract/briefs.ts';
import { callEndpoint, endpointUrl } from '#app/lib/api-client.ts';
import { siteKey } from '#app/lib/site-cache.ts';

const briefsKey = (siteId: string) => [...siteKey(siteId), 'briefs'] as const;
const briefKey = (siteId: string, briefId: string) => [...siteKey(siteId), 'brief', briefId] as const;

/** The briefs of a site, the one changed last first. */
export const briefsQuery = (siteId: string) =>
  queryOptions({
    queryKey: briefsKey(siteId),
    queryFn: async ({ signal }) => (await callEndpoint(listBriefs, { params: { siteId }, signal })).briefs,
  });

/** A brief in its newest version, or in the one that is named. */
export const briefQuery = (siteId: string, briefId: string, version?: number) =>
  queryOptions({
    queryKey: [...briefKey(siteId, briefId), version ?? 'newest'],
    queryFn: ({ signal }) =>
      version === undefined
        ? callEndpoint(getBrief, { params: { siteId, briefId }, signal })
        : callEndpoint(getBriefVersion, { params: { siteId, briefId, version }, signal }),
  });

/** What was sent of a brief; asked again while some of it is on its way. */
export const briefMessagesQuery = (siteId: string, briefId: string) =>
  queryOptions({
    queryKey: [...briefKey(siteId, briefId), 'messages'],
    queryFn: ({ signal }) => callEndpoint(listBriefMessages, { params: { siteId, briefId }, signal }),
    refetchInterval: ({ state }) =>
      state.data?.messages.some(({ recipients }) => recipients.some(({ status }) => status === 'sending'))
        ? 1000
        : false,
  });

/** After a change: the reply is the newest version, and what hangs on it is asked for again. */
export function keepBrief(queryClient: QueryClient, brief: Brief): void {
  const { siteId, id } = brief;
  queryClient.setQueryData<Brief>(briefQuery(siteId, id).queryKey, brief);
  void queryClient.invalidateQueries({ queryKey: briefsKey(siteId) });
}

type VersionAddress = Pick<Brief, 'siteId' | 'id' | 'version'>;
const paramsOf = ({ siteId, id, version }: VersionAddress) => ({ siteId, briefId: id, version });

export const pdfUrl = (brief: VersionAddress): string =>
  endpointUrl(getBriefPdf, { params: paramsOf(brief) });
export const mapUrl = (brief: VersionAddress, option: number): string =>
  endpointUrl(getBriefMap, { params: { ...paramsOf(brief), option } });
