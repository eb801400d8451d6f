import { useMutation, useQueryClient } from '@tanstack/react-query';
import type { Layer } from '#contract/layers.ts';
import type { Upload } from '#contract/uploads.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { Progress } from '#app/components/progress.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatBytes } from '#app/lib/formats.ts';
import { UploadChoices } from './upload-choices.tsx';
import { Reasons } from './upload-reasons.tsx';
import { dismiss, keepUpload, uploadDeeds } from './uploads-query.ts';

const doing = {
  waiting: 'waiting for its turn',
  reading: 'reading what is in it',
  aligning: 'bringing it onto the grid',
} as const;

/** One file that the server has: how far it is, what was found in it, what is to be decided, or why it is refused. */
export function UploadRow(props: {
  upload: Upload;
  /** the site's; undefined while there is no site yet */
  grid: Grid | undefined;
  /** what plays its part now */
  layers?: readonly Layer[];
}) {
  const { upload } = props;
  const queryClient = useQueryClient();
  const keep = { onSuccess: (next: Upload) => keepUpload(queryClient, next) };
  const cancel = useMutation({ mutationFn: () => uploadDeeds.cancel(upload), ...keep });
  const retry = useMutation({ mutationFn: () => uploadDeeds.retry(upload), ...keep });
  const remove = useMutation({ mutationFn: () => dismiss(queryClient, upload) });
  const named = (words: string) => (
    <>
      {words}
      <span className="sr-only"> {upload.fileName}</span>
    </>
  );
  const off = (
    <WordButton lined busy={remove.isPending} onClick={() => remove.mutate()}>
      {named('Take it off the list')}
    </WordButton>
  );
  const again = (
    <WordButton lined busy={retry.isPending} onClick={() => retry.mutate()}>
      {named('Try again')}
    </WordButton>
  );
  const failed = cancel.error ?? retry.error ?? remove.error;
  return (
    <div className="text-note">
      {body()}
      {failed && <ProblemNotice error={failed} className="mt-1" />}
    </div>
  );

  function body() {
    switch (upload.state) {
      case 'waiting':
      case 'reading':
      case 'aligning':
        return (
          <>
            <Progress
              label={`${upload.fileName}: ${doing[upload.state]}`}
              done={upload.progress?.share ?? 0}
              of={1}
              secondsLeft={upload.progress?.secondsLeft ?? undefined}
            />
            <WordButton lined busy={cancel.isPending} onClick={() => cancel.mutate()}>
              {named('Cancel')}
            </WordButton>
          </>
        );
      case 'choices':
        return (
          <>
            <p className="mb-1 wrap-anywhere">
              <b className="font-mono">{upload.fileName}</b>{' '}
              <span className="text-ink-2">{formatBytes(upload.bytes)}</span>
            </p>
            <UploadChoices {...props}>{off}</UploadChoices>
          </>
        );
      case 'refused':
      case 'failed':
        return (
          <Notice
            kind="problem"
            title={`${upload.fileName} ${upload.state === 'refused' ? 'was refused.' : 'broke off.'}`}
          >
            <Reasons upload={upload} />
            <div className="mt-2 flex flex-wrap gap-x-4">
              {upload.state === 'failed' && again}
              {off}
            </div>
          </Notice>
        );
      case 'cancelled':
        return (
          <>
            <p className="wrap-anywhere">
              <span className="font-mono">{upload.fileName}</span> was cancelled; the file is kept.
            </p>
            <div className="flex flex-wrap gap-x-4">
              {again}
              {off}
            </div>
          </>
        );
      case 'done':
        return (
          <p role="status" className="wrap-anywhere">
            <span className="font-mono">{upload.fileName}</span> is placed.
          </p>
        );
    }
  }
}
