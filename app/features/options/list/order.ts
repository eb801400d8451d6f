import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import { orderOptions, type Option } from '#contract/options.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { optionsQuery } from '../list-options.ts';

/** The ids with one of them taken out and put in at `to`, counted without it; held within the list. */
export function movedTo(ids: readonly string[], id: string, to: number): string[] {
  const others = ids.filter((other) => other !== id);
  return others.toSpliced(Math.min(Math.max(to, 0), others.length), 0, id);
}

const inOrder = (options: readonly Option[], ids: readonly string[]): Option[] => {
  const place = new Map(ids.map((id, i) => [id, i]));
  return options.toSorted((a, b) => (place.get(a.id) ?? -1) - (place.get(b.id) ?? -1));
};

/** Puts the options in order: at once on the page, and back as they were when the server refuses. */
export const orderMutation = (queryClient: QueryClient, siteId: string) => {
  const { queryKey } = optionsQuery(siteId);
  return mutationOptions({
    mutationFn: (optionIds: string[]) =>
      callEndpoint(orderOptions, { params: { siteId }, body: { optionIds } }),
    onMutate: (optionIds) => {
      queryClient.setQueryData(
        queryKey,
        (options: Option[] | undefined) => options && inOrder(options, optionIds),
      );
    },
    onSuccess: ({ options }) => queryClient.setQueryData(queryKey, options),
    onError: () => queryClient.invalidateQueries({ queryKey }),
  });
};
