import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import { briefFactsSchema } from '#contract/brief-content.ts';
import type { BriefMessage, sendBrief as sendBriefEndpoint } from '#contract/briefs.ts';
import { readJson } from '#server/database/json-column.ts';
import { ProblemError } from '#server/middleware/problem-error.ts';
import type { SignedIn } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';
import { cautions } from '#server/printing/cautions.ts';
import { findPdf, pdfType, type BriefAddress } from './brief.service.ts';
import { messageReply, requireBrief, requireVersion } from './brief-reply.ts';
import {
  findMessage,
  findSite,
  insertMessage,
  messagesAtWork,
  messagesOf,
  recipientsSince,
  updateRecipients,
} from './brief.repository.ts';

type SendInput = z.output<typeof sendBriefEndpoint.body>;
type Recipients = BriefMessage['recipients'];

/** People that a team's briefs may go to in a day: enough for boards, too few to be of use to whoever took an account over. */
export const mostRecipientsADay = 200;
const day = 24 * 60 * 60 * 1000;

/** What was sent of a brief, newest first. @throws ProblemError `not-found` */
export async function listBriefMessages(
  { dataSource: { manager }, config }: Services,
  { siteId, briefId }: BriefAddress,
): Promise<{ messages: BriefMessage[]; mailServer: boolean }> {
  await requireBrief(manager, siteId, briefId);
  const messages = (await messagesOf(manager, briefId)).map(messageReply);
  return { messages, mailServer: config.smtpUrl !== undefined };
}

/**
 * Sends a version of a brief, each person a message of their own, after the answer is out. What is known by its key
 * already is not sent again, whatever else the request says.
 * @throws ProblemError `not-found`; `too-many-requests` where the team has written to too many people today
 */
export async function sendBrief(
  services: Services,
  address: BriefAddress,
  { key, version, to, subject, text, attach }: SendInput,
  sender: SignedIn,
): Promise<BriefMessage> {
  const { siteId, briefId } = address;
  const { row, fresh, teamId } = await services.write(async (manager) => {
    await requireBrief(manager, siteId, briefId);
    await requireVersion(manager, briefId, version);
    const { teamId } = (await findSite(manager, siteId))!;
    const known = await findMessage(manager, briefId, key);
    if (known) return { row: known, fresh: false, teamId };
    const now = services.clock();
    const today = await recipientsSince(manager, teamId, new Date(now.getTime() - day).toISOString());
    if (today + to.length > mostRecipientsADay)
      throw new ProblemError(
        'too-many-requests',
        `Found ${to.length} people beside the ${today} to whom this team sent briefs since yesterday; at most ${mostRecipientsADay} a day are written to. Send the rest tomorrow, or download the PDF and send it with your own mail program.`,
      );
    const recipients: Recipients = to.map((each) => ({ address: each, status: 'sending', error: null }));
    const row = {
      id: randomUUID(),
      briefId,
      key,
      version,
      subject,
      text,
      attached: attach,
      recipients: JSON.stringify(recipients),
      sentAt: now.toISOString(),
      sentBy: sender.name,
    };
    await insertMessage(manager, row);
    return { row, fresh: true, teamId };
  });
  const message = messageReply(row);
  if (fresh) services.mail.later(() => deliver(services, address, message, { sender, teamId }));
  return message;
}

/** Hands the message on to one person after the other, and writes down what became of each. */
async function deliver(
  services: Services,
  address: BriefAddress,
  message: BriefMessage,
  { sender, teamId }: { sender: SignedIn; teamId: string },
): Promise<void> {
  const { id, version, attached, subject } = message;
  const recipients: Recipients = message.recipients.map((each) => ({ ...each }));
  const keep = () => services.write((manager) => updateRecipients(manager, id, JSON.stringify(recipients)));
  try {
    const attachments = attached ? [await pdfOf(services, address, version)] : [];
    const text = await letterOf(services, address, message, sender.name);
    for (const each of recipients) {
      Object.assign(
        each,
        await services.mail.post({
          to: each.address,
          replyTo: sender.email,
          subject,
          text,
          attachments,
          teamId,
        }),
      );
      await keep();
    }
  } catch (error) {
    for (const each of recipients)
      if (each.status === 'sending')
        Object.assign(each, { status: 'failed', error: 'The message could not be put together.' });
    await keep();
    throw error;
  }
}

async function pdfOf(services: Services, address: BriefAddress, version: number) {
  const { hash, fileName } = await findPdf(services, address, version);
  return { filename: fileName, content: await services.blobs.read(hash), contentType: pdfType };
}

/** The words that people wrote, where to read the brief, and what must be said with it. */
async function letterOf(
  { config, dataSource }: Services,
  { siteId, briefId }: BriefAddress,
  { text, version, attached }: BriefMessage,
  by: string,
): Promise<string> {
  const row = await requireVersion(dataSource.manager, briefId, version);
  const { teamName, siteName, invented } = readJson(briefFactsSchema, row.facts);
  const link = `${config.publicUrl}/sites/${siteId}/briefs/${briefId}?version=${version}`;
  const where = attached
    ? `The brief is attached. Members of ${teamName} also read it here:`
    : `Members of ${teamName} read the brief here:`;
  const place = invented ? ' The place, its people and its data are invented.' : '';
  return `${text}\n\n${where}\n${link}\n\nSent by ${by}, ${teamName}, about ${siteName}.${place}\n${cautions.join(' ')}\n`;
}

/** What an earlier process was in the middle of sending is told as such, and not sent again: it may have arrived. */
export async function settleBriefMail(services: Services): Promise<void> {
  await services.write(async (manager) => {
    for (const row of await messagesAtWork(manager)) {
      const recipients = messageReply(row).recipients.map((each) =>
        each.status === 'sending'
          ? {
              ...each,
              status: 'failed' as const,
              error:
                'The server ended while this was being sent. It may have arrived; ask before you send it again.',
            }
          : each,
      );
      await updateRecipients(manager, row.id, JSON.stringify(recipients));
    }
  });
}
