import { useCallback, useState } from 'react';
import type { BriefText } from '#contract/brief-content.ts';
import type { Brief } from '#contract/briefs.ts';
import { draftOf, keepBriefDraft, keptBriefDraft, sameText, type BriefDraft } from './brief-draft.ts';

/** What is written on a brief: what this browser kept, else the version at hand. Every change is kept at once. */
export function useBriefDraft(brief: Brief) {
  const [written, setWritten] = useState<BriefDraft | undefined>(() => keptBriefDraft(brief.id));
  // A draft of a version that somebody else has replaced stays on its own version: saving it is refused and asked about.
  const draft = written ?? draftOf(brief);
  const unsaved = written !== undefined && !sameText(written.text, brief.text);
  const put = useCallback(
    (next: BriefDraft | undefined) => {
      setWritten(next);
      keepBriefDraft(brief.id, next);
    },
    [brief.id],
  );
  const change = useCallback(
    (make: (text: BriefText) => BriefText) =>
      setWritten((before) => {
        const from = before ?? draftOf(brief);
        const next = { base: from.base, text: make(from.text) };
        keepBriefDraft(brief.id, next);
        return next;
      }),
    [brief],
  );
  return { draft, unsaved, change, put, forget: useCallback(() => put(undefined), [put]) };
}
