import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query';
import { useState } from 'react';
import { Button } from '#app/components/button.tsx';
import { ConfirmDialog } from '#app/components/confirm-dialog.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { Section } from '#app/components/paper-layout.tsx';
import { sayDone } from '#app/components/toast.tsx';
import { WordAnchor } from '#app/components/word-button.tsx';
import type { AccessToken } from '#contract/access-tokens.ts';
import type { Session } from '#contract/people.ts';
import { MadeToken } from './made-token.tsx';
import { myTokensQuery, revokeTokenMutation } from './my-tokens.ts';
import { TokenForm } from './token-form.tsx';
import { TokenTable } from './token-table.tsx';

/** Keys for scripts: made here, shown once, revoked here. */
export function TokenSection({ memberships }: { memberships: Session['memberships'] }) {
  const tokens = useQuery(myTokensQuery);
  const [asking, setAsking] = useState(false);
  const [made, setMade] = useState<{ token: string; name: string }>();
  const [revoking, setRevoking] = useState<AccessToken>();
  return (
    <Section title="Access tokens">
      <p className="max-w-[52ch]">
        A token lets a script use Foothold as you, without your password. It cannot touch accounts or members.
      </p>
      <p className="mb-3">
        <WordAnchor href="/api/docs">What scripts can ask for</WordAnchor>
      </p>
      {tokens.isPending && <LoadingLines label="Fetching your tokens" lines={2} />}
      {tokens.isError && <ProblemNotice error={tokens.error} title="Your tokens did not come." />}
      {tokens.isSuccess && tokens.data.length > 0 && (
        <TokenTable tokens={tokens.data} onRevoke={setRevoking} />
      )}
      <div className="mt-4">
        {made ? (
          <MadeToken {...made} onKept={() => setMade(undefined)} />
        ) : asking ? (
          <TokenForm
            memberships={memberships}
            onCancel={() => setAsking(false)}
            onMade={(token) => {
              setAsking(false);
              setMade(token);
            }}
          />
        ) : (
          <Button onClick={() => setAsking(true)}>Make a token</Button>
        )}
      </div>
      {revoking && <RevokeDialog token={revoking} onClose={() => setRevoking(undefined)} />}
    </Section>
  );
}

function RevokeDialog({ token, onClose }: { token: AccessToken; onClose: () => void }) {
  const revoke = useMutation(revokeTokenMutation(useQueryClient()));
  return (
    <ConfirmDialog
      open
      onOpenChange={(open) => !open && onClose()}
      title={`Revoke “${token.name}”?`}
      description="Scripts that use it are refused from now on. What they made stays. It cannot be taken back; you can make a new token."
      action="Revoke it"
      keep="Keep it"
      busy={revoke.isPending}
      error={revoke.error}
      onConfirm={() =>
        revoke.mutate(token.id, {
          onSuccess: () => {
            sayDone('Token revoked');
            onClose();
          },
        })
      }
    />
  );
}
