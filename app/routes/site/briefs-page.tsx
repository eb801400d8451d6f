import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Link, useNavigate } from 'react-router-dom';
import { Button } from '#app/components/button.tsx';
import { EmptyState } from '#app/components/empty-state.tsx';
import { SelectField } from '#app/components/inputs.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Table } from '#app/components/table.tsx';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import { briefsQuery, keepBrief } from '#app/features/briefs/briefs-query.ts';
import { beginBrief } from '#app/features/briefs/change-brief.ts';
import { comparisonsQuery } from '#app/features/comparisons/get-comparison.ts';
import { formatCounted, formatDateTime } from '#app/lib/formats.ts';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** The briefs of a site: make one of a comparison, open one. */
export function Page() {
  const { site, mayDraw } = useSite();
  const briefs = useQuery(briefsQuery(site.id));
  const listed = briefs.data ?? [];
  return (
    <SitePage step="brief">
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 border-b border-ink pb-2">
        <h1 className="text-title font-bold">Brief</h1>
        <p className="text-note text-ink-2">
          One page for people who decide, and an annex that others can check.
        </p>
      </div>
      {mayDraw ? (
        <MakeBrief />
      ) : (
        <p className="border-b border-ink py-4 text-ink-2">
          Modellers, managers and admins make briefs; you can read each below.
        </p>
      )}
      <section aria-label="Briefs so far" className="pt-4">
        {briefs.data === undefined ? (
          briefs.error ? (
            <ProblemNotice error={briefs.error} title="The briefs could not be fetched.">
              <WordButton lined onClick={() => void briefs.refetch()}>
                Try again
              </WordButton>
            </ProblemNotice>
          ) : (
            <LoadingLines label="Fetching the briefs" lines={3} />
          )
        ) : listed.length === 0 ? (
          <EmptyState title="No briefs yet.">
            A brief is made of a comparison: its words follow from the figures and are yours to change.
          </EmptyState>
        ) : (
          <Table
            caption="Briefs of this site, the one changed last first"
            rows={listed}
            rowKey={({ id }) => id}
            columns={[
              {
                key: 'title',
                head: 'brief',
                cell: ({ id, title, comparisonName }) => (
                  <>
                    <Link
                      to={`/sites/${site.id}/briefs/${id}`}
                      className="inline-block min-h-6 text-body font-bold break-words touch:min-h-11"
                    >
                      {title}
                    </Link>
                    <span className="block text-note text-ink-2">of the comparison “{comparisonName}”</span>
                  </>
                ),
              },
              {
                key: 'state',
                head: 'how it stands',
                cell: ({ version, decided, sent }) => (
                  <>
                    <b className="text-body font-semibold">
                      version {version}, {decided ? 'decided' : 'decision open'}
                    </b>
                    <span className="block text-note text-ink-2">
                      {sent === 0 ? 'not sent' : `sent to ${formatCounted(sent, 'person', 'people')}`}
                    </span>
                  </>
                ),
              },
              {
                key: 'changed',
                head: 'changed',
                wide: true,
                cell: ({ changedAt, changedBy }) => `${formatDateTime(changedAt)} by ${changedBy}`,
              },
            ]}
          />
        )}
      </section>
    </SitePage>
  );
}

/** Makes a brief of a comparison that has futures. */
function MakeBrief() {
  const { site } = useSite();
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const comparisons = useQuery(comparisonsQuery(site.id));
  const ready = (comparisons.data?.comparisons ?? []).filter(({ done }) => done >= 2);
  // Decided ones first: these wait to be handed over.
  const offered = [
    ...ready.filter(({ decision }) => decision !== null),
    ...ready.filter(({ decision }) => decision === null),
  ];
  const [chosen, setChosen] = useState<string>();
  const comparisonId = chosen ?? offered[0]?.id;
  const make = useMutation({
    mutationFn: (id: string) => beginBrief(site.id, id),
    onSuccess: (brief) => {
      keepBrief(queryClient, brief);
      void navigate(`/sites/${site.id}/briefs/${brief.id}`);
    },
  });
  return (
    <section aria-label="Make a brief" className="border-b border-ink py-4">
      {comparisons.data === undefined ? (
        comparisons.error ? (
          <ProblemNotice error={comparisons.error} title="The comparisons could not be fetched." />
        ) : (
          <LoadingLines label="Fetching the comparisons" />
        )
      ) : comparisonId === undefined ? (
        <p>
          A brief rests on a comparison with at least two futures of every option, and there is none yet.{' '}
          <WordLink to={`/sites/${site.id}/compare`}>Compare options first</WordLink>
        </p>
      ) : (
        <div className="flex flex-wrap items-end gap-3">
          <SelectField
            label="Of the comparison"
            className="w-full max-w-[420px]"
            value={comparisonId}
            onChange={(event) => setChosen(event.target.value)}
          >
            {offered.map(({ id, name, done, decision }) => (
              <option key={id} value={id}>
                {name}, {decision ? `decided: ${decision.optionName}` : `${done} futures, decision open`}
              </option>
            ))}
          </SelectField>
          <Button
            kind="primary"
            busy={make.isPending}
            busyLabel="Working out its figures"
            onClick={() => make.mutate(comparisonId)}
          >
            Make a brief
          </Button>
          {make.error ? (
            <ProblemNotice error={make.error} title="No brief was made." className="basis-full" />
          ) : null}
        </div>
      )}
    </section>
  );
}
