import type { Request } from 'express';
import { z } from 'zod';
import type { Services } from '../services.ts';
import { findRole, findSignedIn } from './access.repository.ts';
import { notFound, ProblemError } from './problem-error.ts';
import type { TokenLimits } from './access-token.ts';
import {
  scopeParameter,
  takesTokens,
  type Access,
  type CallMembership,
  type Route,
  type SignedIn,
} from './route.ts';

/** Finds the team that owns a thing; undefined when there is no such thing. */
export interface ScopeLookup {
  teamOfSite(siteId: string): Promise<string | undefined>;
  teamOfRun(runId: string): Promise<string | undefined>;
}

/** Who asks, by session or by access token. */
export interface Caller {
  person: SignedIn | undefined;
  /** undefined of whoever came with a session, or with nothing */
  token: TokenLimits | undefined;
}

export interface Admission {
  membership: CallMembership | undefined;
}

const uuid = z.uuid();

async function owningTeam(access: Exclude<Access, string>, id: string, scope: ScopeLookup) {
  if ('team' in access) return id;
  return 'site' in access ? scope.teamOfSite(id) : scope.teamOfRun(id);
}

/** The person of a request's session, which must have been loaded. */
export async function sessionCaller(request: Request, services: Services): Promise<Caller> {
  const { personId } = request.session;
  const person = personId ? await findSignedIn(services.dataSource, personId) : undefined;
  return { person, token: undefined };
}

const safe = new Set(['GET', 'HEAD']);

/** @throws ProblemError `forbidden` where a token is not taken, or may only read */
function checkToken(
  { scope }: TokenLimits,
  request: Request,
  route: Pick<Route, 'access' | 'options'>,
): void {
  if (!takesTokens(route))
    throw new ProblemError(
      'forbidden',
      'Access tokens are not taken at this address: accounts, sessions and members are for people alone. Sign in with a browser and do it there.',
    );
  if (scope === 'read' && !safe.has(request.method))
    throw new ProblemError(
      'forbidden',
      `This access token may only read; found ${request.method}, expected GET or HEAD. Make a token that may read and write.`,
    );
}

/**
 * Admits a caller by the rule of the route. Role and membership are read each time, so that a change acts at once.
 * @throws ProblemError `not-signed-in`; `not-found` for what is missing, another team's, or beyond the token's team;
 * `forbidden` for the wrong role, or for what no token or not this one may do
 */
export async function admit(
  { person, token }: Caller,
  request: Request,
  route: Pick<Route, 'access' | 'options'>,
  services: Services,
): Promise<Admission> {
  const { access } = route;
  if (token) checkToken(token, request, route);
  if (access === 'anyone') return { membership: undefined };
  if (!person) throw new ProblemError('not-signed-in', 'Sign in to go on.');
  if (access === 'signed-in') return { membership: undefined };

  const id = request.params[scopeParameter(access)];
  if (!uuid.safeParse(id).success) throw notFound();
  const teamId = await owningTeam(access, String(id), services.scope);
  if (token?.teamId && token.teamId !== teamId) throw notFound();
  const role = teamId && (await findRole(services.dataSource, teamId, person.id));
  if (!teamId || !role) throw notFound();
  const allowed = 'team' in access ? access.team : 'site' in access ? access.site : access.run;
  if (!allowed.includes(role))
    throw new ProblemError(
      'forbidden',
      `Your role in this team is ${role}; this is for ${allowed.join(', ')}.`,
    );
  return { membership: { teamId, role } };
}
