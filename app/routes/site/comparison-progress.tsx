import { Progress } from '#app/components/progress.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { WorkTrouble } from '#app/components/work-trouble.tsx';
import { isWorking } from '#app/features/comparisons/comparison-manager.ts';
import { comparisonManager, useLiveComparison } from '#app/features/comparisons/live-comparisons.ts';
import { formatDuration } from '#app/lib/formats.ts';
import { forgetWork } from './comparison-ground.ts';

/** How far a comparison is that this tab works on, why it waits or failed, and how to make it stand still. */
export function ComparisonProgress({ comparisonId }: { comparisonId: string }) {
  const live = useLiveComparison(comparisonId);
  if (!live) return null;
  const { phase, progress, again, trouble, error } = live;
  const left = progress?.secondsLeft;
  return (
    <>
      {isWorking(phase) && phase !== 'saving' && (
        <div className="border-b border-rule py-3">
          <Progress
            label={
              phase === 'loading'
                ? 'Fetching what is stored'
                : `run ${progress?.runsDone ?? 0} of ${progress?.runs ?? '…'}${again > 0 ? `, of which ${again} are run again for their maps` : ''}`
            }
            done={progress?.stepsDone ?? 0}
            of={progress?.steps ?? 1}
            secondsLeft={left}
          />
          <div className="mt-2 flex flex-wrap items-center gap-x-5 gap-y-1">
            <WordButton
              lined
              onClick={() => {
                // A pause is meant: a reload must not go on by itself.
                forgetWork(comparisonId);
                comparisonManager.pause(comparisonId);
              }}
            >
              Pause
            </WordButton>
            <WordButton lined onClick={() => comparisonManager.stop(comparisonId)}>
              Stop here and keep what is done
            </WordButton>
            <span className="text-note text-ink-2">
              {left === undefined ? 'The time left shows soon. ' : `About ${formatDuration(left)} left. `}
              You can leave the page, but not close the tab; what is done is saved as it comes.
            </span>
          </div>
        </div>
      )}
      <WorkTrouble trouble={trouble} failure={phase === 'failed' ? (error ?? '') : undefined} />
    </>
  );
}
