import { getSession, listDemoAccounts, signIn, signOut } from '#contract/people.ts';
import { ProblemError } from '#server/middleware/problem-error.ts';
import { route, type Route } from '#server/middleware/route.ts';
import { endSession, startSession } from '#server/middleware/session.ts';
import { mayEnter } from '#server/people/may-enter.ts';
import { findPersonByEmail } from '#server/people/people.repository.ts';
import { openDemoAccounts, viewSession } from '#server/people/session-view.repository.ts';
import type { Services } from '#server/services.ts';

/** The same words for an unknown address and for a wrong password. */
const wrongCredentials = () =>
  new ProblemError('wrong-credentials', 'E-mail address and password do not belong together. Try again.');

export const sessionRoutes = (services: Services): Route[] => {
  const { config, dataSource, passwords, clock } = services;
  return [
    route(getSession, 'anyone', ({ person }) => viewSession(services, person?.id)),

    route(
      signIn,
      'anyone',
      async ({ body, request }) => {
        const person = await findPersonByEmail(dataSource.manager, body.email);
        const matched = await passwords.matches(body.password, person?.passwordHash);
        if (!person || !matched || !mayEnter(person.email, config)) throw wrongCredentials();
        await startSession(request, person.id, clock());
        return viewSession(services, person.id);
      },
      { limitAttempts: 'refused' },
    ),

    route(signOut, 'anyone', async ({ request, response }) => {
      await endSession(request, response, config.publicUrl);
    }),

    route(listDemoAccounts, 'anyone', async () => {
      const accounts = await openDemoAccounts(dataSource, config.demo);
      return { accounts: [...accounts] };
    }),
  ];
};
