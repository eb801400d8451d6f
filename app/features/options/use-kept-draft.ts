import { useEffect, useRef, useState } from 'react';
import { keepDraft } from './draft-storage.ts';
import type { OptionDraft } from './option-draft.ts';

/** Rest after the last change, ms: writing thousands of works at every step of a drag would hold up the page. */
const rest = 300;

/**
 * Keeps a drawing in this tab once it rests, and at the latest when the page or the option is left.
 *
 * @returns false where the browser cannot keep it
 */
export function useKeptDraft(optionId: string, draft: OptionDraft): boolean {
  const [kept, setKept] = useState(true);
  const waiting = useRef<OptionDraft>(undefined);
  useEffect(() => {
    waiting.current = draft;
    const timer = setTimeout(() => {
      waiting.current = undefined;
      void keepDraft(optionId, draft).then(setKept);
    }, rest);
    return () => clearTimeout(timer);
  }, [optionId, draft]);
  useEffect(() => {
    const keep = () => {
      if (waiting.current) void keepDraft(optionId, waiting.current);
      waiting.current = undefined;
    };
    window.addEventListener('pagehide', keep);
    return () => {
      window.removeEventListener('pagehide', keep);
      keep();
    };
  }, [optionId]);
  return kept;
}
