import { useQuery } from '@tanstack/react-query';
import { Button } from '#app/components/button.tsx';
import { Dialog, DialogActions } from '#app/components/dialog.tsx';
import { LoadingLines } from '#app/components/loading-lines.tsx';
import { ProblemNotice } from '#app/components/notice.tsx';
import { WordAnchor } from '#app/components/word-button.tsx';
import { messageFileUrl, outboxMessageQuery } from './outbox.ts';

/** One message, to be read as its reader gets it. */
export function MessageDialog(props: { teamId: string; messageId: string; onClose: () => void }) {
  const message = useQuery(outboxMessageQuery(props.teamId, props.messageId));
  return (
    <Dialog
      open
      wide
      onOpenChange={(open) => !open && props.onClose()}
      title={message.data?.subject ?? 'Message'}
      description={message.data && `To ${message.data.to}`}
    >
      {message.isPending && <LoadingLines label="Opening the message" lines={4} />}
      {message.isError && <ProblemNotice error={message.error} className="mt-3" />}
      {message.isSuccess && (
        <pre className="mt-3 border-t border-rule pt-3 font-sans text-body break-words whitespace-pre-wrap select-text">
          {message.data.text}
        </pre>
      )}
      <DialogActions>
        <Button onClick={props.onClose}>Close</Button>
        <WordAnchor href={messageFileUrl(props.teamId, props.messageId)} download>
          Download as .eml
        </WordAnchor>
      </DialogActions>
    </Dialog>
  );
}
