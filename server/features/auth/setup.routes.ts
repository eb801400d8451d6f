import { completeSetup, getSetup } from '#contract/people.ts';
import { fieldProblem, ProblemError } from '#server/middleware/problem-error.ts';
import { route, type Route } from '#server/middleware/route.ts';
import { startSession } from '#server/middleware/session.ts';
import { dropLinks, findLink } from '#server/people/one-time-links.repository.ts';
import { findPersonByEmail } from '#server/people/people.repository.ts';
import { viewSession } from '#server/people/session-view.repository.ts';
import { addTeamWithAdmin } from '#server/people/team-with-admin.repository.ts';
import type { Services } from '#server/services.ts';

const gone = () =>
  new ProblemError(
    'gone',
    'This set-up link was used or has run out. Start the server again: it prints a new one while nobody has an account.',
  );

export const setupRoutes = (services: Services): Route[] => {
  const { dataSource, write, passwords, clock } = services;
  return [
    route(
      getSetup,
      'anyone',
      async ({ params }) => {
        if (!(await findLink(dataSource.manager, 'setup', params.token, clock()))) throw gone();
        return { open: true as const };
      },
      { limitAttempts: 'refused' },
    ),

    route(
      completeSetup,
      'anyone',
      async ({ params, body, request }) => {
        if (!(await findLink(dataSource.manager, 'setup', params.token, clock()))) throw gone();
        const { email, name, teamName } = body;
        const passwordHash = await passwords.hash(body.password);
        const personId = await write(async (manager) => {
          if (!(await findLink(manager, 'setup', params.token, clock()))) throw gone();
          if (await findPersonByEmail(manager, email))
            throw fieldProblem('email', 'This address is taken by a demo account. Use your own');
          await dropLinks(manager, 'setup', null);
          return addTeamWithAdmin(manager, teamName, { email, name, passwordHash }, clock());
        });
        await startSession(request, personId, clock());
        return viewSession(services, personId);
      },
      { limitAttempts: 'refused' },
    ),
  ];
};
