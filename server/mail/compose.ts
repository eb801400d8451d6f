import { createTransport } from 'nodemailer';

export interface PlainMessage {
  from: string;
  to: string;
  subject: string;
  text: string;
  date: Date;
  /** makes the Message-ID */
  id: string;
  /** to whom answers go, where that is not the sender */
  replyTo?: string;
  attachments?: { filename: string; content: Buffer; contentType: string }[];
}

const composer = createTransport({ streamTransport: true, buffer: true, newline: 'windows' });

/** The message as nodemailer takes it. */
export function asMail({ id, ...message }: PlainMessage) {
  const domain = message.from.match(/@([\w.-]+)/)?.[1] ?? 'localhost';
  return { ...message, messageId: `<${id}@${domain}>` };
}

/** The message as an .eml file (RFC 5322). */
export async function composeMessage(message: PlainMessage): Promise<Buffer> {
  const { message: bytes } = await composer.sendMail(asMail(message));
  return bytes as Buffer;
}
