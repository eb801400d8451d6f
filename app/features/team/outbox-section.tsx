import { useQuery } from '@tanstack/react-query';
import { useState } from 'react';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { Notice, ProblemNotice } from '#app/components/notice.tsx';
import { Section } from '#app/components/paper-layout.tsx';
import { Table } from '#app/components/table.tsx';
import { WordAnchor, WordButton } from '#app/components/word-button.tsx';
import { formatDateTime } from '#app/lib/formats.ts';
import { messageFileUrl, outboxQuery } from './outbox.ts';
import { MessageDialog } from './message-dialog.tsx';

const statusWords = { outbox: 'kept here', sent: 'sent', failed: 'refused' };

/** E-mail that the team's work has caused. Where no mail server is set, this is where its readers get their links. */
export function OutboxSection({ teamId }: { teamId: string }) {
  const outbox = useQuery(outboxQuery(teamId));
  const [reading, setReading] = useState<string>();
  return (
    <Section title="Outbox">
      {outbox.isPending && <LoadingLines label="Fetching the messages" lines={2} />}
      {outbox.isError && <ProblemNotice error={outbox.error} title="The messages did not come." />}
      {outbox.isSuccess && !outbox.data.mailServer && (
        <Notice className="mb-3" title="No mail server is set.">
          Invites leave this machine only if you carry them: read one here, or download it and send it with
          your own mail program. Letters for a new password are listed, too, but their links are hidden:
          whoever runs the server finds them in its outbox folder.
        </Notice>
      )}
      {outbox.isSuccess && outbox.data.messages.length === 0 && (
        <p className="text-ink-2">
          No messages yet. Invites appear here, and letters for a new password without their links.
        </p>
      )}
      {outbox.isSuccess && outbox.data.messages.length > 0 && (
        <Table
          caption="Messages, newest first"
          columns={[
            {
              key: 'message',
              head: 'Message',
              cell: ({ subject, to }) => (
                <>
                  <b className="font-semibold">{subject}</b>
                  <span className="block font-mono text-note break-all text-ink-2">{to}</span>
                </>
              ),
            },
            { key: 'at', head: 'Written', wide: true, cell: ({ sentAt }) => formatDateTime(sentAt) },
            {
              key: 'status',
              head: 'How it stands',
              wide: true,
              cell: ({ status, error }) =>
                status === 'failed' ? (
                  <span className="text-danger">refused{error === null ? '' : `: ${error}`}</span>
                ) : (
                  statusWords[status]
                ),
            },
            {
              key: 'deeds',
              head: <span className="sr-only">What can be done</span>,
              number: true,
              cell: ({ id, subject, to }) => (
                <span className="inline-flex flex-wrap justify-end gap-x-4">
                  <WordButton lined aria-label={`Read ${subject}, to ${to}`} onClick={() => setReading(id)}>
                    Read
                  </WordButton>
                  <WordAnchor
                    href={messageFileUrl(teamId, id)}
                    download
                    aria-label={`Download ${subject}, to ${to}`}
                  >
                    Download
                  </WordAnchor>
                </span>
              ),
            },
          ]}
          rows={outbox.data.messages}
          rowKey={({ id }) => id}
        />
      )}
      {reading !== undefined && (
        <MessageDialog teamId={teamId} messageId={reading} onClose={() => setReading(undefined)} />
      )}
    </Section>
  );
}
