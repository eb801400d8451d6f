import { completePasswordReset, requestPasswordReset } from '#contract/people.ts';
import { resetLetter } from '#server/mail/letters.ts';
import { ProblemError } from '#server/middleware/problem-error.ts';
import { route, type Route } from '#server/middleware/route.ts';
import { mayEnter } from '#server/people/may-enter.ts';
import { revokeTokensOf } from '#server/people/access-tokens.repository.ts';
import { dropLinks, findLink, makeLink } from '#server/people/one-time-links.repository.ts';
import {
  endSessionsOf,
  findPersonByEmail,
  setPasswordHash,
  teamIdsOf,
} from '#server/people/people.repository.ts';
import type { Services } from '#server/services.ts';

const minutes = 60;

const gone = () =>
  new ProblemError('gone', 'This link was used, replaced by a later one, or has run out. Ask for a new one.');

async function sendReset({ config, write, mail, clock }: Services, email: string): Promise<void> {
  if (!mayEnter(email, config)) return;
  const made = await write(async (manager) => {
    const person = await findPersonByEmail(manager, email);
    if (!person) return undefined;
    const expiresAt = new Date(clock().getTime() + minutes * 60_000);
    const token = await makeLink(manager, 'password-reset', person.id, expiresAt);
    return { name: person.name, token, teamIds: await teamIdsOf(manager, person.id) };
  });
  if (!made) return;
  const link = `${config.publicUrl}/reset/${made.token}`;
  const letter = resetLetter({ name: made.name, link, minutes });
  await mail.send({ to: email, letter, teamIds: made.teamIds, showLink: 'never' });
}

export const passwordResetRoutes = (services: Services): Route[] => {
  const { dataSource, write, passwords, mail, clock } = services;
  return [
    route(
      requestPasswordReset,
      'anyone',
      ({ body }) => {
        // Looked up after the answer is out: neither its words nor its time tell whether there is an account.
        mail.later(() => sendReset(services, body.email));
      },
      { limitAttempts: 'all' },
    ),

    route(
      completePasswordReset,
      'anyone',
      async ({ params, body }) => {
        if (!(await findLink(dataSource.manager, 'password-reset', params.token, clock()))) throw gone();
        const passwordHash = await passwords.hash(body.password);
        await write(async (manager) => {
          const link = await findLink(manager, 'password-reset', params.token, clock());
          if (!link?.personId) throw gone();
          await dropLinks(manager, 'password-reset', link.personId);
          await setPasswordHash(manager, link.personId, passwordHash);
          await endSessionsOf(manager, link.personId);
          await revokeTokensOf(manager, link.personId, clock());
        });
      },
      { limitAttempts: 'refused' },
    ),
  ];
};
