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
