import {
  changeMemberRole,
  createTeam,
  endMemberSessions,
  listMembers,
  listMyTeams,
  removeMember,
  roles,
  type Role,
} from '#contract/people.ts';
import type { Manager } from '#server/database/manager.ts';
import { notFound, ProblemError } from '#server/middleware/problem-error.ts';
import { route, sessionsOnly, type Route } from '#server/middleware/route.ts';
import { revokeTokensOf } from '#server/people/access-tokens.repository.ts';
import { addMember, addTeam, endSessionsOf } from '#server/people/people.repository.ts';
import { viewSession } from '#server/people/session-view.repository.ts';
import type { Services } from '#server/services.ts';
import { countAdmins, dropMembership, findMembership, listMembersOf, setRole } from './members.repository.ts';

interface MemberParams {
  teamId: string;
  personId: string;
}

async function requireMember(manager: Manager, { teamId, personId }: MemberParams) {
  const membership = await findMembership(manager, teamId, personId);
  if (!membership) throw notFound();
  return membership;
}

/** Refuses whatever would leave a team without an admin: nobody could invite or set roles any more. */
async function keepAnAdmin(manager: Manager, params: MemberParams, becomes: Role | undefined): Promise<void> {
  const { role } = await requireMember(manager, params);
  if (role !== 'admin' || becomes === 'admin') return;
  if ((await countAdmins(manager, params.teamId)) <= 1)
    throw new ProblemError(
      'conflict',
      'This is the only admin of the team, and a team needs one. Make somebody else an admin first.',
    );
}

export const memberRoutes = (services: Services): Route[] => {
  const { dataSource, write, clock } = services;
  return [
    route(
      listMyTeams,
      'signed-in',
      async ({ person, token }) => {
        const { memberships } = await viewSession(services, person.id);
        return { teams: memberships.filter(({ teamId }) => !token?.teamId || token.teamId === teamId) };
      },
      { tokens: 'taken' },
    ),

    route(createTeam, 'signed-in', async ({ person, body }) => {
      await write(async (manager) => {
        const team = await addTeam(manager, body.name, clock());
        await addMember(manager, team.id, person.id, 'admin', clock());
      });
      return viewSession(services, person.id);
    }),

    route(
      listMembers,
      { team: roles },
      async ({ params }) => ({ members: await listMembersOf(dataSource.manager, params.teamId, clock()) }),
      sessionsOnly,
    ),

    route(
      changeMemberRole,
      { team: ['admin'] },
      ({ params, body }) =>
        write(async (manager) => {
          await keepAnAdmin(manager, params, body.role);
          await setRole(manager, params.teamId, params.personId, body.role);
          const members = await listMembersOf(manager, params.teamId, clock());
          return members.find((member) => member.personId === params.personId)!;
        }),
      sessionsOnly,
    ),

    route(
      removeMember,
      { team: ['admin'] },
      ({ params }) =>
        write(async (manager) => {
          await keepAnAdmin(manager, params, undefined);
          await dropMembership(manager, params.teamId, params.personId);
        }),
      sessionsOnly,
    ),

    route(
      endMemberSessions,
      { team: ['admin'] },
      ({ params }) =>
        write(async (manager) => {
          await requireMember(manager, params);
          await endSessionsOf(manager, params.personId);
          await revokeTokensOf(manager, params.personId, clock());
        }),
      sessionsOnly,
    ),
  ];
};
