import type { Run } from '#contract/runs.ts';
import { Notice } from '#app/components/notice.tsx';
import { formatDateTime } from '#app/lib/formats.ts';
import type { LiveRun } from './run-manager.ts';

/** Whether the run came out the same when it was run again. */
export function RunCheck({ run, live }: { run: Run; live: LiveRun | undefined }) {
  const { check } = run;
  if (live?.repeat && live.phase === 'failed')
    return (
      <Notice kind="problem" title="It could not be run again.">
        {live.error}
      </Notice>
    );
  if (!check)
    return run.status === 'finished' ? (
      <p className="py-2 text-note text-ink-2">
        Nobody has run it again yet. A run depends on its spec and layers alone, so the digest must come out
        the same on any browser.
      </p>
    ) : null;
  const told = `${formatDateTime(check.at)}, ${check.by}, engine ${check.engineVersion}`;
  return check.agreed ? (
    <Notice title="The digest agrees." className="my-2">
      Run again {told}.
    </Notice>
  ) : (
    <Notice kind="problem" title="The digest differs." className="my-2">
      Run again {told}. {differsBecause(run)}
    </Notice>
  );
}

function differsBecause({ check, result }: Run): string {
  return check && result && check.engineVersion !== result.engineVersion
    ? `The run was made by engine ${result.engineVersion}: another version may come to another result.`
    : 'The engine is the same version, so one of the two computers made an error, or a stored frame was changed.';
}
