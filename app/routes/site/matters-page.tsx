import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { NotFound } from '#app/components/message-page.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { comparisonQuery } from '#app/features/comparisons/get-comparison.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { PageTop } from '../shell/paper-page.tsx';
import { MattersView } from './matters-view.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** What matters to a comparison: which rate decides, and which is worth measuring better. */
export function Page() {
  const { site } = useSite();
  const comparisonId = useParams().comparisonId ?? '';
  const comparison = useQuery(comparisonQuery(site.id, comparisonId));
  if (comparison.data) return <MattersView key={comparisonId} comparison={comparison.data} />;
  const status = comparison.error instanceof ProblemError ? comparison.error.status : undefined;
  if (status !== undefined && [400, 403, 404].includes(status))
    return <NotFound top={<PageTop />} what="comparison" />;
  return (
    <SitePage step="compare" title="What matters">
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
