import { useEffect, useRef } from 'react';
import { keepDraft } from './draft-storage.ts';
import type { OptionDraft } from './option-draft.ts';

/** Rest after the last change, ms: writing thousands of works at every step of a drag would hold up the page. */
const rest = 300;

/** Keeps a drawing in this tab once it rests, and at the latest when the page or the option is left. */
export function useKeptDraft(optionId: string, draft: OptionDraft): void {
  const waiting = useRef<OptionDraft>(undefined);
  useEffect(() => {
    waiting.current = draft;
    const timer = setTimeout(() => {
      waiting.current = undefined;
      keepDraft(optionId, draft);
    }, rest);
    return () => clearTimeout(timer);
  }, [optionId, draft]);
  useEffect(() => {
    const keep = () => {
      if (waiting.current) keepDraft(optionId, waiting.current);
      waiting.current = undefined;
    };
    window.addEventListener('pagehide', keep);
    return () => {
      window.removeEventListener('pagehide', keep);
      keep();
    };
  }, [optionId]);
}
