import { useSyncExternalStore } from 'react';
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
  wait: waitByClock,
  mayStop: (comparison, known) => (looks ??= createFiguresDesk()).mayStop(comparison, known),
  now: () => performance.now(),
  onChange: (active) => {
    askBeforeClosing('comparisons', active);
  },
});

/** A comparison that this tab works on, as it proceeds; undefined for all others. */
export const useLiveComparison = (comparisonId: string): LiveComparison | undefined =>
  useSyncExternalStore(comparisonManager.subscribe, () => comparisonManager.get(comparisonId));

/** All comparisons of this tab. */
export const useLiveComparisons = (): readonly LiveComparison[] =>
  useSyncExternalStore(comparisonManager.subscribe, comparisonManager.list);
