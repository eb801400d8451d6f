import { useQueries, useQuery } from '@tanstack/react-query';
import { EmptyState } from '#app/components/empty-state.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { LinkButton } from '#app/components/link-button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Section } from '#app/components/paper-layout.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { comparisonsQuery } from '#app/features/comparisons/get-comparison.ts';
import { runsQuery } from '#app/features/runs/list-runs.ts';
import { sessionQuery } from '#app/features/session/session.ts';
import { sitesQuery } from '#app/features/sites/list-sites.ts';
import type { Role } from '#contract/people.ts';
import type { RunSummary } from '#contract/runs.ts';
import type { SiteSummary } from '#contract/sites.ts';
import { PaperPage } from '../shell/paper-page.tsx';
import { AttentionList } from './attention-list.tsx';
import { SiteRow } from './site-row.tsx';

export function Page() {
  const memberships = useQuery(sessionQuery).data?.memberships ?? [];
  const lists = useQueries({ queries: memberships.map(({ teamId }) => sitesQuery(teamId)) });
  const teams = memberships.map((membership, i) => ({ ...membership, list: lists[i] }));
  const mine = teams.flatMap(({ role, list }) => (list.data ?? []).map((site) => ({ site, role })));
  const withRuns = mine.filter(({ site }) => site.runs > 0);
  const runLists = useQueries({ queries: withRuns.map(({ site }) => runsQuery(site.id, { limit: 20 })) });
  const latest = new Map(
    withRuns.map(({ site }, i) => [site.id, runLists[i].data?.runs.find((run) => run.status === 'finished')]),
  );
  const unfinished = withRuns.flatMap(({ site }, i) =>
    (runLists[i].data?.runs ?? []).filter((run) => run.status === 'running').map((run) => ({ site, run })),
  );

  const comparisonLists = useQueries({
    queries: mine.map(({ site }) => comparisonsQuery(site.id, { limit: 20 })),
  });
  const undecided = mine.flatMap(({ site, role }, i) =>
    (comparisonLists[i].data?.comparisons ?? [])
      // A copy waits for somebody to go on with it, not for a decision.
      .filter(({ decision, ending, done }) => decision === null && ending !== null && done > 1)
      .map((comparison) => ({ site, role, comparison })),
  );

  return (
    <PaperPage title="Sites">
      <AttentionList sites={mine} unfinished={unfinished} undecided={undecided} />
      {teams.map(({ teamId, teamName, role, list }) => (
        <Section key={teamId} title={teamName} note={`You are ${role} here`}>
          {list.isPending && <LoadingLines label="Fetching the team’s sites" />}
          {list.isError && (
            <ProblemNotice error={list.error} title="The sites of this team did not come.">
              <WordButton lined onClick={() => void list.refetch()}>
                Try again
              </WordButton>
            </ProblemNotice>
          )}
          {list.isSuccess && <TeamSites teamId={teamId} role={role} sites={list.data} latest={latest} />}
        </Section>
      ))}
      {memberships.length === 0 && (
        <EmptyState title="You are in no team.">
          Open the link of an invite, or found a team of your own under Account.
        </EmptyState>
      )}
    </PaperPage>
  );
}

function TeamSites(props: {
  teamId: string;
  role: Role;
  sites: readonly SiteSummary[];
  /** the latest finished run of each site that has one */
  latest: ReadonlyMap<string, RunSummary | undefined>;
}) {
  const mayMake = props.role === 'modeller' || props.role === 'admin';
  const path = `/teams/${props.teamId}/new-site`;
  if (props.sites.length === 0) {
    return (
      <EmptyState
        title="No sites yet."
        action={
          mayMake && (
            <LinkButton kind="primary" to={path}>
              New site
            </LinkButton>
          )
        }
      >
        {mayMake
          ? 'A site starts from one GeoTIFF: its coordinate system, cell size and extent become the working grid.'
          : 'A modeller or an admin of the team makes them, from a GeoTIFF.'}
      </EmptyState>
    );
  }
  return (
    <>
      <ul>
        {props.sites.map((site) => (
          <SiteRow key={site.id} site={site} latest={props.latest.get(site.id)} />
        ))}
      </ul>
      {mayMake && (
        <div className="mt-4">
          <LinkButton to={path}>New site</LinkButton>
        </div>
      )}
    </>
  );
}
