import { changeMyName, changeMyPassword, endMySession, listMySessions } from '#contract/people.ts';
import { notFound, ProblemError } from '#server/middleware/problem-error.ts';
import { route, type Route } from '#server/middleware/route.ts';
import { endSessionsOf, setPasswordHash } from '#server/people/people.repository.ts';
import { viewSession } from '#server/people/session-view.repository.ts';
import type { Services } from '#server/services.ts';
import { endOneSession, listOpenSessions, passwordHashOf, renamePerson } from './account.repository.ts';

export const accountRoutes = (services: Services): Route[] => {
  const { dataSource, write, passwords, clock } = services;
  return [
    route(listMySessions, 'signed-in', async ({ person, request }) => {
      const rows = await listOpenSessions(dataSource, person.id, clock());
      const sessions = rows.map(({ id, device, startedAt, seenAt }) => ({
        id,
        current: id === request.session.openSessionId,
        device,
        startedAt,
        seenAt,
      }));
      return { sessions };
    }),

    route(endMySession, 'signed-in', async ({ person, params }) => {
      const ended = await write((manager) => endOneSession(manager, person.id, params.sessionId));
      if (!ended) throw notFound();
    }),

    route(changeMyName, 'signed-in', async ({ person, body }) => {
      await write((manager) => renamePerson(manager, person.id, body.name));
      return viewSession(services, person.id);
    }),

    route(
      changeMyPassword,
      'signed-in',
      async ({ person, body, request }) => {
        const present = await passwordHashOf(dataSource, person.id);
        if (!(await passwords.matches(body.current, present)))
          throw new ProblemError('invalid-request', 'The present password is not right.', {
            fields: [{ field: 'current', message: 'This is not your present password' }],
          });
        const passwordHash = await passwords.hash(body.password);
        await write(async (manager) => {
          await setPasswordHash(manager, person.id, passwordHash);
          await endSessionsOf(manager, person.id, request.session.openSessionId);
        });
      },
      { limitAttempts: 'refused' },
    ),
  ];
};
