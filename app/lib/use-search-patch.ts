import { useCallback } from 'react';
import { useNavigate } from 'react-router-dom';

/** Changes some of the address's search parameters in place; `undefined` takes one out, all others stay. */
export function useSearchPatch(): (changes: Record<string, string | undefined>) => void {
  const navigate = useNavigate();
  return useCallback(
    (changes) => {
      // From the address itself: what a render saw may be older than a change that came a moment ago.
      const next = new URLSearchParams(window.location.search);
      for (const [name, value] of Object.entries(changes)) {
        if (value === undefined) next.delete(name);
        else next.set(name, value);
      }
      void navigate({ search: next.toString() }, { replace: true, preventScrollReset: true });
    },
    [navigate],
  );
}
