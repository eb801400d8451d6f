import type { ClosingSummary } from '#sim-core/plan/closing-tally.ts';
import type { YearLine } from '#sim-core/plan/year-lines.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';
import { startQuickLook, type QuickLookHandle } from '#app/workers/quick-look-client.ts';
import type { Look, QuickLookStart } from '#app/workers/quick-look-desk.ts';
import type { PatternLayer } from '../board/use-pattern.ts';

/** What is known of the ground by growth alone. */
export interface LookState {
  /** with the works that were drawn last, as far as it has come */
  readonly look: Look | undefined;
  /** lines of closing years, of the look or of one shortly before it */
  readonly lines: readonly YearLine[] | undefined;
  /** without any works */
  readonly wait: ClosingSummary | undefined;
  readonly error: unknown;
}

/** One ground in a worker of its own, for as long as somebody listens. */
export interface LookStore {
  readonly subscribe: (changed: () => void) => () => void;
  readonly read: () => LookState;
  readonly setWorks: (works: readonly Action[]) => void;
  readonly layer: PatternLayer;
}

let opened = 0;
const nothing: LookState = { look: undefined, lines: undefined, wait: undefined, error: undefined };

export function createLookStore(
  start: QuickLookStart,
  startLook: typeof startQuickLook = startQuickLook,
): LookStore {
  const listeners = new Set<() => void>();
  let handle: QuickLookHandle | undefined;
  let works: readonly Action[] = [];
  let state = nothing;
  const become = (next: Partial<LookState>) => {
    state = { ...state, ...next };
    for (const changed of listeners) changed();
  };
  function open(): void {
    handle = startLook(start, {
      onLook(look, of) {
        // From asking to answer; the browser's own tools show it beside the painting.
        if (performance.getEntriesByName(asked).length > 0) performance.measure('quick look', asked);
        become({ look, ...(of.length === 0 && { wait: look.summary }) });
      },
      onLines: (lines) => become({ lines }),
      onFailure(error) {
        handle = undefined;
        become({ error });
      },
    });
    if (works.length > 0) handle.setWorks(works);
  }
  return {
    read: () => state,
    subscribe(changed) {
      listeners.add(changed);
      if (listeners.size === 1 && !handle) open();
      return () => {
        listeners.delete(changed);
        if (listeners.size > 0) return;
        handle?.close();
        handle = undefined;
        state = nothing;
      };
    },
    setWorks(next) {
      if (next === works) return;
      works = next;
      performance.clearMarks(asked);
      performance.mark(asked);
      handle?.setWorks(next);
    },
    layer: {
      key: ++opened,
      lay: (request) =>
        handle ? handle.lay(request) : Promise.reject(new Error('The ground is not open yet.')),
    },
  };
}

const asked = 'quick look asked';
