import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { NotFound } from '#app/components/message-page.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { comparisonQuery } from '#app/features/comparisons/get-comparison.ts';
import { useLivePart } from '#app/features/comparisons/live-comparisons.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { PageTop } from '../shell/paper-page.tsx';
import { ComparisonView } from './comparison-view.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** One comparison: as it runs, or as it was left. */
export function Page() {
  const { site } = useSite();
  const comparisonId = useParams().comparisonId ?? '';
  const phase = useLivePart(comparisonId, 'phase');
  const comparison = useQuery({
    ...comparisonQuery(site.id, comparisonId),
    // Another tab may be at work on it.
    refetchInterval: (query) => (query.state.data?.status === 'running' && !phase ? 5000 : false),
  });
  if (comparison.data) return <ComparisonView key={comparisonId} comparison={comparison.data} />;
  const status = comparison.error instanceof ProblemError ? comparison.error.status : undefined;
  if (status !== undefined && [400, 403, 404].includes(status))
    return <NotFound top={<PageTop />} what="comparison" />;
  return (
    <SitePage step="compare" title="Comparison">
      {comparison.error ? (
        <ProblemNotice error={comparison.error} title="The comparison could not be fetched.">
          <WordButton lined onClick={() => void comparison.refetch()}>
            Try again
          </WordButton>
        </ProblemNotice>
      ) : (
        <LoadingLines label="Fetching the comparison" lines={6} />
      )}
    </SitePage>
  );
}
