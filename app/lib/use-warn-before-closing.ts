import { useEffect } from 'react';

/** Has the browser ask before the tab is closed, for as long as `when` holds. */
export function useWarnBeforeClosing(when: boolean): void {
  useEffect(() => {
    if (!when) return undefined;
    const ask = (event: BeforeUnloadEvent) => event.preventDefault();
    window.addEventListener('beforeunload', ask);
    return () => window.removeEventListener('beforeunload', ask);
  }, [when]);
}
