import { listInvites, sendInvite, withdrawInvite } from '#contract/people.ts';
import { inviteLetter } from '#server/mail/letters.ts';
import { notFound, ProblemError } from '#server/middleware/problem-error.ts';
import { route, sessionsOnly, type Route } from '#server/middleware/route.ts';
import { makeToken } from '#server/people/tokens.ts';
import type { Services } from '#server/services.ts';
import {
  dropInvite,
  isMemberByEmail,
  listOpenInvites,
  replaceInvite,
  teamNameOf,
} from './invites.repository.ts';

const days = 7;

export const teamInviteRoutes = (services: Services): Route[] => {
  const { config, dataSource, write, mail, clock } = services;
  return [
    route(
      listInvites,
      { team: ['admin'] },
      async ({ params }) => ({ invites: await listOpenInvites(dataSource.manager, params.teamId, clock()) }),
      sessionsOnly,
    ),

    route(
      sendInvite,
      { team: ['admin'] },
      async ({ params, body, person }) => {
        const { email, role } = body;
        const { token, tokenHash } = makeToken();
        const now = clock();
        const expiresAt = new Date(now.getTime() + days * 86_400_000);
        const { invite, teamName } = await write(async (manager) => {
          if (await isMemberByEmail(manager, params.teamId, email))
            throw new ProblemError('conflict', `${email} is already in this team. Change the role there.`);
          const invite = await replaceInvite(manager, {
            teamId: params.teamId,
            email,
            role,
            tokenHash,
            sentAt: now.toISOString(),
            expiresAt: expiresAt.toISOString(),
            invitedById: person.id,
          });
          return { invite, teamName: await teamNameOf(manager, params.teamId) };
        });
        const link = `${config.publicUrl}/invite/${token}`;
        const letter = inviteLetter({ teamName, invitedBy: person.name, role, link, days });
        await mail.send({ to: email, letter, teamIds: [params.teamId], showLink: 'unless-sent' });
        return { ...invite, invitedBy: person.name };
      },
      { limitAttempts: 'all', ...sessionsOnly },
    ),

    route(
      withdrawInvite,
      { team: ['admin'] },
      async ({ params }) => {
        const dropped = await write((manager) => dropInvite(manager, params.teamId, params.inviteId));
        if (!dropped) throw notFound();
      },
      sessionsOnly,
    ),
  ];
};
