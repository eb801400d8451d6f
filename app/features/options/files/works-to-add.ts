import { sameWork } from '#contract/work-changes.ts';
import { newWorkId, type Work, type WorkSet } from '#contract/works.ts';

/** Works that come to a drawing from elsewhere, with how they were laid. */
export interface FoundWorks {
  readonly works: readonly Work[];
  readonly sets: readonly WorkSet[];
  /** works of the file that the drawing holds already, just alike; they are left out */
  readonly alike: number;
}

/** What of a file is added to a drawing: what it does not hold yet, under ids of its own where those are taken. */
export function worksToAdd(
  found: { readonly works: readonly Work[]; readonly sets: readonly WorkSet[] },
  drawn: readonly Work[],
): FoundWorks {
  const there = new Map(drawn.map((work) => [work.id, work]));
  const fresh = found.works.filter((work) => {
    const same = there.get(work.id);
    return same === undefined || !sameWork(same, work);
  });
  // A set's works must not mix with those of the same set that were changed on the board.
  const taken = new Set(drawn.flatMap(({ set }) => (set === undefined ? [] : [set])));
  const setIds = new Map(found.sets.map(({ id }) => [id, taken.has(id) ? newWorkId() : id]));
  return {
    works: fresh.map((work) => ({
      ...work,
      ...(there.has(work.id) && { id: newWorkId() }),
      ...(work.set !== undefined && { set: setIds.get(work.set) }),
    })),
    sets: found.sets.map((set) => ({ ...set, id: setIds.get(set.id) ?? set.id })),
    alike: found.works.length - fresh.length,
  };
}
