import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Comparison } from '#contract/comparisons.ts';
import { CautionList } from '#app/components/caution-list.tsx';
import { Button } from '#app/components/button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Progress } from '#app/components/progress.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import { WordChoice } from '#app/components/word-choice.tsx';
import { goOnInCopy, recordDecision, reopenComparison } from '#app/features/comparisons/change-comparison.ts';
import { useComparisonFigures } from '#app/features/comparisons/use-comparison-figures.ts';
import { isWorking, type LiveComparison } from '#app/features/comparisons/comparison-manager.ts';
import { standingWords } from '#app/features/comparisons/comparison-words.ts';
import { CostGain } from '#app/features/comparisons/cost-gain.tsx';
import { DecisionBox } from '#app/features/comparisons/decision-box.tsx';
import { EventList } from '#app/features/comparisons/event-list.tsx';
import type { KnownRecords } from '#sim-core/compare/known-records.ts';
import { FuturesLines } from '#app/features/comparisons/futures-lines.tsx';
import { keepComparison, replicatesQuery } from '#app/features/comparisons/get-comparison.ts';
import { comparisonManager } from '#app/features/comparisons/live-comparisons.ts';
import { LossTable } from '#app/features/comparisons/loss-table.tsx';
import { OptionAnswers } from '#app/features/comparisons/option-answers.tsx';
import { OutlookTable } from '#app/features/comparisons/outlook-table.tsx';
import { PairTable } from '#app/features/comparisons/pair-table.tsx';
import { RecoveryCurves } from '#app/features/comparisons/recovery-curves.tsx';
import { WeightsBox } from '#app/features/comparisons/weights-box.tsx';
import { costsQuery } from '#app/features/options/costs/site-costs.ts';
import { formatDuration } from '#app/lib/formats.ts';
import { useThrottled } from '#app/lib/use-throttled.ts';
import { ComparisonMaps } from './comparison-maps.tsx';
import { forgetWork, useWorkOnComparison, wasAtWork } from './comparison-ground.ts';
import { FutureAlone } from './future-alone.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** A comparison: maps locked together, what each option comes to, how sure that is, and the decision. */
export function ComparisonView({
  comparison,
  live,
}: {
  comparison: Comparison;
  live: LiveComparison | undefined;
}) {
  const { site, mayDraw, role } = useSite();
  const { plan } = comparison;
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const workOn = useWorkOnComparison();
  const [outlook, setOutlook] = useState(0);
  const stored = useQuery({ ...replicatesQuery(comparison), enabled: !live || live.phase === 'loading' });
  const costs = useQuery(costsQuery(site.id)).data;

  // A tab that was at work when it was loaded anew goes on by itself, once.
  const tried = useRef(false);
  useEffect(() => {
    if (tried.current || live || comparison.status !== 'running' || !mayDraw) return;
    tried.current = true;
    if (wasAtWork(comparison.id)) workOn(comparison);
  }, [comparison, live, mayDraw, workOn]);

  // While this tab fetches what is stored, the page keeps showing it.
  const atHand = live && live.phase !== 'loading' ? live.records : undefined;
  const known: KnownRecords | undefined = useMemo(
    () =>
      atHand ??
      stored.data?.map((option) =>
        option.map((records) => new Map(records.map((record) => [record.replicate, record]))),
      ),
    [atHand, stored.data],
  );
  const version = useThrottled(live?.version ?? 0, 1500);
  const figures = useComparisonFigures(comparison, known, version);
  const counted = { ...comparison, done: Math.max(comparison.done, figures?.outlooks[0]?.replicates ?? 0) };
  const shown = figures?.outlooks[Math.min(outlook, plan.outlooks.length - 1)];

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
  const working = isWorking(live);
  const left = live?.progress?.secondsLeft;
  return (
    <SitePage step="compare" title={comparison.name}>
      <div className="flex flex-wrap items-baseline justify-between gap-x-6 gap-y-1 border-b border-ink pb-2">
        <div>
          <WordLink to={`/sites/${site.id}/compare`} plain>
            All comparisons
          </WordLink>
          <h1 className="text-title font-bold">{comparison.name}</h1>
        </div>
        <p className="text-note text-ink-2">{standingWords(counted, live)}</p>
      </div>
      {live && working && live.phase !== 'saving' && (
        <div className="border-b border-rule py-3">
          <Progress
            label={
              live.phase === 'loading'
                ? 'Fetching what is stored'
                : `run ${live.progress?.runsDone ?? 0} of ${live.progress?.runs ?? '…'}${live.again > 0 ? `, of which ${live.again} are run again for their maps` : ''}`
            }
            done={live.progress?.stepsDone ?? 0}
            of={live.progress?.steps ?? 1}
            secondsLeft={left}
          />
          <div className="mt-2 flex flex-wrap items-center gap-x-5 gap-y-1">
            <WordButton
              lined
              onClick={() => {
                // A pause is meant: a reload must not go on by itself.
                forgetWork(comparison.id);
                comparisonManager.pause(comparison.id);
              }}
            >
              Pause
            </WordButton>
            <WordButton lined onClick={() => comparisonManager.stop(comparison.id)}>
              Stop here and keep what is done
            </WordButton>
            <span className="text-note text-ink-2">
              {left === undefined ? 'The time left shows soon. ' : `About ${formatDuration(left)} left. `}
              You can leave the page, but not close the tab; what is done is saved as it comes.
            </span>
          </div>
        </div>
      )}
      {live?.trouble && (
        <p role="status" className="border-l-[6px] border-flag py-1 pl-3">
          {live.trouble}
        </p>
      )}
      {live?.phase === 'failed' && (
        <p role="alert" className="border-l-[6px] border-danger py-1 pl-3">
          {live.error}
        </p>
      )}
      {!working && mayDraw && comparison.decision === null && (
        <GoOn
          comparison={counted}
          paused={live?.phase === 'paused' || live?.phase === 'failed'}
          busy={reopen.isPending}
          error={reopen.error}
          onResume={() => workOn(comparison)}
          onMore={(replicates) => reopen.mutate(replicates)}
        />
      )}
      {comparison.decision !== null && mayDraw && (
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
      <ComparisonMaps {...{ comparison, live, outlook }} figures={shown} />
      {stored.error && !live ? (
        <ProblemNotice error={stored.error} title="The futures could not be fetched.">
          <WordButton lined onClick={() => void stored.refetch()}>
            Try again
          </WordButton>
        </ProblemNotice>
      ) : null}
      {shown && figures && known ? (
        <>
          <OptionAnswers figures={shown} currency={plan.currency}>
            {(option) => (
              <FuturesLines
                plan={plan}
                name={plan.options[option].name}
                records={[...known[option][outlook].values()]}
              >
                {(record) => <FutureAlone {...{ comparison, option, outlook, record }} />}
              </FuturesLines>
            )}
          </OptionAnswers>
          <div className="grid gap-x-10 gap-y-8 border-t border-ink pt-4 lg:grid-cols-2">
            <RecoveryCurves
              curves={shown.options.map(({ name, wait, summary }) => ({
                name,
                wait,
                curve: summary.recovery,
              }))}
              surveyYear={plan.common.surveyYear}
              years={plan.common.years}
            />
            {plan.currency !== null && shown.options.every(({ cost }) => cost !== null) ? (
              <CostGain figures={shown} currency={plan.currency} budget={costs?.costs.budget ?? null} />
            ) : (
              <p className="text-note text-ink-2">
                Cost against gain needs unit costs: set them on Options, then start a comparison anew.
              </p>
            )}
            <PairTable figures={shown} />
            <div className="grid content-start gap-8">
              <OutlookTable figures={figures} />
              <LossTable figures={shown} />
            </div>
            <WeightsBox figures={figures} />
            <div className="grid content-start gap-6">
              <DecisionBox
                comparison={counted}
                mayDecide={(role === 'manager' || role === 'admin') && !working}
                working={working && (role === 'manager' || role === 'admin')}
                busy={decide.isPending}
                error={decide.error}
                onDecide={(draft) => decide.mutate(draft)}
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
    </SitePage>
  );
}

/** What can be done with a comparison that stands still. */
function GoOn(props: {
  comparison: Comparison;
  paused: boolean;
  busy: boolean;
  error: unknown;
  onResume: () => void;
  onMore: (replicates: number) => void;
}) {
  const { comparison, paused } = props;
  const { plan, done, status } = comparison;
  const open = status === 'running' || paused;
  const next = Math.min(2000, done < plan.replicates ? plan.replicates : plan.replicates * 2);
  return (
    <div className="flex flex-wrap items-center gap-x-4 gap-y-1 border-b border-rule py-2">
      {open ? (
        <Button kind={done === 0 ? 'primary' : 'quiet'} onClick={props.onResume}>
          Go on from what is saved
        </Button>
      ) : (
        <Button busy={props.busy} busyLabel="Resuming" onClick={() => props.onMore(next)}>
          {done < plan.replicates
            ? `Run the remaining ${plan.replicates - done} futures`
            : `Run on to ${next} futures`}
        </Button>
      )}
      <span className="text-note text-ink-2">
        {open && !paused
          ? 'This comparison is not at work in this tab. If another tab works on it, leave it there.'
          : 'What is saved stays; the same futures come to the same digests.'}
      </span>
      {props.error ? <ProblemNotice error={props.error} title="Not resumed." /> : null}
    </div>
  );
}
