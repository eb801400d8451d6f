import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useEffect, useMemo, useRef, useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Fit } from '#contract/fits.ts';
import { Button } from '#app/components/button.tsx';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton, WordLink } from '#app/components/word-button.tsx';
import { abcPlanOf } from '#app/features/fits/abc-plan.ts';
import { removeFit, reopenFit, takeOverFit } from '#app/features/fits/change-fit.ts';
import { FigureTable, LeftOutTable } from '#app/features/fits/figure-table.tsx';
import { isFitting } from '#app/features/fits/fit-manager.ts';
import { endingWords, standingWords } from '#app/features/fits/fit-words.ts';
import { fitsQuery, keepFit } from '#app/features/fits/get-fit.ts';
import { useLiveFit } from '#app/features/fits/live-fits.ts';
import { PairPlot } from '#app/features/fits/pair-plot.tsx';
import { posteriorFigures, priorForesaw } from '#app/features/fits/posterior-figures.ts';
import { RateDensities } from '#app/features/fits/rate-densities.tsx';
import { formatCount, formatCounted, formatDateTime, formatNumber, formatShare } from '#app/lib/formats.ts';
import { siteKey } from '#app/lib/site-cache.ts';
import { leaveOneOut } from '#sim-core/fit/leave-one-out.ts';
import { FitCheck } from './fit-check.tsx';
import { useWorkOnFit, wasFitting } from './fit-ground.ts';
import { FitProgress } from './fit-progress.tsx';
import { SitePage } from './site-page.tsx';
import { useSite } from './use-site.ts';

/** A fit: how far it is, what it says of the rates, how well it fits, and the way into the plant. */
export function FitView({ fit }: { fit: Fit }) {
  const { site, mayKeepGround } = useSite();
  const queryClient = useQueryClient();
  const navigate = useNavigate();
  const workOn = useWorkOnFit();
  const live = useLiveFit(fit.id);
  const working = isFitting(live);
  const { plan } = fit;
  const state = live?.state ?? fit.state;
  const [deleting, setDeleting] = useState(false);

  // A tab that was at work when it was loaded anew goes on by itself, once.
  const tried = useRef(false);
  useEffect(() => {
    if (tried.current || live || fit.status !== 'running' || !mayKeepGround) return;
    tried.current = true;
    if (wasFitting(fit.id)) workOn(fit);
  }, [fit, live, mayKeepGround, workOn]);

  const { population, prior, scales, generations, runs } = state;
  const posterior = useMemo(() => posteriorFigures(plan, { population }), [plan, population]);
  const foreseen = useMemo(() => priorForesaw({ prior }, plan.figures), [prior, plan.figures]);
  const leftOut = useMemo(
    () => leaveOneOut(abcPlanOf(plan), { prior, scales }, plan.figures),
    [plan, prior, scales],
  );
  const resume = useMutation({
    mutationFn: () => (fit.status === 'stopped' ? reopenFit(fit) : Promise.resolve(fit)),
    onSuccess: (next) => {
      keepFit(queryClient, next);
      workOn(next);
    },
  });
  const accept = useMutation({
    mutationFn: () => takeOverFit(fit),
    onSuccess: (next) => {
      keepFit(queryClient, next);
      void queryClient.invalidateQueries({ queryKey: siteKey(site.id) });
      sayDone('The plant has the fitted rates');
    },
  });
  const remove = useMutation({
    mutationFn: () => removeFit(fit),
    onSuccess: () => {
      void queryClient.invalidateQueries({ queryKey: fitsQuery(site.id).queryKey });
      void navigate(`/sites/${site.id}/fit`);
    },
  });
  const strongest = posterior
    ? Math.max(
        0,
        ...posterior.correlations.flatMap((row, i) => row.map((r, j) => (i === j ? 0 : Math.abs(r)))),
      )
    : 0;
  const tolerance = generations.at(-1)?.tolerance;
  return (
    <SitePage step="plant" title={fit.name}>
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-1 border-b border-ink pb-2">
        <div className="min-w-0">
          <WordLink to={`/sites/${site.id}/fit`} plain>
            All fits
          </WordLink>
          <h1 className="text-title font-bold break-words">{fit.name}</h1>
        </div>
        <p className="flex flex-wrap items-baseline gap-x-5">
          <span className="text-note text-ink-2">
            {standingWords({ ...fit, runs, generations: generations.length }, live?.phase)}
          </span>
          {mayKeepGround && !working && (
            <WordButton lined onClick={() => setDeleting(true)}>
              Delete
            </WordButton>
          )}
        </p>
      </div>
      <FitProgress fit={fit} />
      {!working && fit.status !== 'finished' && mayKeepGround && (
        <div className="flex flex-wrap items-center gap-x-4 gap-y-1 border-b border-rule py-2">
          <Button
            kind={posterior ? 'quiet' : 'primary'}
            busy={resume.isPending}
            onClick={() => resume.mutate()}
          >
            Go on from what is saved
          </Button>
          <span className="text-note text-ink-2">
            {fit.status === 'running'
              ? 'This fit is not at work in this tab. If another tab works on it, leave it there.'
              : 'It goes on where it stopped and comes to the same rates.'}
          </span>
          {resume.error && <ProblemNotice error={resume.error} title="Not resumed." />}
        </div>
      )}
      {!posterior ? (
        <p className="py-6 text-ink-2" role="status">
          Rates show when the first generation of {formatCount(plan.priorRuns)} runs is complete
          {runs > 0 && `; ${formatCount(runs)} are done`}.
        </p>
      ) : (
        <div className="grid gap-y-7 pt-4">
          <section aria-label="What the fit says" className="grid gap-2">
            <h2 className="text-lead">Rates before (dashed) and after (filled)</h2>
            <p className="max-w-[68ch]">
              {formatCounted(generations.length, 'generation')} of {formatCount(population.length)} members
              from {formatCount(runs)} runs; they say as much as{' '}
              {formatCount(Math.round(posterior.effective))} equally likely ones. Tolerance{' '}
              {formatNumber(tolerance ?? 0, 2)} of the spread that the beliefs before had
              {generations.length > 1 &&
                `, ${formatShare(generations.at(-1)!.acceptance)} of the last generation’s runs kept`}
              . {state.ending && endingWords[state.ending]}
            </p>
            {state.refused > 0 && (
              <Notice>
                {formatCounted(state.refused, 'run')} could not be made, as no kernel shows such rates on
                these cells; nothing is said about those rates.
              </Notice>
            )}
            <RateDensities posterior={posterior} />
          </section>
          {posterior.rates.length > 1 && (
            <section className="grid gap-2 border-t border-ink pt-3">
              <h2 className="text-lead">How they hang together</h2>
              <PairPlot posterior={posterior} />
            </section>
          )}
          <section className="grid gap-2 border-t border-ink pt-3">
            <h2 className="text-lead">How well they explain the surveys</h2>
            <FigureTable fitted={posterior.figures} prior={foreseen} />
          </section>
          {leftOut.length > 0 && (
            <section className="grid gap-1 border-t border-ink pt-3">
              <h2 className="text-lead">Leaving one year out</h2>
              <LeftOutTable years={leftOut} />
            </section>
          )}
          {!working && plan.data.maps.length > 0 && <FitCheck fit={fit} />}
          <section className="grid gap-2 border-t border-ink pt-3" aria-label="Into the plant">
            <h2 className="text-lead">Into the plant</h2>
            <p className="max-w-[68ch]">
              Each fitted rate becomes what the plant believes, with this fit as its source. Rates are kept
              one by one
              {strongest > 0.3 &&
                `: how they hang together (a correlation of up to ${formatNumber(strongest, 2)}) is lost, so runs spread somewhat wider than the fit`}
              . Where the plant came from a profile of the team, it is kept there as a new version.
            </p>
            {fit.accepted && (
              <Notice>
                Taken over by {fit.accepted.by}, {formatDateTime(fit.accepted.at)}: {fit.accepted.what}.
              </Notice>
            )}
            {mayKeepGround ? (
              <div className="flex flex-wrap items-center gap-4">
                <Button
                  kind={fit.accepted ? 'quiet' : 'primary'}
                  disabled={working || fit.status === 'running'}
                  busy={accept.isPending}
                  busyLabel="Taking them over"
                  onClick={() => accept.mutate()}
                >
                  {fit.accepted ? 'Take these rates over again' : 'Take these rates over'}
                </Button>
                {(working || fit.status === 'running') && (
                  <span className="text-note text-ink-2">Stop the fit first, or let it come to its end.</span>
                )}
                {fit.accepted && <WordLink to={`/sites/${site.id}/plant`}>Look at the plant</WordLink>}
              </div>
            ) : (
              <p className="text-ink-2">Modellers and admins take rates over.</p>
            )}
            {accept.error && <ProblemNotice error={accept.error} title="Not taken over." />}
          </section>
        </div>
      )}
      <ConfirmDialog
        open={deleting}
        onOpenChange={setDeleting}
        title={`Delete “${fit.name}”?`}
        description="Its runs and what they came to go. What the plant took over from it stays."
        action="Delete the fit"
        keep="Keep it"
        busy={remove.isPending}
        error={remove.error}
        onConfirm={() => remove.mutate()}
      />
    </SitePage>
  );
}
