import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Comparison } from '#contract/comparisons.ts';
import { CautionList } from '#app/components/caution-list.tsx';
import { MenuItem } from '#app/components/menu.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { goOnInCopy, recordDecision, reopenComparison } from '#app/features/comparisons/change-comparison.ts';
import { isWorking } from '#app/features/comparisons/comparison-manager.ts';
import { standingWords } from '#app/features/comparisons/comparison-words.ts';
import { DecisionBox } from '#app/features/comparisons/decision-box.tsx';
import { EventList } from '#app/features/comparisons/event-list.tsx';
import { keepComparison, replicatesQuery } from '#app/features/comparisons/get-comparison.ts';
import { useLivePart, useLiveVersion } from '#app/features/comparisons/live-comparisons.ts';
import { SummaryLine } from '#app/features/comparisons/summary-line.tsx';
import { UncertainRates } from '#app/features/comparisons/uncertain-rates.tsx';
import { useComparisonFigures } from '#app/features/comparisons/use-comparison-figures.ts';
import { costsQuery } from '#app/features/options/costs/site-costs.ts';
import type { KnownRecords } from '#sim-core/compare/known-records.ts';
import { ComparisonDeeds } from './comparison-deeds.tsx';
import { ComparisonFiles } from './comparison-files.tsx';
import { GoOn } from './comparison-go-on.tsx';
import { useWorkOnComparison, wasAtWork } from './comparison-ground.ts';
import { OnTrack } from './comparison-on-track.tsx';
import { ComparisonMaps } from './comparison-maps.tsx';
import { ComparisonProgress } from './comparison-progress.tsx';
import { ComparisonAnswers, ComparisonCharts } from './comparison-results.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** A comparison: what it says in a sentence, maps locked together, each option's answer, and the decision. */
export function ComparisonView({ comparison }: { comparison: Comparison }) {
  const { site, mayDraw, role } = useSite();
  const { plan, id, decision } = comparison;
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const workOn = useWorkOnComparison();
  const [outlook, setOutlook] = useState(0);
  const [filing, setFiling] = useState(false);
  const phase = useLivePart(id, 'phase');
  const records = useLivePart(id, 'records');
  const version = useLiveVersion(id, 3000);
  const working = isWorking(phase);
  const stored = useQuery({ ...replicatesQuery(comparison), enabled: !phase || phase === 'loading' });
  const costs = useQuery(costsQuery(site.id)).data;

  // A tab that was at work when it was loaded anew goes on by itself, once.
  const tried = useRef(false);
  useEffect(() => {
    if (tried.current || phase || comparison.status !== 'running' || !mayDraw) return;
    tried.current = true;
    if (wasAtWork(id)) workOn(comparison);
  }, [comparison, id, phase, mayDraw, workOn]);

  // While this tab fetches what is stored, the page keeps showing it.
  const atHand = phase && phase !== 'loading' ? records : undefined;
  const known: KnownRecords | undefined = useMemo(
    () =>
      atHand ??
      stored.data?.map((option) =>
        option.map((all) => new Map(all.map((record) => [record.replicate, record]))),
      ),
    [atHand, stored.data],
  );
  const figures = useComparisonFigures(comparison, known, version);
  const counted = { ...comparison, done: Math.max(comparison.done, figures?.outlooks[0]?.replicates ?? 0) };
  const shown = figures?.outlooks[Math.min(outlook, plan.outlooks.length - 1)];
  const place = plan.options.findIndex(({ optionId }) => optionId === decision?.optionId);
  const chosen = place < 0 ? undefined : place;

  const onSaved = (saved: Comparison) => keepComparison(queryClient, saved);
  const reopen = useMutation({
    mutationFn: (replicates: number) => reopenComparison(comparison, replicates),
    onSuccess: (saved) => {
      onSaved(saved);
      workOn(saved);
    },
  });
  const decide = useMutation({
    mutationFn: (draft: { optionId: string; reason: string; reservations: string }) =>
      recordDecision(comparison, draft),
    onSuccess: (saved) => {
      onSaved(saved);
      sayDone('Decision recorded; the comparison is frozen');
    },
  });
  const copy = useMutation({
    mutationFn: () => goOnInCopy(comparison, `${comparison.name.slice(0, 110)}, copy`, plan.replicates),
    onSuccess: (saved) => {
      onSaved(saved);
      void navigate(`/sites/${site.id}/compare/${saved.id}`);
    },
  });
  const decides = role === 'manager' || role === 'admin';
  return (
    <SitePage step="compare" title={comparison.name}>
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-1 border-b border-ink pb-2">
        <div className="min-w-0">
          <WordLink to={`/sites/${site.id}/compare`} plain>
            All comparisons
          </WordLink>
          <h1 className="text-title font-bold break-words">{comparison.name}</h1>
        </div>
        <p className="flex flex-wrap items-baseline gap-x-5">
          <span className="text-note text-ink-2">{standingWords(counted, phase)}</span>
          <WordLink to={`/sites/${site.id}/compare/${id}/matters`}>What matters</WordLink>
          <ComparisonDeeds
            comparison={counted}
            trigger={<WordButton lined>More</WordButton>}
            working={working}
            onDeleted={() => void navigate(`/sites/${site.id}/compare`)}
          >
            {figures && shown && <MenuItem onSelect={() => setFiling(true)}>Text and figures</MenuItem>}
          </ComparisonDeeds>
        </p>
      </div>
      <ComparisonProgress comparisonId={id} />
      {!working && mayDraw && decision === null && (
        <GoOn
          comparison={counted}
          paused={phase === 'paused' || phase === 'failed'}
          busy={reopen.isPending}
          error={reopen.error}
          onResume={() => workOn(comparison)}
          onMore={(replicates) => reopen.mutate(replicates)}
        />
      )}
      {decision !== null && mayDraw && (
        <div className="border-b border-rule py-2">
          <WordButton lined onClick={() => copy.mutate()}>
            Go on in a copy
          </WordButton>
          {copy.error ? <ProblemNotice error={copy.error} title="Not copied." className="mt-2" /> : null}
        </div>
      )}
      <div className="pt-3">
        <CautionList cautions={comparison.cautions} found="found when it was started" />
      </div>
      <UncertainRates uncertain={plan.common.uncertain} />
      {plan.outlooks.length > 1 && (
        <div className="pt-3">
          <WordChoice
            label="Under"
            showLabel
            options={plan.outlooks.map(({ name }, i) => ({ key: String(i), label: name }))}
            value={String(outlook)}
            onChange={(key) => setOutlook(Number(key))}
          />
        </div>
      )}
      {shown && <SummaryLine figures={shown} />}
      <ComparisonMaps
        {...{ comparison, outlook, chosen, version }}
        live={phase !== undefined && phase !== 'loading'}
        figures={shown}
      />
      {stored.error && !phase ? (
        <ProblemNotice error={stored.error} title="The futures could not be fetched.">
          <WordButton lined onClick={() => void stored.refetch()}>
            Try again
          </WordButton>
        </ProblemNotice>
      ) : null}
      {shown && figures && known ? (
        <>
          <ComparisonAnswers {...{ comparison, outlook, known, chosen }} figures={shown} />
          {!working && (
            <OnTrack
              {...{ comparison, known, chosen }}
              outlook={Math.min(outlook, plan.outlooks.length - 1)}
            />
          )}
          <div className="grid gap-x-10 gap-y-8 border-t border-ink pt-4 lg:grid-cols-2">
            <ComparisonCharts {...{ comparison, figures, shown, chosen }} today={costs} />
            <div className="grid content-start gap-6">
              <DecisionBox
                comparison={counted}
                mayDecide={decides && !working}
                working={working && decides}
                busy={decide.isPending}
                error={decide.error}
                onDecide={(draft) => decide.mutate(draft)}
                onFiles={() => setFiling(true)}
              />
              <EventList events={comparison.events} />
            </div>
          </div>
        </>
      ) : (
        <p className="py-6 text-ink-2" role="status">
          {known === undefined
            ? 'Fetching the futures.'
            : 'The figures show with the first future of every option.'}
        </p>
      )}
      {filing && figures && (
        <ComparisonFiles {...{ comparison, figures }} siteName={site.name} onClose={() => setFiling(false)} />
      )}
    </SitePage>
  );
}
