import { useQuery } from '@tanstack/react-query';
import { Outlet, useParams } from 'react-router-dom';
import { Button } from '#app/components/button.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { MessagePage, NotFound } from '#app/components/message-page.tsx';
import { briefsQuery } from '#app/features/briefs/briefs-query.ts';
import { comparisonsQuery } from '#app/features/comparisons/get-comparison.ts';
import { runsQuery } from '#app/features/runs/list-runs.ts';
import { roleIn, sessionQuery } from '#app/features/session/session.ts';
import { siteQuery } from '#app/features/sites/get-site.ts';
import { siteSteps } from '#app/features/sites/site-steps.ts';
import { errorText, ProblemError } from '#app/lib/api-client.ts';
import { PageTop } from '../shell/paper-page.tsx';
import type { SiteContext } from './use-site.ts';

/** Stands around the pages of a site: fetches it once, and says so where there is none to see. */
export function Page() {
  const siteId = useParams().siteId ?? '';
  const site = useQuery(siteQuery(siteId));
  const runs = useQuery(runsQuery(siteId));
  const comparisons = useQuery(comparisonsQuery(siteId));
  const briefs = useQuery(briefsQuery(siteId));
  const session = useQuery(sessionQuery).data;
  // An address whose id is no id at all is refused as an invalid request; to a reader it is the same.
  const status = site.error instanceof ProblemError ? site.error.status : 0;
  if ([400, 403, 404].includes(status)) return <NotFound top={<PageTop />} what="site" />;
  // What was known last stays in use while it is asked again: an outage must not take a page away.
  if (site.data !== undefined) {
    const role = roleIn(session, site.data.teamId);
    const membership = session?.memberships.find(({ teamId }) => teamId === site.data.teamId);
    if (role === undefined || membership === undefined) return <NotFound top={<PageTop />} what="site" />;
    const mayKeepGround = role === 'modeller' || role === 'admin';
    const context: SiteContext = {
      site: site.data,
      teamName: membership.teamName,
      role,
      steps: siteSteps(site.data, runs.data?.runs, comparisons.data?.comparisons, briefs.data),
      mayKeepGround,
      mayDraw: mayKeepGround || role === 'manager',
    };
    return <Outlet key={siteId} context={context} />;
  }
  if (site.isPending) return <Opening />;
  return (
    <MessagePage
      top={<PageTop />}
      title="This site could not be opened"
      actions={<Button onClick={() => void site.refetch()}>Try again</Button>}
    >
      {errorText(site.error)}
    </MessagePage>
  );
}

/** Keeps the head's height while the site is on its way, so that nothing jumps when it is there. */
function Opening() {
  return (
    <div>
      <div className="h-[67px] border-b border-ink lg:h-[57px]" />
      <main className="max-w-[360px] px-4 pt-6 lg:px-6">
        <LoadingLines label="Opening the site" />
      </main>
    </div>
  );
}
