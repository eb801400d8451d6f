import { proxy, releaseProxy, wrap, type Remote } from 'comlink';
import type { GainMap } from '#sim-core/plan/gain-map.ts';
import type { SuggestInput, Suggestion } from '#sim-core/plan/suggest.ts';
import type { PlanProgress, PlanRequest } from './plan-progress.ts';
import type { SuggestFace } from './suggest-worker.ts';

/** It was cancelled by its caller. */
export class PlanCancelled extends Error {
  override name = 'PlanCancelled';
}
/** The worker died, or what it sent could not be read. */
export class PlanWorkerDied extends Error {
  override name = 'PlanWorkerDied';
}

export interface PlanHandle<T> {
  /** @throws PlanCancelled, PlanWorkerDied, RunProblem, CellValuesError */
  readonly result: Promise<T>;
  cancel(): void;
}

const startWorker = () =>
  new Worker(new URL('./suggest-worker.ts', import.meta.url), { type: 'module', name: 'suggest' });

/** Starts to place footholds where they help most, in a worker of its own. */
export const startSuggest = (
  request: PlanRequest & Pick<SuggestInput, 'amount'>,
  onProgress: (progress: PlanProgress) => void,
  createWorker: () => Worker = startWorker,
): PlanHandle<Suggestion> =>
  inWorker(createWorker, (remote) => remote.suggest(request, proxy({ onProgress })));

/** Starts to map what one more foothold would bring in each place, in a worker of its own. */
export const startGainMap = (
  request: PlanRequest,
  onProgress: (progress: PlanProgress) => void,
  createWorker: () => Worker = startWorker,
): PlanHandle<GainMap> => inWorker(createWorker, (remote) => remote.gainMap(request, proxy({ onProgress })));

function inWorker<T>(
  createWorker: () => Worker,
  call: (remote: Remote<SuggestFace>) => Promise<T>,
): PlanHandle<T> {
  const worker = createWorker();
  const remote = wrap<SuggestFace>(worker);
  let fail!: (reason: unknown) => void;
  const failed = new Promise<never>((_, reject) => (fail = reject));
  const died = (event: Event) => {
    const { message } = event as Partial<ErrorEvent>;
    fail(new PlanWorkerDied(`The worker stopped: ${message || 'it could not be loaded or read'}`));
  };
  worker.addEventListener('error', died);
  worker.addEventListener('messageerror', died);
  return {
    result: Promise.race([call(remote), failed]).finally(() => {
      remote[releaseProxy]();
      worker.terminate();
    }),
    cancel: () => {
      fail(new PlanCancelled('It was cancelled'));
    },
  };
}
