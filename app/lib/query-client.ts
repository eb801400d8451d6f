import { QueryClient } from '@tanstack/react-query';
import { onSignedOut, ProblemError } from './api-client.ts';

/** Who is signed in: known here because any call may find that nobody is. */
export const sessionKey = ['session'] as const;

/** A refused request is refused again; only what may pass by itself is tried again, twice. */
function retry(failures: number, error: unknown): boolean {
  const passing = error instanceof ProblemError && (error.status === 0 || error.status >= 502);
  return passing && failures < 2;
}

/** The one cache of what the server knows. A call that finds nobody signed in makes it ask again who is. */
export function createQueryClient(): QueryClient {
  const client = new QueryClient({
    defaultOptions: {
      queries: { staleTime: 10_000, retry },
      mutations: { retry: false },
    },
  });
  onSignedOut(() => void client.invalidateQueries({ queryKey: sessionKey }));
  return client;
}
