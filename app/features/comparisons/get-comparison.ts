import { queryOptions, type QueryClient } from '@tanstack/react-query';
import {
  getComparison,
  getEnsembleMap,
  getReplicates,
  listComparisons,
  type Comparison,
  type ComparisonSummary,
  type Decision,
} from '#contract/comparisons.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { callEndpoint, fetchBlob } from '#app/lib/api-client.ts';
import { siteKey } from '#app/lib/site-cache.ts';
import { cells } from '#app/workers/cells-client.ts';

const comparisonKey = (siteId: string, comparisonId: string) =>
  [...siteKey(siteId), 'comparison', comparisonId] as const;

/** One page of a site's comparisons, newest first. */
export const comparisonsQuery = (siteId: string, page: { offset?: number; limit?: number } = {}) =>
  queryOptions({
    queryKey: [...siteKey(siteId), 'comparisons', page],
    queryFn: ({ signal }) => callEndpoint(listComparisons, { params: { siteId }, query: page, signal }),
  });

/** What was decided last on a site. */
export const latestDecision = (comparisons: readonly ComparisonSummary[] = []): Decision | undefined =>
  comparisons
    .flatMap(({ decision }) => decision ?? [])
    .sort((a, b) => b.decidedAt.localeCompare(a.decidedAt))[0];

/** A comparison with its plan and what is stored of it. */
export const comparisonQuery = (siteId: string, comparisonId: string) =>
  queryOptions({
    queryKey: comparisonKey(siteId, comparisonId),
    queryFn: ({ signal }) => callEndpoint(getComparison, { params: { siteId, comparisonId }, signal }),
  });

export interface EnsembleAddress {
  readonly siteId: string;
  readonly comparisonId: string;
  readonly option: number;
  readonly outlook: number;
}

/** All stored replicates of an ensemble, page by page. */
export async function fetchReplicates(
  address: EnsembleAddress,
  signal?: AbortSignal,
): Promise<ReplicateRecord[]> {
  const { option, outlook, ...ids } = address;
  const params = { ...ids, option, outlook };
  const found: ReplicateRecord[] = [];
  for (;;) {
    const query = { offset: found.length, limit: 500 };
    const { replicates, total } = await callEndpoint(getReplicates, { params, query, signal });
    found.push(...replicates);
    if (found.length >= total || replicates.length === 0) return found;
  }
}

/** The stored replicates of every ensemble of a comparison, by option and outlook: `[option][outlook]`. */
export const replicatesQuery = (comparison: Comparison) =>
  queryOptions({
    queryKey: [
      ...comparisonKey(comparison.siteId, comparison.id),
      'replicates',
      comparison.ensembles.map(({ done }) => done),
    ],
    queryFn: ({ signal }) =>
      Promise.all(
        comparison.plan.options.map((_, option) =>
          Promise.all(
            comparison.plan.outlooks.map((__, outlook) =>
              fetchReplicates(
                { siteId: comparison.siteId, comparisonId: comparison.id, option, outlook },
                signal,
              ),
            ),
          ),
        ),
      ),
    structuralSharing: false,
    staleTime: Infinity,
  });

/** A stored map of an ensemble, decoded. */
export const ensembleMapQuery = (comparison: Comparison, option: number, outlook: number, map: string) => {
  const { siteId, id: comparisonId, ensembles, grid } = comparison;
  const shown = ensembles.find((e) => e.option === option && e.outlook === outlook)?.maps[map];
  return queryOptions({
    queryKey: [...comparisonKey(siteId, comparisonId), 'map', option, outlook, map, shown],
    queryFn: async ({ signal }) => {
      const params = { siteId, comparisonId, option, outlook, map };
      const packed = await fetchBlob(getEnsembleMap, { params, signal });
      const { values } = await cells.unpack(packed, { cells: grid.width * grid.height });
      return values as Uint8Array | Int16Array;
    },
    enabled: shown !== undefined,
    structuralSharing: false,
    staleTime: Infinity,
    gcTime: 60_000,
  });
};

/** After a change: the reply is what the comparison looks like now, and the lists of its site are asked for again. */
export function keepComparison(queryClient: QueryClient, comparison: Comparison): void {
  queryClient.setQueryData<Comparison>(comparisonKey(comparison.siteId, comparison.id), comparison);
  void queryClient.invalidateQueries({ queryKey: [...siteKey(comparison.siteId), 'comparisons'] });
}

/** After one is deleted. */
export function dropComparison(
  queryClient: QueryClient,
  { siteId, id }: Pick<Comparison, 'siteId' | 'id'>,
): void {
  queryClient.removeQueries({ queryKey: comparisonKey(siteId, id) });
  void queryClient.invalidateQueries({ queryKey: [...siteKey(siteId), 'comparisons'] });
}
