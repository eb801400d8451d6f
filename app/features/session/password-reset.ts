import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { completePasswordReset, requestPasswordReset } from '#contract/people.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { sessionKey } from '#app/lib/query-client.ts';

export const requestResetMutation = mutationOptions({
  mutationFn: (body: z.output<typeof requestPasswordReset.body>) =>
    callEndpoint(requestPasswordReset, { body }),
});

/** Ends all sessions, this browser's too, so it asks again who is signed in. */
export const completeResetMutation = (queryClient: QueryClient, token: string) =>
  mutationOptions({
    mutationFn: (body: z.output<typeof completePasswordReset.body>) =>
      callEndpoint(completePasswordReset, { params: { token }, body }),
    onSuccess: () => queryClient.invalidateQueries({ queryKey: sessionKey }),
  });
