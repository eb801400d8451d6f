import { useEffect, useState, useSyncExternalStore } from 'react';
import { askBeforeClosing } from '#app/lib/ask-before-closing.ts';
import { waitByClock } from '#app/lib/save-with-retry.ts';
import { createMapsDesk } from '#app/workers/ensemble-maps-client.ts';
import { createReplicatePool } from '#app/workers/replicate-pool.ts';
import { createComparisonManager, type LiveComparison } from './comparison-manager.ts';
import { comparisonServer } from './comparison-server.ts';
import { createFiguresDesk, type FiguresDesk } from './figures-desk.ts';

/** Looks at all comparisons of the tab; begun by the first that may stop early. */
let looks: FiguresDesk | undefined;

/** The comparisons that this tab works on, whatever page it shows. */
export const comparisonManager = createComparisonManager({
  server: comparisonServer,
  createPool: createReplicatePool,
  createDesk: createMapsDesk,
  mayStop: (comparison, known) => (looks ??= createFiguresDesk()).mayStop(comparison, known),
  wait: waitByClock,
  now: () => performance.now(),
  onChange: (active) => {
    askBeforeClosing('comparisons', active);
  },
});

/** A comparison that this tab works on, as it proceeds, many times a second; undefined for all others. */
export const useLiveComparison = (comparisonId: string): LiveComparison | undefined =>
  useSyncExternalStore(comparisonManager.subscribe, () => comparisonManager.get(comparisonId));

/**
 * One thing about a comparison that this tab works on. Whoever uses it is drawn again when that changes, not with each
 * step of each run.
 */
export const useLivePart = <Part extends keyof LiveComparison>(
  comparisonId: string,
  part: Part,
): LiveComparison[Part] | undefined =>
  useSyncExternalStore(comparisonManager.subscribe, () => comparisonManager.get(comparisonId)?.[part]);

/** How far the records of a comparison at work are, told at most once in so many milliseconds; 0 for all others. */
export function useLiveVersion(comparisonId: string, every: number): number {
  const [version, setVersion] = useState(() => comparisonManager.get(comparisonId)?.version ?? 0);
  useEffect(() => {
    const read = () => comparisonManager.get(comparisonId)?.version ?? 0;
    let timer: ReturnType<typeof setTimeout> | undefined;
    let last = -Infinity;
    const say = () => {
      timer = undefined;
      last = performance.now();
      setVersion(read());
    };
    const listen = () => {
      timer ??= setTimeout(say, Math.max(0, last + every - performance.now()));
    };
    listen();
    const leave = comparisonManager.subscribe(listen);
    return () => {
      leave();
      clearTimeout(timer);
    };
  }, [comparisonId, every]);
  return version;
}

/** All comparisons of this tab. */
export const useLiveComparisons = (): readonly LiveComparison[] =>
  useSyncExternalStore(comparisonManager.subscribe, comparisonManager.list);
