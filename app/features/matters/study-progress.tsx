import { Progress } from '#app/components/progress.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { WorkTrouble } from '#app/components/work-trouble.tsx';
import { formatCounted, formatDuration } from '#app/lib/formats.ts';
import { isStudying, type LiveStudy } from './study-manager.ts';

/** How far a study is that this tab works on, why it waits or failed, and how to make it stand still. */
export function StudyProgress({ live, onPause }: { live: LiveStudy; onPause: () => void }) {
  const { phase, progress, refused, trouble, error } = live;
  const left = progress?.secondsLeft;
  return (
    <>
      {isStudying(phase) && (
        <div className="border-b border-rule py-3">
          <Progress
            label={
              phase === 'loading'
                ? 'Fetching the ground'
                : phase === 'saving'
                  ? 'Saving the runs'
                  : `run ${progress?.runsDone ?? 0} of ${progress?.runs ?? '…'}`
            }
            done={progress?.stepsDone ?? 0}
            of={progress?.steps ?? 1}
            secondsLeft={left}
          />
          <div className="mt-2 flex flex-wrap items-center gap-x-5 gap-y-1">
            <WordButton lined onClick={onPause}>
              Pause
            </WordButton>
            <span className="text-note text-ink-2">
              {left === undefined ? 'The time left shows soon. ' : `About ${formatDuration(left)} left. `}
              You can leave the page, but not close the tab; what is done is saved as it comes.
            </span>
          </div>
        </div>
      )}
      {refused > 0 && (
        <p role="status" className="border-l-[6px] border-flag py-1 pl-3">
          {formatCounted(refused, 'run')} cannot be at such rates on these cells and{' '}
          {refused === 1 ? 'is' : 'are'} left out; narrow what is believed of spread, fill-in or carry-over.
        </p>
      )}
      <WorkTrouble trouble={trouble} failure={phase === 'failed' ? (error ?? '') : undefined} />
    </>
  );
}
