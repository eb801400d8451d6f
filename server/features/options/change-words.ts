import { sameWorks, workChanges } from '#contract/work-changes.ts';
import type { Work } from '#contract/works.ts';

/** What of an option its history keeps an eye on. */
export interface OptionState {
  readonly name: string;
  readonly note: string;
  readonly archived: boolean;
  readonly works: readonly Work[];
}

const kindWords: Record<Work['kind'], readonly [one: string, many: string]> = {
  mound: ['mound', 'mounds'],
  planting: ['planting', 'plantings'],
  clumps: ['clump', 'clumps'],
  fence: ['fence', 'fences'],
  loss: ['one-off loss', 'one-off losses'],
};

/** `2 mounds added, 1 mound moved; renamed from “A” to “B”; note changed`: what was done, in words. */
export function changeInWords(before: OptionState, after: OptionState): string {
  const { added, removed, changed } = workChanges(before.works, after.works);
  const works = [
    ...counted(added, 'added'),
    ...counted(changed, 'changed'),
    ...counted(removed, 'removed'),
  ].join(', ');
  const parts = [
    works,
    !works && !sameWorks(before.works, after.works) && 'works put in another order',
    before.name !== after.name && `renamed from “${before.name}” to “${after.name}”`,
    before.note !== after.note && (after.note === '' ? 'note removed' : 'note changed'),
    before.archived !== after.archived && (after.archived ? 'archived' : 'brought back from the archive'),
  ].filter(Boolean);
  return parts.join('; ') || 'saved without a change';
}

/** `12 mounds`, `12 mounds and 2 fences`, or `no works`. */
export const worksCounted = (works: readonly Work[]): string =>
  counts(works).join(works.length > 0 ? ' and ' : '') || 'no works';

const counted = (works: readonly Work[], done: string) => counts(works).map((words) => `${words} ${done}`);

function counts(works: readonly Work[]): string[] {
  const byKind = new Map<Work['kind'], number>();
  for (const work of works) {
    const count = work.kind === 'clumps' ? work.points.length * work.each : 1;
    byKind.set(work.kind, (byKind.get(work.kind) ?? 0) + count);
  }
  return [...byKind].map(([kind, n]) => `${n} ${kindWords[kind][n === 1 ? 0 : 1]}`);
}
