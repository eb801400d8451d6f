import { mutationOptions, queryOptions, type QueryClient } from '@tanstack/react-query';
import {
  changeMemberRole,
  endMemberSessions,
  listMembers,
  removeMember,
  type Role,
} from '#contract/people.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { sessionKey } from '#app/lib/query-client.ts';

export const membersQuery = (teamId: string) =>
  queryOptions({
    queryKey: ['team', teamId, 'members'],
    queryFn: async ({ signal }) => (await callEndpoint(listMembers, { params: { teamId }, signal })).members,
  });

/** One's own role or sessions may be what changed, so both lists are asked for again. */
const refresh = (queryClient: QueryClient, teamId: string) => () =>
  Promise.all([
    queryClient.invalidateQueries({ queryKey: membersQuery(teamId).queryKey }),
    queryClient.invalidateQueries({ queryKey: sessionKey }),
  ]);

export const changeRoleMutation = (queryClient: QueryClient, teamId: string) =>
  mutationOptions({
    mutationFn: ({ personId, role }: { personId: string; role: Role }) =>
      callEndpoint(changeMemberRole, { params: { teamId, personId }, body: { role } }),
    onSettled: refresh(queryClient, teamId),
  });

export const removeMemberMutation = (queryClient: QueryClient, teamId: string) =>
  mutationOptions({
    mutationFn: (personId: string) => callEndpoint(removeMember, { params: { teamId, personId } }),
    onSettled: refresh(queryClient, teamId),
  });

export const endMemberSessionsMutation = (queryClient: QueryClient, teamId: string) =>
  mutationOptions({
    mutationFn: (personId: string) => callEndpoint(endMemberSessions, { params: { teamId, personId } }),
    onSettled: refresh(queryClient, teamId),
  });
