import { useQuery } from '@tanstack/react-query';
import { useParams } from 'react-router-dom';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { fitQuery } from '#app/features/fits/get-fit.ts';
import { FitView } from './fit-view.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** One fit. */
export function Page() {
  const { site } = useSite();
  const { fitId = '' } = useParams();
  const fit = useQuery(fitQuery(site.id, fitId));
  if (fit.data) return <FitView key={fitId} fit={fit.data} />;
  return (
    <SitePage step="plant" title="Fit">
      {fit.error ? (
        <ProblemNotice error={fit.error} title="The fit could not be fetched." />
      ) : (
        <LoadingLines label="Fetching the fit" lines={6} />
      )}
    </SitePage>
  );
}
