import type { Comparison } from '#contract/comparisons.ts';
import { Button } from '#app/components/button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';

/** What can be done with a comparison that stands still. */
export function GoOn(props: {
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
          : 'What is saved stays as it is; only new futures are added.'}
      </span>
      {props.error ? <ProblemNotice error={props.error} title="Not resumed." /> : null}
    </div>
  );
}
