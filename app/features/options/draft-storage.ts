import { z } from 'zod';
import { workSchema, workSetSchema } from '#contract/works.ts';
import type { Option } from '#contract/options.ts';
import { draftOf, isUnsaved, noneSelected, optionDraft, type OptionDraft } from './option-draft.ts';

const keptSchema = z.object({
  revision: z.number().int(),
  works: z.array(workSchema),
  sets: z.array(workSetSchema).default([]),
});
const keyOf = (optionId: string) => `foothold.draft.${optionId}`;

/** The browser may refuse storage, or hold something else there: the drawing then lasts as long as the page. */
function tab(): Storage | undefined {
  try {
    return window.sessionStorage;
  } catch {
    return undefined;
  }
}

/** Keeps an unsaved drawing in this tab, so that a reload loses nothing; forgets it once it is saved. */
export function keepDraft(optionId: string, draft: OptionDraft): void {
  try {
    if (!isUnsaved(draft)) tab()?.removeItem(keyOf(optionId));
    else {
      const { revision, works, sets } = draft;
      tab()?.setItem(keyOf(optionId), JSON.stringify({ revision, works, sets }));
    }
  } catch {
    // Storage is full: nothing else depends on it.
  }
}

export function forgetDraft(optionId: string): void {
  tab()?.removeItem(keyOf(optionId));
}

/**
 * The drawing of an option: what this tab kept of it, else what the server has. A kept drawing stays on the revision
 * that it was made on, so that saving it over somebody else's change is refused and asked about.
 */
export function restoreDraft(option: Option): OptionDraft {
  const saved = draftOf(option);
  const kept = readKept(option.id);
  if (!kept) return saved;
  const restored = {
    ...optionDraft(saved, { type: 'select', ids: noneSelected }),
    works: kept.works,
    sets: kept.sets,
    past: [saved.saved],
  };
  return isUnsaved(restored) ? { ...restored, revision: kept.revision } : saved;
}

function readKept(optionId: string): z.infer<typeof keptSchema> | undefined {
  try {
    const text = tab()?.getItem(keyOf(optionId));
    return text ? keptSchema.parse(JSON.parse(text)) : undefined;
  } catch {
    return undefined;
  }
}
