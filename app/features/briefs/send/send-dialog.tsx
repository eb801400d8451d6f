import { useMutation, useQueryClient } from '@tanstack/react-query';
import { useRef, useState } from 'react';
import { mostRecipients, type Brief } from '#contract/briefs.ts';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { TextAreaField, TextField } from '#app/components/inputs.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordButton } from '#app/components/word-button.tsx';
import { briefMessagesQuery, briefsQuery } from '../briefs-query.ts';
import { postBrief } from '../change-brief.ts';
import { addressesIn, sendProblems, type SendDraft } from './send-draft.ts';

/** Sends the newest version of a brief to people by e-mail. */
export function SendDialog(props: {
  brief: Brief;
  /** people of the team, to choose from */
  members: readonly { name: string; email: string }[];
  onClose: () => void;
}) {
  const { brief, members } = props;
  const { facts, latest } = brief;
  const queryClient = useQueryClient();
  const [draft, setDraft] = useState<SendDraft>({
    to: '',
    subject: `Brief: ${brief.text.title}`.slice(0, 200),
    text: `Hello,\n\nhere is our brief “${brief.text.title}”: one page on what was asked, what came of it and how sure that is, with a technical annex.\n`,
    attach: true,
  });
  // One key a message: a second press, or a repeated request, sends nothing twice.
  const key = useRef(crypto.randomUUID());
  const [tried, setTried] = useState(false);
  const problems = sendProblems(draft);
  const shown = tried ? problems : {};
  const send = useMutation({
    mutationFn: () =>
      postBrief(brief, {
        key: key.current,
        version: latest,
        to: addressesIn(draft.to),
        subject: draft.subject,
        text: draft.text,
        attach: draft.attach,
      }),
    onSuccess: () => {
      void queryClient.invalidateQueries({ queryKey: briefMessagesQuery(brief.siteId, brief.id).queryKey });
      void queryClient.invalidateQueries({ queryKey: briefsQuery(brief.siteId).queryKey });
      props.onClose();
    },
  });
  const change = (part: Partial<SendDraft>) => {
    if (!send.isPending) setDraft({ ...draft, ...part });
  };
  const chosen = addressesIn(draft.to);
  const others = members.filter(({ email }) => !chosen.includes(email.toLowerCase()));
  return (
    <Dialog
      wide
      open
      onOpenChange={(open) => {
        if (!open && !send.isPending) props.onClose();
      }}
      title={`Send version ${latest}`}
      description={`Each person gets a message of their own; answers come to you. At most ${mostRecipients} people at once.`}
    >
      <form
        noValidate
        className="mt-3 grid gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          setTried(true);
          if (Object.keys(problems).length === 0 && !send.isPending) send.mutate();
        }}
      >
        <div>
          <TextAreaField
            label="To"
            rows={2}
            value={draft.to}
            error={shown.to}
            hint="Addresses, apart by commas or lines"
            autoComplete="off"
            onChange={(event) => change({ to: event.target.value })}
          />
          {others.length > 0 && (
            <div role="group" aria-label="Members of the team" className="mt-1 flex flex-wrap gap-x-4">
              {others.map(({ name, email }) => (
                <WordButton
                  key={email}
                  lined
                  onClick={() =>
                    change({ to: draft.to.trim() === '' ? email : `${draft.to.trim()}, ${email}` })
                  }
                >
                  + {name}
                </WordButton>
              ))}
            </div>
          )}
        </div>
        <TextField
          label="Subject"
          value={draft.subject}
          maxLength={200}
          error={shown.subject}
          onChange={(event) => change({ subject: event.target.value })}
        />
        <TextAreaField
          label="Message"
          rows={6}
          value={draft.text}
          maxLength={10_000}
          error={shown.text}
          hint={`A link for members, your name and the usual cautions follow below it${facts.invented ? ', and that the place is invented' : ''}.`}
          onChange={(event) => change({ text: event.target.value })}
        />
        <label className="inline-flex min-h-7 cursor-pointer items-center gap-2 touch:min-h-11">
          <input
            type="checkbox"
            className="size-4 accent-ink"
            checked={draft.attach}
            onChange={(event) => change({ attach: event.target.checked })}
          />
          Attach the PDF, page and annex
        </label>
        {send.error ? (
          <ProblemNotice
            error={send.error}
            title="Not sent. What you wrote is still here; sending again repeats nothing that went out."
          />
        ) : null}
        <DialogActions>
          <Button kind="primary" type="submit" busy={send.isPending} busyLabel="Handing over">
            {chosen.length > 1 ? `Send to ${chosen.length} people` : 'Send'}
          </Button>
          <Button onClick={props.onClose}>Do not send</Button>
        </DialogActions>
      </form>
    </Dialog>
  );
}
