import { downloadOutboxMessage, getOutboxMessage, listOutbox } from '#contract/people.ts';
import type { OutboxMessage } from '#server/database/entities/outbox-message.ts';
import { composeMessage } from '#server/mail/compose.ts';
import { findMessage, listMessages } from '#server/mail/outbox.repository.ts';
import { notFound } from '#server/middleware/problem-error.ts';
import { route, sessionsOnly, type Route } from '#server/middleware/route.ts';
import type { Services } from '#server/services.ts';

const view = ({ recipient, ...message }: OutboxMessage) => ({ ...message, to: recipient });

export const outboxRoutes = ({ config, dataSource }: Services): Route[] => {
  const find = async ({ teamId, messageId }: { teamId: string; messageId: string }) => {
    const message = await findMessage(dataSource, teamId, messageId);
    if (!message) throw notFound();
    return message;
  };
  return [
    route(
      listOutbox,
      { team: ['admin'] },
      async ({ params }) => ({
        messages: (await listMessages(dataSource, params.teamId)).map(view),
        mailServer: config.smtpUrl !== undefined,
      }),
      sessionsOnly,
    ),

    route(
      getOutboxMessage,
      { team: ['admin'] },
      async ({ params }) => view(await find(params)),
      sessionsOnly,
    ),

    route(
      downloadOutboxMessage,
      { team: ['admin'] },
      async ({ params }) => {
        const { id, recipient, subject, text, sentAt } = await find(params);
        const message = { id, from: config.mailFrom, to: recipient, subject, text, date: new Date(sentAt) };
        return {
          bytes: await composeMessage(message),
          type: 'message/rfc822',
          fileName: `${subject.replace(/[^\p{L}\p{N} .-]/gu, '')}.eml`,
        };
      },
      sessionsOnly,
    ),
  ];
};
