import { useSyncExternalStore } from 'react';
import { askBeforeClosing } from '#app/lib/ask-before-closing.ts';
import { waitByClock } from '#app/lib/save-with-retry.ts';
import { createReplicatePool } from '#app/workers/replicate-pool.ts';
import { createStudyManager, type LiveStudy } from './study-manager.ts';
import { studyServer } from './study-server.ts';

/** The studies that this tab works on, whatever page it shows. */
export const studyManager = createStudyManager({
  server: studyServer,
  createPool: createReplicatePool,
  wait: waitByClock,
  now: () => performance.now(),
  onChange: (active) => {
    askBeforeClosing('studies', active);
  },
});

/** The study of a comparison, as it proceeds; undefined before this tab started one. */
export const useLiveStudy = (comparisonId: string): LiveStudy | undefined =>
  useSyncExternalStore(studyManager.subscribe, () => studyManager.get(comparisonId));
