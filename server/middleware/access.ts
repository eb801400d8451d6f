import type { Request } from 'express';
import { z } from 'zod';
import type { Services } from '../services.ts';
import { findRole, findSignedIn } from './access.repository.ts';
import { notFound, ProblemError } from './problem-error.ts';
import { scopeParameter, type Access, type CallMembership, type SignedIn } from './route.ts';

/** Finds the team that owns a thing; undefined when there is no such thing. */
export interface ScopeLookup {
  teamOfSite(siteId: string): Promise<string | undefined>;
  teamOfRun(runId: string): Promise<string | undefined>;
}

export interface Admission {
  person: SignedIn | undefined;
  membership: CallMembership | undefined;
}

const uuid = z.uuid();

async function owningTeam(access: Exclude<Access, string>, id: string, scope: ScopeLookup) {
  if ('team' in access) return id;
  return 'site' in access ? scope.teamOfSite(id) : scope.teamOfRun(id);
}

/**
 * Admits a request by the rule of its route. Role and membership are read each time, so that a change acts at once.
 * @throws ProblemError `not-signed-in`; `not-found` for what is missing or another team's; `forbidden` for the wrong role
 */
export async function admit(request: Request, access: Access, services: Services): Promise<Admission> {
  const { personId } = request.session;
  const person = personId ? await findSignedIn(services.dataSource, personId) : undefined;
  if (access === 'anyone') return { person, membership: undefined };
  if (!person) throw new ProblemError('not-signed-in', 'Sign in to go on.');
  if (access === 'signed-in') return { person, membership: undefined };

  const id = request.params[scopeParameter(access)];
  if (!uuid.safeParse(id).success) throw notFound();
  const teamId = await owningTeam(access, String(id), services.scope);
  const role = teamId && (await findRole(services.dataSource, teamId, person.id));
  if (!teamId || !role) throw notFound();
  const allowed = 'team' in access ? access.team : 'site' in access ? access.site : access.run;
  if (!allowed.includes(role))
    throw new ProblemError(
      'forbidden',
      `Your role in this team is ${role}; this is for ${allowed.join(', ')}.`,
    );
  return { person, membership: { teamId, role } };
}
