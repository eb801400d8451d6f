import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { useNavigate } from 'react-router-dom';
import type { Run } from '#contract/runs.ts';
import { Button } from '#app/components/button.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordLink } from '#app/components/word-button.tsx';
import { registerRunMutation } from '#app/features/runs/change-run.ts';
import { runManager } from '#app/features/runs/live-runs.ts';
import { isAtWork, type LiveRun } from '#app/features/runs/run-manager.ts';
import { RunDeed } from './run-deed.tsx';
import { useStartParts } from './run-ground.ts';
import { useSite } from './use-site.ts';

/** What matters now about a run: to check it once it is finished, to start it over where it was left. */
export function RunAction({ run, live }: { run: Run; live: LiveRun | undefined }) {
  const { mayDraw } = useSite();
  const partsOf = useStartParts();
  if (isAtWork(live))
    return (
      <p className="text-note text-ink-2">
        {live.repeat
          ? 'It compares digests at the end.'
          : 'You can leave this page; closing the tab ends the run.'}
      </p>
    );
  if (run.status === 'finished')
    return (
      <>
        <Button kind={run.check ? 'quiet' : 'primary'} onClick={() => runManager.repeat(partsOf(run))}>
          Run again and compare the digest
        </Button>
        {mayDraw && run.optionId !== null && (
          <WordLink to={`/sites/${run.siteId}/options?option=${run.optionId}`}>Its option</WordLink>
        )}
      </>
    );
  return mayDraw ? <StartOver run={run} /> : null;
}

function StartOver({ run }: { run: Run }) {
  const queryClient = useQueryClient();
  const register = useMutation(registerRunMutation(queryClient, run.siteId));
  const partsOf = useStartParts();
  const navigate = useNavigate();
  const [stopping, setStopping] = useState(false);
  const { optionId } = run;
  const over = (id: string) =>
    register.mutate(
      { name: `${run.name.slice(0, 112)}, again`, optionId: id, spec: run.spec },
      {
        onSuccess: (made) => {
          runManager.start(partsOf(made));
          void navigate(`/sites/${run.siteId}/runs/${made.id}`);
        },
      },
    );
  return (
    <>
      {optionId === null ? (
        <p className="text-note text-ink-2">Its option was deleted, so it cannot be started over.</p>
      ) : (
        <Button kind="primary" busy={register.isPending} busyLabel="Starting" onClick={() => over(optionId)}>
          Run from the start
        </Button>
      )}
      {run.status === 'running' && <Button onClick={() => setStopping(true)}>Stop it</Button>}
      {register.error && (
        <ProblemNotice error={register.error} title="The run was not started." className="w-full" />
      )}
      {stopping && <RunDeed asked={{ deed: 'stop', run }} onClose={() => setStopping(false)} />}
    </>
  );
}
