import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { Link, useNavigate } from 'react-router-dom';
import { EmptyState } from '#app/components/empty-state.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Table } from '#app/components/table.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { registerComparison, type StartBody } from '#app/features/comparisons/change-comparison.ts';
import { isWorking } from '#app/features/comparisons/comparison-manager.ts';
import { standingWords } from '#app/features/comparisons/comparison-words.ts';
import { comparisonsQuery, keepComparison } from '#app/features/comparisons/get-comparison.ts';
import { useLiveComparisons } from '#app/features/comparisons/live-comparisons.ts';
import { ComparisonStartForm } from '#app/features/comparisons/start-form.tsx';
import { costsQuery } from '#app/features/options/costs/site-costs.ts';
import { optionCost } from '#app/features/options/list/option-costs.ts';
import { optionsQuery } from '#app/features/options/list-options.ts';
import { composeRunSpec } from '#app/features/runs/compose-run-spec.ts';
import { CompositionProblems } from '#app/features/runs/composition-problems.tsx';
import { randomSeed } from '#app/features/runs/random-seed.ts';
import { estimateSeconds } from '#app/features/runs/run-pace.ts';
import { formatDateTime } from '#app/lib/formats.ts';
import { ComparisonDeeds } from './comparison-deeds.tsx';
import { useWorkOnComparison } from './comparison-ground.ts';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';
import { WatchStep } from './watch-step.tsx';

/** The comparisons of a site: start one, see how they stand, open one. */
export function Page() {
  const { site, mayDraw } = useSite();
  const queryClient = useQueryClient();
  const options = useQuery(optionsQuery(site.id));
  const costs = useQuery(costsQuery(site.id)).data;
  const comparisons = useQuery(comparisonsQuery(site.id));
  const live = useLiveComparisons();
  const workOn = useWorkOnComparison();
  const navigate = useNavigate();
  const start = useMutation({
    mutationFn: (body: StartBody) => registerComparison(site.id, body),
    onSuccess: (comparison) => {
      keepComparison(queryClient, comparison);
      workOn(comparison);
      void navigate(`/sites/${site.id}/compare/${comparison.id}`);
    },
  });
  const listed = comparisons.data?.comparisons ?? [];
  const cells = site.grid.width * site.grid.height;
  const steps = site.outlook.years * site.outlook.stepsPerYear;
  return (
    <SitePage step="compare">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 border-b border-ink pb-2">
        <h1 className="text-title font-bold">Compare</h1>
        <p className="text-note text-ink-2">
          Many futures of several options under the same luck: which one, and how sure.
        </p>
      </div>
      <section className="border-b border-ink py-4">
        {!mayDraw ? (
          <>
            <p className="mb-2.5 text-ink-2">
              Modellers, managers and admins start comparisons. Open one, or watch a single future of it.
            </p>
            <div className="flex flex-wrap gap-3">
              <WatchStep first="comparison" />
            </div>
          </>
        ) : options.data ? (
          <ComparisonStartForm
            site={site}
            options={options.data.filter(({ archived }) => !archived)}
            compose={(option, mode, seed) =>
              composeRunSpec(site, option, { mode, seed, keepGrazers: true }).spec
            }
            problems={(option, mode, seed) => (
              <CompositionProblems
                problems={composeRunSpec(site, option, { mode, seed, keepGrazers: true }).problems ?? []}
                site={site}
                optionId={option.id}
              />
            )}
            costOf={(option) => (costs?.changedAt ? optionCost(site, costs.costs, option.works) : null)}
            unitCosts={costs?.changedAt ? costs.costs : null}
            secondsOf={(mode) => estimateSeconds(mode, cells, steps)}
            drawSeed={randomSeed}
            names={listed.map(({ name }) => name)}
            busy={start.isPending}
            error={start.error}
            onStart={(body) => start.mutate(body)}
          />
        ) : options.error ? (
          <ProblemNotice error={options.error} title="The options could not be fetched." />
        ) : (
          <LoadingLines label="Fetching the options" />
        )}
      </section>
      <section aria-label="Comparisons so far" className="pt-4">
        {comparisons.data === undefined ? (
          comparisons.error ? (
            <ProblemNotice error={comparisons.error} title="The comparisons could not be fetched.">
              <WordButton lined onClick={() => void comparisons.refetch()}>
                Try again
              </WordButton>
            </ProblemNotice>
          ) : (
            <LoadingLines label="Fetching the comparisons" lines={4} />
          )
        ) : listed.length === 0 ? (
          <EmptyState title="No comparisons yet.">
            Wait is one of the options: what works gain is what they gain over waiting.
          </EmptyState>
        ) : (
          <Table
            caption="Comparisons of this site, newest first"
            rows={listed}
            rowKey={({ id }) => id}
            columns={[
              {
                key: 'name',
                head: 'comparison',
                cell: ({ id, name, options: names, startedAt, startedBy }) => (
                  <>
                    <Link
                      to={`/sites/${site.id}/compare/${id}`}
                      className="inline-block min-h-6 touch:min-h-11 text-body font-bold"
                    >
                      {name}
                    </Link>
                    <span className="block text-note text-ink-2">
                      {names.join(', ')}; started {formatDateTime(startedAt)} by {startedBy}
                    </span>
                  </>
                ),
              },
              {
                key: 'stands',
                head: 'how it stands',
                cell: (comparison) => (
                  <b className="text-body font-semibold">
                    {standingWords(
                      comparison,
                      live.find(({ comparisonId }) => comparisonId === comparison.id)?.phase,
                    )}
                  </b>
                ),
              },
              {
                key: 'deeds',
                head: <span className="sr-only">deeds</span>,
                cell: (comparison) => (
                  <ComparisonDeeds
                    comparison={comparison}
                    trigger={<WordButton aria-label={`More for ${comparison.name}`}>More</WordButton>}
                    working={live.some(
                      ({ comparisonId, phase }) => comparisonId === comparison.id && isWorking(phase),
                    )}
                    onDeleted={() => undefined}
                  />
                ),
              },
              {
                key: 'outlooks',
                head: 'outlooks',
                wide: true,
                cell: ({ outlooks }) => outlooks.join(', '),
              },
            ]}
          />
        )}
      </section>
    </SitePage>
  );
}
