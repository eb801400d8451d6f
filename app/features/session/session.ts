import { queryOptions, type QueryClient } from '@tanstack/react-query';
import { getSession, type Role, type Session } from '#contract/people.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { sessionKey } from '#app/lib/query-client.ts';

/** Who is signed in, with their teams and roles. */
export const sessionQuery = queryOptions({
  queryKey: sessionKey,
  queryFn: ({ signal }) => callEndpoint(getSession, { signal }),
  staleTime: 60_000,
});

/** After somebody came: nothing that was fetched for another person may stay. What the page at the door shows does. */
export function enterSession(queryClient: QueryClient, session: Session): void {
  queryClient.removeQueries({ type: 'inactive' });
  queryClient.setQueryData(sessionQuery.queryKey, session);
}

/** The role on a team; undefined for those who are not members. */
export function roleIn(session: Session | undefined, teamId: string | undefined): Role | undefined {
  return session?.memberships.find((membership) => membership.teamId === teamId)?.role;
}
