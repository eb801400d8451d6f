import { changesInWords, countsInWords } from '#contract/work-changes.ts';
import type { Work } from '#contract/works.ts';

/** What of an option its history keeps an eye on. */
export interface OptionState {
  readonly name: string;
  readonly note: string;
  readonly archived: boolean;
  readonly works: readonly Work[];
}

/** `2 mounds added, 1 mound moved; renamed from “A” to “B”; note changed`: what was done, in words. */
export function changeInWords(before: OptionState, after: OptionState): string {
  const parts = [
    changesInWords(before.works, after.works),
    before.name !== after.name && `renamed from “${before.name}” to “${after.name}”`,
    before.note !== after.note && (after.note === '' ? 'note removed' : 'note changed'),
    before.archived !== after.archived && (after.archived ? 'archived' : 'brought back from the archive'),
  ].filter(Boolean);
  return parts.join('; ') || 'saved without a change';
}

/** `12 mounds`, `12 mounds and 2 fences`, or `no works`. */
export const worksCounted = (works: readonly Work[]): string =>
  countsInWords(works).join(' and ') || 'no works';
