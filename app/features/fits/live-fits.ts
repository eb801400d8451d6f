import { useSyncExternalStore } from 'react';
import { askBeforeClosing } from '#app/lib/ask-before-closing.ts';
import { waitByClock } from '#app/lib/save-with-retry.ts';
import { createReplicatePool } from '#app/workers/replicate-pool.ts';
import { fitServer } from './change-fit.ts';
import { createFitManager, type LiveFit } from './fit-manager.ts';

/** The fits that this tab works on, whatever page it shows. */
export const fitManager = createFitManager({
  server: fitServer,
  createPool: createReplicatePool,
  wait: waitByClock,
  now: () => performance.now(),
  onChange: (active) => {
    askBeforeClosing('fits', active);
  },
});

/** A fit that this tab works on, as it proceeds; undefined for all others. */
export const useLiveFit = (fitId: string): LiveFit | undefined =>
  useSyncExternalStore(fitManager.subscribe, () => fitManager.get(fitId));

/** All fits of this tab. */
export const useLiveFits = (): readonly LiveFit[] =>
  useSyncExternalStore(fitManager.subscribe, fitManager.list);
