import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Section } from '#app/components/paper-layout.tsx';
import { Table } from '#app/components/table.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatDateTime } from '#app/lib/formats.ts';
import { endMySessionMutation, mySessionsQuery } from './my-sessions.ts';

/** Where I am signed in; each but this one can be ended from here. */
export function SessionSection() {
  const sessions = useQuery(mySessionsQuery);
  const end = useMutation(endMySessionMutation(useQueryClient()));
  return (
    <Section title="Where you are signed in">
      {sessions.isPending && <LoadingLines label="Fetching your sessions" lines={2} />}
      {sessions.isError && <ProblemNotice error={sessions.error} title="Your sessions did not come." />}
      {end.isError && (
        <ProblemNotice error={end.error} title="That session is still open." className="mb-3" />
      )}
      {sessions.isSuccess && (
        <Table
          caption="Your open sessions"
          columns={[
            {
              key: 'device',
              head: 'Browser',
              cell: ({ device, current }) => (
                <>
                  <b className="font-semibold">{device}</b>
                  {current && <span className="text-ink-2">, this one</span>}
                </>
              ),
            },
            { key: 'started', head: 'Since', wide: true, cell: ({ startedAt }) => formatDateTime(startedAt) },
            { key: 'seen', head: 'Last used', cell: ({ seenAt }) => formatDateTime(seenAt) },
            {
              key: 'deeds',
              head: <span className="sr-only">What can be done</span>,
              number: true,
              cell: ({ id, current, device }) =>
                !current && (
                  <WordButton
                    lined
                    aria-label={`End the session on ${device}`}
                    busy={end.isPending && end.variables === id}
                    onClick={() => end.mutate(id, { onSuccess: () => sayDone('Session ended') })}
                  >
                    End
                  </WordButton>
                ),
            },
          ]}
          rows={sessions.data}
          rowKey={({ id }) => id}
        />
      )}
    </Section>
  );
}
