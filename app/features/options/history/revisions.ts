import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query';
import { bringBackRevision, getRevision, listRevisions } from '#contract/options.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { keepOption } from '../change-option.ts';
import { optionsQuery } from '../list-options.ts';

const historyKey = (siteId: string, optionId: string) => [
  ...optionsQuery(siteId).queryKey,
  optionId,
  'history',
];

/** Who changed an option, when and how, newest first; asked for again whenever it is opened. */
export const revisionsQuery = (siteId: string, optionId: string) =>
  queryOptions({
    queryKey: historyKey(siteId, optionId),
    queryFn: async ({ signal }) =>
      (await callEndpoint(listRevisions, { params: { siteId, optionId }, signal })).revisions,
    staleTime: 0,
  });

/** An option as it was saved once: it never changes. */
export const revisionQuery = (siteId: string, optionId: string, revision: number) =>
  queryOptions({
    queryKey: [...historyKey(siteId, optionId), revision],
    queryFn: ({ signal }) => callEndpoint(getRevision, { params: { siteId, optionId, revision }, signal }),
    staleTime: Infinity,
  });

export const bringBackMutation = (queryClient: QueryClient, siteId: string, optionId: string) =>
  mutationOptions({
    mutationFn: ({ revision, onRevision }: { revision: number; onRevision: number }) =>
      callEndpoint(bringBackRevision, { params: { siteId, optionId, revision }, body: { onRevision } }),
    onSuccess: (option) => keepOption(queryClient, option),
  });
