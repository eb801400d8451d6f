import { useSyncExternalStore } from 'react';
import { getFrame } from '#contract/runs.ts';
import { maximumCells } from '#sim-core/spec/limits.ts';
import { fetchBlob } from '#app/lib/api-client.ts';
import { cells } from '#app/workers/cells-client.ts';
import { startRun } from '#app/workers/run-client.ts';
import { createFrameCache } from './frame-cache.ts';
import { keepPace } from './run-pace.ts';
import { createRunManager, type LiveRun } from './run-manager.ts';
import { runServer } from './run-server.ts';
import { askBeforeClosing } from '#app/lib/ask-before-closing.ts';
import { waitByClock } from '#app/lib/save-with-retry.ts';

/** Bytes of frames that are kept at hand: all of a small site's run, a handful at 4,000 × 4,000 cells. */
const frameBudget = 96 * 1024 * 1024;

/** The frames that this tab has at hand, of all runs. */
export const runFrames = createFrameCache(async (runId, year) => {
  const packed = await fetchBlob(getFrame, { params: { runId, year } });
  const { values } = await cells.unpack(packed, { cells: maximumCells });
  if (!(values instanceof Uint8Array))
    throw new Error('The frame holds other numbers than cover; run it again.');
  return values;
}, frameBudget);

/** The runs that this tab works on, whatever page it shows. */
export const runManager = createRunManager({
  server: runServer,
  startWorker: (input, listener) => {
    const { spec, grid } = input;
    const onProgress: typeof listener.onProgress = (progress) => {
      keepPace(spec.mode, grid.width * grid.height, progress);
      listener.onProgress?.(progress);
    };
    return startRun(input, { ...listener, onProgress });
  },
  wait: waitByClock,
  onFrame: (runId, year, frame) => {
    runFrames.put(runId, year, frame);
  },
  onChange: (active) => {
    askBeforeClosing('runs', active);
  },
});

/** A run that this tab works on, as it proceeds; undefined for all others. */
export const useLiveRun = (runId: string): LiveRun | undefined =>
  useSyncExternalStore(runManager.subscribe, () => runManager.get(runId));

/** All runs of this tab. */
export const useLiveRuns = (): readonly LiveRun[] =>
  useSyncExternalStore(runManager.subscribe, runManager.list);
