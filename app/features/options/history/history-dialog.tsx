import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import type { Option, OptionRevision } from '#contract/options.ts';
import { Dialog } from '#app/components/dialog.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { Table } from '#app/components/table.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatDateTime } from '#app/lib/formats.ts';
import { OptionPicture, type PictureBase } from '../list/option-picture.tsx';
import { worksInWords } from '#contract/works-words.ts';
import { bringBackMutation, revisionQuery, revisionsQuery } from './revisions.ts';

/** Who changed an option, when and how; what it was can be looked at, and brought back as the newest. */
export function HistoryDialog(props: {
  option: Option;
  base: PictureBase;
  /** absent where nothing can be brought back, and why not */
  mayBringBack: boolean;
  reason?: string;
  onClose: () => void;
}) {
  const { option, mayBringBack } = props;
  const queryClient = useQueryClient();
  const revisions = useQuery(revisionsQuery(option.siteId, option.id));
  const bringBack = useMutation(bringBackMutation(queryClient, option.siteId, option.id));
  const [shown, setShown] = useState<number>();
  const take = ({ revision }: OptionRevision) =>
    bringBack.mutate(
      { revision, onRevision: option.revision },
      {
        onSuccess: () => {
          sayDone(`Revision ${revision} is back`);
          props.onClose();
        },
      },
    );
  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => {
        if (!open) props.onClose();
      }}
      title={`History of ${option.name}`}
      description="Who changed it, when and how. The works of the newest 200 revisions are kept, fewer where they are large; the lines stay."
    >
      {props.reason !== undefined && <Notice className="mt-3">{props.reason}</Notice>}
      {bringBack.error ? (
        <ProblemNotice error={bringBack.error} title="Not brought back." className="mt-3" />
      ) : null}
      {revisions.error ? <ProblemNotice error={revisions.error} className="mt-3" /> : null}
      {revisions.isPending && <LoadingLines label="Fetching the history" lines={3} />}
      {shown !== undefined && <ShownRevision option={option} revision={shown} base={props.base} />}
      {revisions.data?.length === 0 && (
        <p className="mt-3">Nothing was changed since it was made, before its history was kept.</p>
      )}
      {revisions.data && revisions.data.length > 0 && (
        <Table
          className="mt-3"
          caption={`Revisions of ${option.name}, newest first`}
          columns={[
            { key: 'revision', head: 'no.', number: true, cell: ({ revision }) => revision },
            {
              key: 'what',
              head: 'what was done',
              cell: ({ summary, changedBy, changedAt }) => (
                <>
                  <span className="block first-letter:uppercase">{summary}</span>
                  <span className="block text-note text-ink-2">
                    {changedBy}, {formatDateTime(changedAt)}
                  </span>
                </>
              ),
            },
            {
              key: 'deeds',
              head: <span className="sr-only">look at it, bring it back</span>,
              cell: (row) => (
                <span className="flex flex-wrap items-baseline justify-end gap-x-3">
                  {row.kept ? (
                    <WordButton
                      lined
                      pressed={row.revision === shown || undefined}
                      aria-label={`Look at revision ${row.revision}`}
                      onClick={() => setShown(row.revision === shown ? undefined : row.revision)}
                    >
                      Look
                    </WordButton>
                  ) : (
                    <span className="text-note text-ink-2">works not kept</span>
                  )}
                  {mayBringBack && row.kept && row.revision !== option.revision && (
                    <WordButton
                      lined
                      busy={bringBack.isPending}
                      aria-label={`Bring revision ${row.revision} back`}
                      onClick={() => take(row)}
                    >
                      Bring back
                    </WordButton>
                  )}
                  {row.revision === option.revision && (
                    <span className="text-note text-ink-2">as it is now</span>
                  )}
                </span>
              ),
            },
          ]}
          rows={revisions.data}
          rowKey={({ revision }) => String(revision)}
          selected={({ revision }) => revision === shown}
        />
      )}
    </Dialog>
  );
}

function ShownRevision({ option, revision, base }: { option: Option; revision: number; base: PictureBase }) {
  const { data, error } = useQuery(revisionQuery(option.siteId, option.id, revision));
  if (error) return <ProblemNotice error={error} className="mt-3" />;
  if (!data) return <LoadingLines label={`Fetching revision ${revision}`} lines={2} />;
  return (
    <figure className="mt-3 grid gap-x-4 gap-y-1 sm:grid-cols-[280px_minmax(0,1fr)]">
      <OptionPicture base={base} works={data.works} />
      <figcaption className="text-note">
        <b className="block text-body">
          Revision {revision}: {data.name}
        </b>
        {worksInWords(data.works)}
        {data.note !== '' && <span className="mt-1 block whitespace-pre-line text-ink-2">{data.note}</span>}
      </figcaption>
    </figure>
  );
}
