import type { Fit } from '#contract/fits.ts';
import { Progress } from '#app/components/progress.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { WorkTrouble } from '#app/components/work-trouble.tsx';
import { isFitting } from '#app/features/fits/fit-manager.ts';
import { fitManager, useLiveFit } from '#app/features/fits/live-fits.ts';
import { formatCount } from '#app/lib/formats.ts';
import { forgetFitting } from './fit-ground.ts';

/** How far a fit is that this tab works on, why it waits or failed, and how to make it stand still. */
export function FitProgress({ fit }: { fit: Fit }) {
  const live = useLiveFit(fit.id);
  if (!live) return null;
  const { phase, state, secondsLeft, trouble, error } = live;
  const { population, priorRuns, mostRuns } = fit.plan;
  const first = !state || state.generations.length === 0;
  const words = !state
    ? 'Fetching what is stored'
    : first
      ? `run ${formatCount(state.tried)} of the first ${formatCount(priorRuns)}`
      : `generation ${state.generations.length + 1}: ${state.kept.length} of ${population} members kept; run ${formatCount(state.runs)} of at most ${formatCount(mostRuns)}`;
  return (
    <>
      {isFitting(live) && (
        <div className="border-b border-rule py-3">
          <Progress
            label={words}
            done={state?.runs ?? 0}
            of={mostRuns}
            secondsLeft={secondsLeft}
            note="at most, as it may end sooner"
          />
          <div className="mt-2 flex flex-wrap items-center gap-x-5 gap-y-1">
            <WordButton
              lined
              onClick={() => {
                // A pause is meant: a reload must not go on by itself.
                forgetFitting(fit.id);
                fitManager.pause(fit.id);
              }}
            >
              Pause
            </WordButton>
            <WordButton lined onClick={() => fitManager.stop(fit.id)}>
              Stop here and keep what is done
            </WordButton>
            <span className="text-note text-ink-2">
              You can leave the page, but not close the tab; what is done is saved as it comes.
            </span>
          </div>
        </div>
      )}
      <WorkTrouble trouble={trouble} failure={phase === 'failed' ? (error ?? '') : undefined} />
    </>
  );
}
