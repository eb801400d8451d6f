import { Progress } from '#app/components/progress.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { runManager } from './live-runs.ts';
import type { LiveRun } from './run-manager.ts';

const heads: Partial<Record<LiveRun['phase'], string>> = {
  loading: 'Fetching the ground',
  pausing: 'Pausing after this year',
  paused: 'Paused',
  saving: 'Saving the end',
};

/** How far a run of this tab is, with what can be done about it. */
export function LiveProgress({ live, onCancel }: { live: LiveRun; onCancel: () => void }) {
  const { runId, phase, progress, year, surveyYear, years, repeat } = live;
  const done = year === undefined ? 0 : year - surveyYear;
  const head = heads[phase] ?? (repeat ? 'Running again' : 'Running');
  const stored = repeat ? 'nothing is stored' : `${live.savedYears.length} of ${years + 1} years stored`;
  return (
    <div className="flex flex-wrap items-end gap-x-6 gap-y-1.5">
      <Progress
        className="min-w-0 flex-1 basis-[280px]"
        label={`${head}, year ${done} of ${years}`}
        done={progress?.stepsDone ?? 0}
        of={progress?.steps ?? years}
        secondsLeft={phase === 'running' ? progress?.secondsLeft : undefined}
        note={stored}
      />
      <div className="flex flex-wrap gap-x-4">
        {phase === 'paused' || phase === 'pausing' ? (
          <>
            <WordButton lined onClick={() => runManager.resume(runId)}>
              Resume
            </WordButton>
            <WordButton
              lined
              disabled={phase === 'pausing' || progress === undefined}
              onClick={() => runManager.step(runId)}
            >
              One year on
            </WordButton>
          </>
        ) : (
          <WordButton lined disabled={phase === 'saving'} onClick={() => runManager.pause(runId)}>
            Pause
          </WordButton>
        )}
        <WordButton lined className="text-danger" onClick={onCancel}>
          Cancel
        </WordButton>
      </div>
      {live.trouble !== undefined && (
        <p role="alert" className="w-full border-l-[5px] border-danger pl-2 text-note">
          {live.trouble}
        </p>
      )}
    </div>
  );
}
