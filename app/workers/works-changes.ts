import type { WorksChange } from '#sim-core/plan/quick-look.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';

/** What was told so far, and what must be told to bring it up to a list of works. */
export interface WorksChanges {
  /** The change to these works; they count as told from now on. Works are the same where they are the same object. */
  to(
    works: readonly Action[],
  ): { readonly removed: number[]; readonly added: [number, Action][] } & WorksChange;
}

export function worksChanges(): WorksChanges {
  let told = new Map<Action, number>();
  let next = 0;
  return {
    to(works) {
      const now = new Map<Action, number>();
      const added: [number, Action][] = [];
      for (const work of works) {
        if (now.has(work)) continue;
        const key = told.get(work) ?? next++;
        if (!told.delete(work)) added.push([key, work]);
        now.set(work, key);
      }
      const removed = [...told.values()];
      told = now;
      return { removed, added };
    },
  };
}
