import { useEffect, useMemo, useSyncExternalStore } from 'react';
import type { Action } from '#sim-core/spec/run-spec.ts';
import type { QuickLookStart } from '#app/workers/quick-look-desk.ts';
import type { PatternLayer } from '../board/use-pattern.ts';
import { createLookStore, type LookState } from './look-store.ts';

export interface QuickLookView extends LookState {
  /** lays patterns on the same ground; undefined while there is none */
  readonly layer: PatternLayer | undefined;
  readonly setWorks: (works: readonly Action[]) => void;
}

const nothing: LookState = { look: undefined, lines: undefined, wait: undefined, error: undefined };
const noStore = {
  subscribe: () => () => undefined,
  read: () => nothing,
  setWorks: () => undefined,
};

/**
 * What growth alone would do. Say what is drawn by `setWorks`; works that did not change are the same objects as before.
 *
 * @param start the ground, held by identity; undefined while it is not complete
 */
export function useQuickLook(start: QuickLookStart | undefined): QuickLookView {
  const store = useMemo(() => start && createLookStore(start), [start]);
  const state = useSyncExternalStore((store ?? noStore).subscribe, (store ?? noStore).read);
  return { ...state, layer: state.look && store?.layer, setWorks: (store ?? noStore).setWorks };
}

/** Keeps a quick look up with what is drawn. */
export function useLookOf({ setWorks }: QuickLookView, works: readonly Action[]): void {
  useEffect(() => {
    setWorks(works);
  }, [setWorks, works]);
}
