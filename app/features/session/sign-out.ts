import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import { signOut } from '#contract/people.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { sessionKey } from '#app/lib/query-client.ts';

/** Forgets all that was fetched, so that the next person at this browser sees none of it. */
export const signOutMutation = (queryClient: QueryClient) =>
  mutationOptions({
    mutationFn: async () => {
      await callEndpoint(signOut, {});
      queryClient.clear();
      await queryClient.invalidateQueries({ queryKey: sessionKey });
    },
  });
