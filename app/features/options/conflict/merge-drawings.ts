import { sameWork } from '#contract/work-changes.ts';
import type { Work, WorkSet } from '#contract/works.ts';

interface State {
  readonly works: readonly Work[];
  readonly sets: readonly WorkSet[];
}

export interface Merged extends State {
  /** works that both changed, each in another way: there is no putting them together */
  readonly clashes: readonly Work[];
}

/**
 * Two changes of the same drawing put together, work by work: theirs in their order with what only I changed, and what I
 * added at the end. Where both did the same to a work it is done once.
 *
 * @param base what both began with
 */
export function mergeDrawings(base: State, mine: State, theirs: State): Merged {
  const [before, mineById, theirsById] = [base, mine, theirs].map(
    ({ works }) => new Map(works.map((work) => [work.id, work])),
  );
  const same = (a: Work | undefined, b: Work | undefined) => a === b || sameWork(a, b);
  const clashes: Work[] = [];
  const merge = (id: string): Work | undefined => {
    const [was, my, their] = [before.get(id), mineById.get(id), theirsById.get(id)];
    if (same(my, was)) return their;
    if (!same(their, was) && !same(my, their)) clashes.push((my ?? their)!);
    return my;
  };
  const order = [...theirsById.keys(), ...[...mineById.keys()].filter((id) => !theirsById.has(id))];
  const works = order.flatMap((id) => merge(id) ?? []);
  const used = new Set(works.map((work) => work.set));
  const sets = [...theirs.sets, ...mine.sets.filter((set) => !theirs.sets.some(({ id }) => id === set.id))];
  return { works, sets: sets.filter(({ id }) => used.has(id)), clashes };
}
