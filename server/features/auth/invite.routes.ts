import { acceptInvite, getInvite, passwordSchema } from '#contract/people.ts';
import type { Person } from '#server/database/entities/person.ts';
import { problemOfIssues } from '#server/middleware/classify-error.ts';
import { fieldProblem, ProblemError } from '#server/middleware/problem-error.ts';
import { route, type Route } from '#server/middleware/route.ts';
import { startSession } from '#server/middleware/session.ts';
import { mayEnter } from '#server/people/may-enter.ts';
import { addMember, addPerson, findPersonByEmail } from '#server/people/people.repository.ts';
import { viewSession } from '#server/people/session-view.repository.ts';
import type { Services } from '#server/services.ts';
import { findOpenInvite, isMember, useInvite } from './invite.repository.ts';

const gone = () =>
  new ProblemError(
    'gone',
    'This invite was used, withdrawn or has run out. Ask an admin of the team to send another.',
  );

/** A new account's name and password hash, refused at the field that is missing or weak. */
async function newAccount({ passwords }: Services, name: string | undefined, password: string) {
  if (name === undefined) throw fieldProblem('name', 'Give your name');
  const checked = passwordSchema.safeParse(password);
  if (!checked.success)
    throw problemOfIssues(checked.error.issues.map((issue) => ({ ...issue, path: ['password'] })));
  return { name, passwordHash: await passwords.hash(password) };
}

async function checkPresentPassword({ passwords, config }: Services, person: Person, password: string) {
  const matched = await passwords.matches(password, person.passwordHash);
  if (!matched || !mayEnter(person.email, config))
    throw new ProblemError(
      'wrong-credentials',
      `There is an account for ${person.email}; this is not its password. Try again, or set a new one first.`,
    );
}

export const inviteRoutes = (services: Services): Route[] => {
  const { dataSource, write, clock } = services;
  const find = async (token: string) => {
    const invite = await findOpenInvite(dataSource.manager, token, clock());
    if (!invite) throw gone();
    return { invite, person: await findPersonByEmail(dataSource.manager, invite.email) };
  };
  return [
    route(
      getInvite,
      'anyone',
      async ({ params }) => {
        const { invite, person } = await find(params.token);
        const { teamName, email, role } = invite;
        return { teamName, email, role, hasAccount: person !== undefined };
      },
      { limitAttempts: 'refused' },
    ),

    route(
      acceptInvite,
      'anyone',
      async ({ params, body, request }) => {
        const { invite, person } = await find(params.token);
        const { email, teamId, role } = invite;
        if (person) await checkPresentPassword(services, person, body.password);
        const account = person ? undefined : await newAccount(services, body.name, body.password);
        const personId = await write(async (manager) => {
          if (!(await useInvite(manager, invite.id))) throw gone();
          if (account && (await findPersonByEmail(manager, email)))
            throw new ProblemError(
              'conflict',
              `An account for ${email} was made meanwhile. Open the link again.`,
            );
          const id = account ? (await addPerson(manager, { email, ...account }, clock())).id : person!.id;
          if (await isMember(manager, teamId, id))
            throw new ProblemError('conflict', `${email} is already in ${invite.teamName}. Sign in instead.`);
          await addMember(manager, teamId, id, role, clock());
          return id;
        });
        await startSession(request, personId, clock());
        return viewSession(services, personId);
      },
      { limitAttempts: 'refused' },
    ),
  ];
};
