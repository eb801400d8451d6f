import { queryOptions } from '@tanstack/react-query';
import { getStudyRuns, putStudyRuns } from '#contract/studies.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { siteKey } from '#app/lib/site-cache.ts';
import type { StudyRun } from '#sim-core/spec/study-run.ts';

/** An option of a comparison under one of its outlooks, by their places in the plan. */
export interface StudiedEnsemble {
  readonly siteId: string;
  readonly comparisonId: string;
  readonly option: number;
  readonly outlook: number;
}

/** Study runs by the key of what decides them. */
export type StudyRuns = ReadonlyMap<string, StudyRun>;

export async function fetchStudyRuns(params: StudiedEnsemble, signal?: AbortSignal): Promise<StudyRuns> {
  const found = new Map<string, StudyRun>();
  for (let offset = 0; ;) {
    const { runs, total } = await callEndpoint(getStudyRuns, {
      params: { ...params },
      query: { offset, limit: 500 },
      signal,
    });
    for (const { key, run } of runs) found.set(key, run);
    offset += runs.length;
    if (offset >= total || runs.length === 0) return found;
  }
}

/** All stored study runs of an option. What this tab makes meanwhile is known to its studies. */
export const studyRunsQuery = (ensemble: StudiedEnsemble) =>
  queryOptions({
    queryKey: [
      ...siteKey(ensemble.siteId),
      'study-runs',
      ensemble.comparisonId,
      ensemble.option,
      ensemble.outlook,
    ],
    queryFn: ({ signal }) => fetchStudyRuns(ensemble, signal),
    structuralSharing: false,
  });

/** Where the runs of a study are kept. */
export interface StudyServer {
  put(ensemble: StudiedEnsemble, runs: StudyRun[], signal: AbortSignal): Promise<void>;
}

export const studyServer: StudyServer = {
  put: async (params, runs, signal) => {
    await callEndpoint(putStudyRuns, { params: { ...params }, body: { runs }, signal });
  },
};
