import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import { changeOption, createOption, deleteOption, type Option } from '#contract/options.ts';
import type { Work, WorkSet } from '#contract/works.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { siteKey } from '#app/lib/site-cache.ts';
import { forgetDraft } from './draft-storage.ts';
import { optionsQuery } from './list-options.ts';
import { keepSuggestion } from './suggest/suggest-storage.ts';

/** Puts an option into the list that was fetched, at the end when it is new; the site's count is asked for again. */
export function keepOption(queryClient: QueryClient, option: Option): void {
  queryClient.setQueryData(optionsQuery(option.siteId).queryKey, (options: Option[] | undefined) =>
    options?.some(({ id }) => id === option.id)
      ? options.map((other) => (other.id === option.id ? option : other))
      : [...(options ?? []), option],
  );
  void queryClient.invalidateQueries({ queryKey: siteKey(option.siteId) });
}

export const createOptionMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (body: { name: string; note?: string; works: Work[]; sets?: WorkSet[] }) =>
      callEndpoint(createOption, { params: { siteId }, body }),
    onSuccess: (option) => keepOption(queryClient, option),
  });

/** Refused with `conflict` when somebody changed the option after `revision`. */
export const saveOptionMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: ({
      optionId,
      ...body
    }: {
      optionId: string;
      revision: number;
      name?: string;
      note?: string;
      archived?: boolean;
      works?: Work[];
      sets?: WorkSet[];
    }) => callEndpoint(changeOption, { params: { siteId, optionId }, body }),
    onSuccess: (option) => keepOption(queryClient, option),
  });

export const deleteOptionMutation = (queryClient: QueryClient, siteId: string) =>
  mutationOptions({
    mutationFn: (optionId: string) => callEndpoint(deleteOption, { params: { siteId, optionId } }),
    onSuccess: (_, optionId) => {
      forgetDraft(optionId);
      keepSuggestion(optionId, undefined);
      queryClient.setQueryData(optionsQuery(siteId).queryKey, (options: Option[] | undefined) =>
        options?.filter(({ id }) => id !== optionId),
      );
      void queryClient.invalidateQueries({ queryKey: siteKey(siteId) });
    },
  });
