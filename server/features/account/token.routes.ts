import {
  listMyTokens,
  longestTokenDays,
  makeMyToken,
  mostTokens,
  revokeMyToken,
} from '#contract/access-tokens.ts';
import { findRole } from '#server/middleware/access.repository.ts';
import { fieldProblem, notFound, ProblemError } from '#server/middleware/problem-error.ts';
import { route, type Route } from '#server/middleware/route.ts';
import {
  addAccessToken,
  countWorkingTokens,
  forgetEndedTokens,
  listAccessTokens,
  revokeTokensOf,
  viewTokens,
} from '#server/people/access-tokens.repository.ts';
import type { Services } from '#server/services.ts';

const dayMs = 86_400_000;

function checkExpiry(expiresAt: string, now: Date): void {
  const days = (Date.parse(expiresAt) - now.getTime()) / dayMs;
  if (days <= 0) throw fieldProblem('expiresAt', 'Found a time that is over; expected one to come');
  if (days > longestTokenDays)
    throw fieldProblem(
      'expiresAt',
      `Found ${Math.ceil(days)} days from now; expected at most ${longestTokenDays}. Make a new token when it runs out`,
    );
}

/** The access tokens of whoever is signed in, for their scripts. */
export const tokenRoutes = (services: Services): Route[] => {
  const { dataSource, write, clock } = services;
  return [
    route(listMyTokens, 'signed-in', async ({ person }) => ({
      tokens: await listAccessTokens(dataSource.manager, person.id),
    })),

    route(makeMyToken, 'signed-in', async ({ person, body }) => {
      const now = clock();
      checkExpiry(body.expiresAt, now);
      if (body.teamId !== null && !(await findRole(dataSource, body.teamId, person.id)))
        throw fieldProblem('teamId', 'Found a team that you are not a member of; choose one of yours');
      return write(async (manager) => {
        await forgetEndedTokens(manager, now);
        if ((await countWorkingTokens(manager, person.id, now)) >= mostTokens)
          throw new ProblemError(
            'conflict',
            `You have ${mostTokens} tokens that work, which is the most. Revoke one that you no longer use.`,
          );
        const { token, row } = await addAccessToken(manager, person.id, body, now);
        const [made] = await viewTokens(manager, [row]);
        return { token, made };
      });
    }),

    route(revokeMyToken, 'signed-in', async ({ person, params }) => {
      const revoked = await write((manager) => revokeTokensOf(manager, person.id, clock(), params.tokenId));
      if (revoked === 0) throw notFound();
    }),
  ];
};
