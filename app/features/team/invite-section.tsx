import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Section } from '#app/components/paper-layout.tsx';
import { Table } from '#app/components/table.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { formatDate } from '#app/lib/formats.ts';
import { InviteForm } from './invite-form.tsx';
import { invitesQuery, withdrawInviteMutation } from './invites.ts';

/** Invites that wait for an answer, and how to send another. */
export function InviteSection({ teamId }: { teamId: string }) {
  const invites = useQuery(invitesQuery(teamId));
  const withdraw = useMutation(withdrawInviteMutation(useQueryClient(), teamId));
  const [leaving, setLeaving] = useState<{ id: string; email: string }>();
  return (
    <Section title="Invites">
      <InviteForm teamId={teamId} />
      {invites.isPending && <LoadingLines label="Fetching the invites" lines={2} />}
      {invites.isError && <ProblemNotice error={invites.error} title="The invites did not come." />}
      {invites.isSuccess && invites.data.length === 0 && (
        <p className="text-ink-2">No invite waits for an answer.</p>
      )}
      {invites.isSuccess && invites.data.length > 0 && (
        <Table
          caption="Waiting for an answer"
          showCaption
          columns={[
            {
              key: 'to',
              head: 'To',
              cell: ({ email }) => <span className="font-mono text-note break-all">{email}</span>,
            },
            { key: 'role', head: 'as', cell: ({ role }) => role },
            {
              key: 'by',
              head: 'Invited',
              wide: true,
              cell: ({ invitedBy, sentAt }) => `${formatDate(sentAt)} by ${invitedBy}`,
            },
            { key: 'until', head: 'Holds until', wide: true, cell: ({ expiresAt }) => formatDate(expiresAt) },
            {
              key: 'deeds',
              head: <span className="sr-only">What can be done</span>,
              number: true,
              cell: ({ id, email }) => (
                <WordButton
                  lined
                  aria-label={`Withdraw the invite of ${email}`}
                  onClick={() => setLeaving({ id, email })}
                >
                  Withdraw
                </WordButton>
              ),
            },
          ]}
          rows={invites.data}
          rowKey={({ id }) => id}
        />
      )}
      {leaving && (
        <ConfirmDialog
          open
          onOpenChange={(open) => !open && setLeaving(undefined)}
          title={`Withdraw the invite of ${leaving.email}?`}
          description="The link in the message stops working. You can invite them again at any time."
          action="Withdraw"
          keep="Keep it"
          busy={withdraw.isPending}
          error={withdraw.error}
          onConfirm={() =>
            withdraw.mutate(leaving.id, {
              onSuccess: () => {
                sayDone('Invite withdrawn');
                setLeaving(undefined);
              },
            })
          }
        />
      )}
    </Section>
  );
}
