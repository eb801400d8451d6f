import { useSyncExternalStore } from 'react';

/** Whether a media query holds, as it changes; false where the browser knows none. */
export function useMediaQuery(query: string): boolean {
  return useSyncExternalStore(
    (changed) => {
      const media = typeof window.matchMedia === 'function' ? window.matchMedia(query) : undefined;
      media?.addEventListener('change', changed);
      return () => media?.removeEventListener('change', changed);
    },
    () => typeof window.matchMedia === 'function' && window.matchMedia(query).matches,
  );
}

/** Whether the window is as narrow as a phone: pictures then have fewer ticks and words of the same size. */
export const useNarrow = (): boolean => useMediaQuery('(width < 48rem)');
