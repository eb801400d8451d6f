import { useQuery } from '@tanstack/react-query';
import { useParams, useSearchParams } from 'react-router-dom';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { NotFound } from '#app/components/message-page.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { briefQuery } from '#app/features/briefs/briefs-query.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { PageTop } from '../shell/paper-page.tsx';
import { BriefView } from './brief-view.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** One brief: its page as it prints, written in place, its versions, and to whom it was sent. */
export function Page() {
  const { site } = useSite();
  const briefId = useParams().briefId ?? '';
  const asked = Number(useSearchParams()[0].get('version') ?? Number.NaN);
  const brief = useQuery(briefQuery(site.id, briefId, Number.isInteger(asked) ? asked : undefined));
  if (brief.data) return <BriefView key={`${briefId} ${asked}`} brief={brief.data} />;
  const status = brief.error instanceof ProblemError ? brief.error.status : undefined;
  if (status !== undefined && [400, 403, 404].includes(status))
    return <NotFound top={<PageTop />} what="brief" />;
  return (
    <SitePage step="brief" title="Brief">
      {brief.error ? (
        <ProblemNotice error={brief.error} title="The brief could not be fetched.">
          <WordButton lined onClick={() => void brief.refetch()}>
            Try again
          </WordButton>
        </ProblemNotice>
      ) : (
        <LoadingLines label="Fetching the brief" lines={6} />
      )}
    </SitePage>
  );
}
