import { mutationOptions, type QueryClient } from '@tanstack/react-query';
import type { z } from 'zod';
import { signIn } from '#contract/people.ts';
import { callEndpoint } from '#app/lib/api-client.ts';
import { enterSession } from './session.ts';

export const signInMutation = (queryClient: QueryClient) =>
  mutationOptions({
    mutationFn: (body: z.output<typeof signIn.body>) => callEndpoint(signIn, { body }),
    onSuccess: (session) => enterSession(queryClient, session),
  });
