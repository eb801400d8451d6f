import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useEffect } from 'react';
import type { RunSummary } from '#contract/runs.ts';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { NameDialog } from '#app/components/name-dialog.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { deleteRunMutation, renameRunMutation, stopRunMutation } from '#app/features/runs/change-run.ts';
import { runQuery } from '#app/features/runs/get-run.ts';
import { runManager } from '#app/features/runs/live-runs.ts';
import { isAtWork } from '#app/features/runs/run-manager.ts';

export interface AskedDeed {
  deed: 'rename' | 'stop' | 'delete';
  run: Pick<RunSummary, 'id' | 'siteId' | 'name' | 'frames'>;
}

/** Asks for what a deed needs before it is done to a run: a name, or a yes. */
export function RunDeed({
  asked: { deed, run },
  onClose,
  onDeleted,
}: {
  asked: AskedDeed;
  onClose: () => void;
  onDeleted?: () => void;
}) {
  const queryClient = useQueryClient();
  const rename = useMutation(renameRunMutation(queryClient, run.id));
  const stop = useMutation(stopRunMutation(queryClient, run.id));
  const remove = useMutation(deleteRunMutation(queryClient));
  const status = useQuery({ ...runQuery(run.id), enabled: deed === 'stop', refetchInterval: 4000 }).data
    ?.status;
  // A run that ended while the question stood cannot be stopped any more. The answer's own end closes it by `done`.
  const moot =
    status !== undefined && status !== 'running' && deed === 'stop' && !stop.isPending && !stop.isSuccess;
  useEffect(() => {
    if (moot) onClose();
  }, [moot, onClose]);
  const done = (words: string) => {
    sayDone(words);
    onClose();
  };
  if (deed === 'rename')
    return (
      <NameDialog
        title={`Rename ${run.name}`}
        label="Name of the run"
        start={run.name}
        longest={120}
        action="Rename"
        keep="Keep the name"
        busy={rename.isPending}
        error={rename.error}
        onClose={onClose}
        onName={(name) => rename.mutate(name, { onSuccess: () => done('Renamed') })}
      />
    );
  const atWork = isAtWork(runManager.get(run.id));
  const close = (open: boolean) => {
    if (!open) onClose();
  };
  if (deed === 'stop')
    return (
      <ConfirmDialog
        open
        onOpenChange={close}
        title={`Stop ${run.name}?`}
        description={`The years stored so far stay${atWork ? '' : ' (another tab that works on it ends, too)'}. A stopped run is not taken up again.`}
        action="Stop the run"
        keep="Let it be"
        busy={stop.isPending}
        error={stop.error}
        onConfirm={() => {
          if (atWork) void runManager.cancel(run.id).then(() => done('Stopped'));
          else stop.mutate(undefined, { onSuccess: () => done('Stopped') });
        }}
      />
    );
  return (
    <ConfirmDialog
      open
      onOpenChange={close}
      title={`Delete ${run.name}?`}
      description="Its frames, series and digest go with it, for everybody in the team. The option stays. This cannot be taken back."
      action="Delete the run"
      keep="Keep it"
      busy={remove.isPending}
      error={remove.error}
      onConfirm={() =>
        void (atWork ? runManager.cancel(run.id) : Promise.resolve()).then(() =>
          remove.mutate(run, {
            onSuccess: () => {
              runManager.dismiss(run.id);
              done('Deleted');
              onDeleted?.();
            },
          }),
        )
      }
    />
  );
}
