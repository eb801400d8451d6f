import { queryOptions, type QueryClient } from '@tanstack/react-query';
import { getRun, type Run } from '#contract/runs.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { siteKey } from '#app/lib/site-cache.ts';

const runKey = (runId: string) => ['run', runId] as const;

/** A run with its spec, series and what is stored. */
export const runQuery = (runId: string) =>
  queryOptions({
    queryKey: runKey(runId),
    queryFn: ({ signal }) => callEndpoint(getRun, { params: { runId }, signal }),
    // A series of 500 years by month is not worth comparing row by row.
    structuralSharing: false,
  });

/** After a change: the reply is what the run looks like now, and the lists and counts of its site are asked for again. */
export function keepRun(queryClient: QueryClient, run: Run): void {
  queryClient.setQueryData<Run>(runKey(run.id), run);
  void queryClient.invalidateQueries({ queryKey: siteKey(run.siteId) });
}

export function forgetRun(queryClient: QueryClient, run: Pick<Run, 'id' | 'siteId'>): void {
  queryClient.removeQueries({ queryKey: runKey(run.id) });
  void queryClient.invalidateQueries({ queryKey: siteKey(run.siteId) });
}
