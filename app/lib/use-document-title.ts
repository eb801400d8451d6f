import { useEffect } from 'react';

/** Names the page in the tab and in history: `Runs, Sallow Reach, Foothold`. */
export function useDocumentTitle(...parts: (string | undefined)[]): void {
  const title = [...parts.filter((part) => part !== undefined && part !== ''), 'Foothold'].join(', ');
  useEffect(() => {
    document.title = title;
  }, [title]);
}
