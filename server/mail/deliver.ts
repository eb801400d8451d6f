import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { createTransport } from 'nodemailer';
import type { Config } from '../config.ts';
import type { OutboxMessage } from '../database/entities/outbox-message.ts';
import { asMail, composeMessage, type PlainMessage } from './compose.ts';

export type Delivery = Pick<OutboxMessage, 'status' | 'error'>;
/** Hands a message on; a failure is an outcome, never an exception. */
export type Deliver = (message: PlainMessage) => Promise<Delivery>;

/** Through the mail server. */
function toServer(url: string): Deliver {
  const seconds = 1000;
  const transport = createTransport({
    url,
    connectionTimeout: 10 * seconds,
    greetingTimeout: 10 * seconds,
    socketTimeout: 20 * seconds,
  });
  return async (message) => {
    await transport.sendMail(asMail(message));
    return { status: 'sent', error: null };
  };
}

/** Into `outbox/` of the data folder, as .eml files that only whoever runs the server can read. */
function toFolder(folder: string): Deliver {
  return async (message) => {
    await mkdir(folder, { recursive: true, mode: 0o700 });
    const stamp = message.date.toISOString().replace(/[:.]/g, '-');
    await writeFile(join(folder, `${stamp}-${message.id}.eml`), await composeMessage(message), {
      mode: 0o600,
      flag: 'wx',
    });
    return { status: 'outbox', error: null };
  };
}

/** The way out for e-mail: the mail server where one is set, else the local outbox. */
export function createDelivery({ smtpUrl, dataDir }: Config): Deliver {
  const deliver = smtpUrl ? toServer(smtpUrl) : toFolder(join(dataDir, 'outbox'));
  return async (message) => {
    try {
      return await deliver(message);
    } catch (error) {
      return { status: 'failed', error: (error as Error).message };
    }
  };
}
