import { useSyncExternalStore } from 'react';
import { waitByClock } from '#app/lib/save-with-retry.ts';
import { createMapsDesk } from '#app/workers/ensemble-maps-client.ts';
import { createReplicatePool } from '#app/workers/replicate-pool.ts';
import { createComparisonManager, type LiveComparison } from './comparison-manager.ts';
import { comparisonServer } from './comparison-server.ts';

/** The comparisons that this tab works on, whatever page it shows. */
export const comparisonManager = createComparisonManager({
  server: comparisonServer,
  createPool: createReplicatePool,
  createDesk: createMapsDesk,
  wait: waitByClock,
  now: () => performance.now(),
  onChange: warnBeforeClosing,
});

/** Closing the tab would pause the work: the browser asks first, as long as there is any. */
function warnBeforeClosing(active: number): void {
  if (active > 0) window.addEventListener('beforeunload', ask);
  else window.removeEventListener('beforeunload', ask);
}
const ask = (event: BeforeUnloadEvent) => {
  event.preventDefault();
};

/** A comparison that this tab works on, as it proceeds; undefined for all others. */
export const useLiveComparison = (comparisonId: string): LiveComparison | undefined =>
  useSyncExternalStore(comparisonManager.subscribe, () => comparisonManager.get(comparisonId));

/** All comparisons of this tab. */
export const useLiveComparisons = (): readonly LiveComparison[] =>
  useSyncExternalStore(comparisonManager.subscribe, comparisonManager.list);
