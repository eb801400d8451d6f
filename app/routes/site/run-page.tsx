import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { NotFound } from '#app/components/message-page.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { runQuery } from '#app/features/runs/get-run.ts';
import { useLiveRun } from '#app/features/runs/live-runs.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { PageTop } from '../shell/paper-page.tsx';
import { RunView } from './run-view.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** One run: as it grows, or replayed. */
export function Page() {
  const { site } = useSite();
  const runId = useParams().runId ?? '';
  const live = useLiveRun(runId);
  const run = useQuery({
    ...runQuery(runId),
    // Another tab may be at work on it: its frames show as they come.
    refetchInterval: (query) => (query.state.data?.status === 'running' && !live ? 4000 : false),
  });
  if (run.data?.siteId === site.id) return <RunView key={runId} run={run.data} live={live} />;
  const status = run.error instanceof ProblemError ? run.error.status : undefined;
  if (run.data || (status !== undefined && [400, 403, 404].includes(status)))
    return <NotFound top={<PageTop />} what="run" />;
  return (
    <SitePage
      step="runs"
      title="Run"
      map={<div className="size-full" />}
      margin={
        run.error ? (
          <ProblemNotice error={run.error} title="The run could not be fetched.">
            <WordButton lined onClick={() => void run.refetch()}>
              Try again
            </WordButton>
          </ProblemNotice>
        ) : (
          <LoadingLines label="Fetching the run" lines={5} />
        )
      }
    />
  );
}
