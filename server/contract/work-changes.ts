import type { Work } from './works.ts';

/** How one state of the works came from another, work by work. */
export interface WorkChanges {
  readonly added: readonly Work[];
  readonly removed: readonly Work[];
  /** as they are afterwards */
  readonly changed: readonly Work[];
}

/** Equal whatever the order in which their fields stand. */
export function sameWork(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false;
  const names = (of: object) =>
    Object.keys(of).filter((name) => (of as Record<string, unknown>)[name] !== undefined);
  const mine = names(a);
  return (
    mine.length === names(b).length &&
    mine.every((name) => sameWork((a as Record<string, unknown>)[name], (b as Record<string, unknown>)[name]))
  );
}

/** What was added, removed and changed from `before` to `after`, told apart by id. */
export function workChanges(before: readonly Work[], after: readonly Work[]): WorkChanges {
  const old = new Map(before.map((work) => [work.id, work]));
  const ids = new Set(after.map((work) => work.id));
  return {
    added: after.filter((work) => !old.has(work.id)),
    removed: before.filter((work) => !ids.has(work.id)),
    changed: after.filter((work) => {
      const was = old.get(work.id);
      return was !== undefined && was !== work && !sameWork(was, work);
    }),
  };
}

/** The same works in the same order. */
export const sameWorks = (a: readonly Work[], b: readonly Work[]): boolean =>
  a === b || (a.length === b.length && a.every((work, i) => sameWork(work, b[i])));

const kindWords: Record<Work['kind'], readonly [one: string, many: string]> = {
  mound: ['mound', 'mounds'],
  planting: ['planting', 'plantings'],
  clumps: ['clump', 'clumps'],
  fence: ['fence', 'fences'],
  loss: ['one-off loss', 'one-off losses'],
};

/** `12 mounds`, `5 clumps`: one entry for each kind, clumps one by one. */
export function countsInWords(works: readonly Work[]): string[] {
  const byKind = new Map<Work['kind'], number>();
  for (const work of works) {
    const count = work.kind === 'clumps' ? work.points.length * work.each : 1;
    byKind.set(work.kind, (byKind.get(work.kind) ?? 0) + count);
  }
  return [...byKind].map(([kind, n]) => `${n} ${kindWords[kind][n === 1 ? 0 : 1]}`);
}

/** `2 mounds added, 1 mound changed`: how the works came from others; empty when they are the same. */
export function changesInWords(before: readonly Work[], after: readonly Work[]): string {
  const { added, removed, changed } = workChanges(before, after);
  const done = (works: readonly Work[], deed: string) =>
    countsInWords(works).map((words) => `${words} ${deed}`);
  const words = [...done(added, 'added'), ...done(changed, 'changed'), ...done(removed, 'removed')].join(
    ', ',
  );
  return words || (sameWorks(before, after) ? '' : 'works put in another order');
}
