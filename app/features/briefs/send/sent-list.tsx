import { useQuery } from '@tanstack/react-query';
import type { Brief, BriefMessage } from '#contract/briefs.ts';
import { ProblemNotice } from '#app/components/notice.tsx';
import { formatDateTime } from '#app/lib/formats.ts';
import { briefMessagesQuery } from '../briefs-query.ts';

const stateWords: Record<BriefMessage['recipients'][number]['status'], string> = {
  sending: 'on its way',
  sent: 'sent',
  outbox: 'in the local outbox',
  failed: 'refused',
};

/** Who was sent what of a brief, and what became of it. */
export function SentList({ brief }: { brief: Pick<Brief, 'siteId' | 'id'> }) {
  const sent = useQuery(briefMessagesQuery(brief.siteId, brief.id));
  const messages = sent.data?.messages ?? [];
  return (
    <section aria-label="Who has it" className="border-t border-rule py-2">
      <h2 className="text-body font-bold">Who has it</h2>
      {sent.error ? <ProblemNotice error={sent.error} title="The list did not come." /> : null}
      {sent.isSuccess && messages.length === 0 && <p className="text-note text-ink-2">Sent to nobody yet.</p>}
      <ul aria-live="polite">
        {messages.map((message) => (
          <li key={message.id} className="border-t border-rule-2 py-1.5 first:border-t-0">
            <p className="text-note text-ink-2">
              Version {message.version}, {formatDateTime(message.sentAt)}, by {message.sentBy}
              {message.attached ? ', with the PDF' : ', with a link'}
            </p>
            <p className="break-words">{message.subject}</p>
            {message.recipients.map(({ address, status, error }) => (
              <p key={address} className="text-note">
                <span className="font-mono break-all">{address}</span>{' '}
                <b className={status === 'failed' ? 'text-danger' : ''}>{stateWords[status]}</b>
                {error !== null && <span className="block text-danger">{error}</span>}
              </p>
            ))}
          </li>
        ))}
      </ul>
      {sent.data && !sent.data.mailServer && (
        <p className="text-note text-ink-2">
          No mail server is set: messages stay in the outbox on the team page and in the server’s outbox
          folder, the PDF with them.
        </p>
      )}
    </section>
  );
}
