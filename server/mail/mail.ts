import { randomUUID } from 'node:crypto';
import type { Logger } from 'pino';
import type { Config } from '../config.ts';
import type { Write } from '../database/write-queue.ts';
import type { PlainMessage } from './compose.ts';
import { createDelivery, type Delivery } from './deliver.ts';
import type { Letter } from './letters.ts';
import { addMessages } from './outbox.repository.ts';

/** What stands in a kept message in place of a link that must not be read there. */
export const maskedLink = '(The link is left out here: it opens an account.)';

export interface Addressed {
  to: string;
  letter: Letter;
  /** the teams whose admins see that this message was sent */
  teamIds: readonly string[];
  /**
   * Whether the admin may read the link. `never` is for links that open an existing account: they reach the recipient, or
   * the .eml file that whoever runs the server can read, but neither the database nor an admin, who could else take over
   * the accounts of members. `unless-sent` is for invites, which the admin can hand over by other means.
   */
  showLink: 'never' | 'unless-sent';
}

/** A message that somebody wrote, with what goes with it. */
export interface Written {
  to: string;
  replyTo: string;
  subject: string;
  text: string;
  attachments: NonNullable<PlainMessage['attachments']>;
  /** the team in whose outbox it is kept */
  teamId: string;
}

export interface Mail {
  /** Delivers a message and keeps it in the outbox. A failed delivery is kept as such; it does not throw. */
  send(message: Addressed): Promise<void>;
  /** Delivers what somebody wrote, keeps its words in the outbox, and says what became of it; it does not throw. */
  post(message: Written): Promise<Delivery>;
  /** Does something after the answer is out, so that its duration tells the asker nothing. Errors are logged. */
  later(work: () => Promise<void>): void;
  /** resolves when nothing is left of `later` */
  idle(): Promise<void>;
}

interface Parts {
  config: Config;
  write: Write;
  clock: () => Date;
  log: Logger;
}

export function createMail({ config, write, clock, log }: Parts): Mail {
  const deliver = createDelivery(config);
  const pending = new Set<Promise<void>>();
  return {
    async send({ to, letter, teamIds, showLink }) {
      const date = clock();
      const { subject, link } = letter;
      const message = { id: randomUUID(), from: config.mailFrom, to, subject, text: letter.text(link), date };
      const { status, error } = await deliver(message);
      if (status === 'failed') log.warn({ reason: error }, 'an e-mail could not be delivered');
      const hidden = showLink === 'never' || status === 'sent';
      const text = hidden ? letter.text(maskedLink) : message.text;
      const kept = { recipient: to, subject, text, sentAt: date.toISOString(), status, error };
      await write((manager) =>
        addMessages(
          manager,
          teamIds.map((teamId) => ({ id: randomUUID(), teamId, ...kept })),
        ),
      );
    },
    async post({ teamId, ...message }) {
      const date = clock();
      const delivery = await deliver({ id: randomUUID(), from: config.mailFrom, date, ...message });
      if (delivery.status === 'failed')
        log.warn({ reason: delivery.error }, 'an e-mail could not be delivered');
      const { to, subject, text, attachments } = message;
      const files = attachments.map(({ filename }) => `\n(Attached: ${filename})\n`).join('');
      const kept = { recipient: to, subject, text: `${text}${files}`, sentAt: date.toISOString() };
      await write((manager) => addMessages(manager, [{ id: randomUUID(), teamId, ...kept, ...delivery }]));
      return delivery;
    },
    later(work) {
      const done = work()
        .catch((error: unknown) => log.error({ err: error }, 'work in the background failed'))
        .finally(() => pending.delete(done));
      pending.add(done);
    },
    async idle() {
      while (pending.size > 0) await Promise.all(pending);
    },
  };
}
