import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate, useSearchParams } from 'react-router-dom';
import { EmptyState } from '#app/components/empty-state.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { optionsQuery } from '#app/features/options/list-options.ts';
import { registerRunMutation } from '#app/features/runs/change-run.ts';
import { runsQuery } from '#app/features/runs/list-runs.ts';
import { runManager, useLiveRuns } from '#app/features/runs/live-runs.ts';
import { isAtWork } from '#app/features/runs/run-manager.ts';
import { RunTable } from '#app/features/runs/run-table.tsx';
import { StartForm } from '#app/features/runs/start-form.tsx';
import { formatCounted } from '#app/lib/formats.ts';
import { RunDeed, type AskedDeed } from './run-deed.tsx';
import { useStartParts } from './run-ground.ts';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';
import { WatchStep } from './watch-step.tsx';

const pageLength = 50;

/** The runs of a site: start one, see how they stand, open one. */
export function Page() {
  const { site, mayDraw } = useSite();
  const [search] = useSearchParams();
  const [limit, setLimit] = useState(pageLength);
  const live = useLiveRuns().filter(({ siteId }) => siteId === site.id);
  const options = useQuery(optionsQuery(site.id));
  const runs = useQuery({
    ...runsQuery(site.id, limit === pageLength ? undefined : { limit }),
    placeholderData: (before) => before,
    // What another tab works on is seen to proceed.
    refetchInterval: (query) =>
      query.state.data?.runs.some(
        ({ id, status }) => status === 'running' && !live.some((l) => l.runId === id),
      )
        ? 5000
        : false,
  });
  const register = useMutation(registerRunMutation(useQueryClient(), site.id));
  const partsOf = useStartParts();
  const navigate = useNavigate();
  const [asked, setAsked] = useState<AskedDeed>();

  const listed = runs.data?.runs ?? [];
  const total = runs.data?.total ?? 0;
  const waitId = options.data?.find(({ wait }) => wait)?.id;
  const startId = search.get('start') ?? undefined;
  return (
    <SitePage step="runs">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 border-b border-ink pb-2">
        <h1 className="text-title font-bold">Runs</h1>
        <p className="text-note text-ink-2">
          Each is one simulated future of one option; what decides it is kept, so that it can be run again.
        </p>
      </div>
      <section className="border-b border-ink py-4">
        {!mayDraw ? (
          <>
            <p className="mb-2.5 text-ink-2">
              Modellers, managers and admins start runs. Watch one year by year, or run it again to check it.
            </p>
            <div className="flex flex-wrap gap-3">
              <WatchStep first="run" />
            </div>
          </>
        ) : options.data ? (
          <StartForm
            key={startId ?? 'first'}
            {...{ site, startId }}
            options={options.data.filter(({ archived, id }) => !archived || id === startId)}
            waitRun={listed.find(({ optionId, status }) => status === 'finished' && optionId === waitId)}
            names={listed.map(({ name }) => name)}
            busy={register.isPending}
            error={register.error}
            onStart={(body) =>
              register.mutate(body, {
                onSuccess: (run) => {
                  runManager.start(partsOf(run));
                  void navigate(`/sites/${site.id}/runs/${run.id}`);
                },
              })
            }
          />
        ) : options.error ? (
          <ProblemNotice error={options.error} title="The options could not be fetched." />
        ) : (
          <LoadingLines label="Fetching the options" />
        )}
      </section>
      <section aria-label="Runs so far" className="pt-4">
        {runs.data === undefined ? (
          runs.error ? (
            <ProblemNotice error={runs.error} title="The runs could not be fetched.">
              <WordButton lined onClick={() => void runs.refetch()}>
                Try again
              </WordButton>
            </ProblemNotice>
          ) : (
            <LoadingLines label="Fetching the runs" lines={4} />
          )
        ) : listed.length === 0 ? (
          <EmptyState title="No runs yet.">
            Run Wait first: every option is measured against it. With the same seed both share their luck.
          </EmptyState>
        ) : (
          <>
            <p className="mb-2 text-note text-ink-2">
              {formatCounted(total, 'run')}
              {live.some(isAtWork) && `, ${live.filter(isAtWork).length} at work in this tab`}
            </p>
            <RunTable
              runs={listed}
              live={live}
              mayChange={mayDraw}
              onRename={(run) => setAsked({ deed: 'rename', run })}
              onDelete={(run) => setAsked({ deed: 'delete', run })}
              onStop={(run) => setAsked({ deed: 'stop', run })}
            />
            {total > listed.length && limit < 100 && (
              <WordButton lined className="mt-3" onClick={() => setLimit(100)}>
                Show more
              </WordButton>
            )}
          </>
        )}
      </section>
      {asked && <RunDeed asked={asked} onClose={() => setAsked(undefined)} />}
    </SitePage>
  );
}
