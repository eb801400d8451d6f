// @vitest-environment node
import { expect, it, vi } from 'vitest';
import type { PlanRequest } from './plan-progress.ts';
import { PlanCancelled, PlanWorkerDied, startGainMap, startSuggest } from './suggest-client.ts';
import { portWorker } from './testing/port-worker.ts';

// What is worked out is tested where it is worked out; here: what crosses.
const request = { works: [] } as unknown as PlanRequest;
const budget = { amount: { by: 'count' as const, count: 2 } };
interface Heard {
  onProgress(progress: unknown): void;
}

it('hands on progress and what was found, and ends its worker', async () => {
  const { worker, terminate } = portWorker({
    suggest: (asked: unknown, listener: Heard) => {
      listener.onProgress({ stage: 'weighing', done: 1, of: 3 });
      return { asked };
    },
    gainMap: () => ({ gains: Float32Array.of(0.5, NaN) }),
  });
  const onProgress = vi.fn();
  const { result } = startSuggest({ ...request, ...budget }, onProgress, () => worker);
  expect(await result).toEqual({ asked: { ...request, ...budget } });
  expect(terminate).toHaveBeenCalledOnce();
  await vi.waitFor(() => expect(onProgress).toHaveBeenCalledWith({ stage: 'weighing', done: 1, of: 3 }));
});

it('maps gains', async () => {
  const { worker } = portWorker({ gainMap: () => ({ gains: Float32Array.of(0.5, NaN) }) });
  expect(await startGainMap(request, vi.fn(), () => worker).result).toEqual({
    gains: Float32Array.of(0.5, NaN),
  });
});

it('is cancelled at once, and says that its worker died', async () => {
  const never = { suggest: () => new Promise(() => undefined), gainMap: () => new Promise(() => undefined) };
  const first = portWorker(never);
  const suggesting = startSuggest({ ...request, ...budget }, vi.fn(), () => first.worker);
  suggesting.cancel();
  await expect(suggesting.result).rejects.toThrow(PlanCancelled);
  expect(first.terminate).toHaveBeenCalledOnce();
  const second = portWorker(never);
  const mapping = startGainMap(request, vi.fn(), () => second.worker);
  second.emit(Object.assign(new Event('error'), { message: 'out of memory' }));
  await expect(mapping.result).rejects.toThrow(PlanWorkerDied);
  await expect(mapping.result).rejects.toThrow('out of memory');
});
