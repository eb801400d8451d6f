// @vitest-environment node
import { transfer } from 'comlink';
import { describe, expect, it, vi } from 'vitest';
import type { Ground } from '#sim-core/grid/ground.ts';
import { RunCancelled, RunWorkerDied, startRun } from './run-client.ts';
import type { RunInput, RunListener } from './run-loop.ts';
import { portWorker } from './testing/port-worker.ts';

function someInput() {
  const bytes = () => new Uint8Array(6).fill(255);
  const shared = bytes();
  const ground = {
    capacity: shared,
    vigour: shared,
    exposure: bytes(),
    refuge: bytes(),
    fence: bytes(),
    cover: new Float32Array(6),
  };
  return { spec: { seed: 'a' }, grid: { width: 3, height: 2 }, ground } as unknown as RunInput;
}
const start = (face: object, listener: Partial<RunListener> = {}, locks?: LockManager) => {
  const fake = portWorker(face);
  const handle = startRun(
    someInput(),
    { onYear: () => undefined, ...listener },
    { createWorker: () => fake.worker, locks },
  );
  return { ...fake, handle };
};

describe('startRun', () => {
  it('hands the ground over instead of copying it, and frames back likewise', async () => {
    const input = someInput();
    const frames: Uint8Array[] = [];
    let kept: Uint8Array | undefined;
    const locks = { request: () => new Promise(() => undefined) } as unknown as LockManager;
    const { worker, terminate } = portWorker({
      run: async (given: RunInput, listener: RunListener) => {
        const { capacity, cover } = given.ground as Ground;
        kept = Uint8Array.of(capacity.length, cover.length);
        await listener.onYear(transfer({ year: 2026, rows: [], frame: kept }, [kept.buffer]));
        return { closing: Int16Array.of(1) };
      },
    });
    const { result } = startRun(
      input,
      { onYear: (e) => void frames.push(e.frame!) },
      { createWorker: () => worker, locks },
    );
    expect((input.ground as Ground).capacity).toHaveLength(0);
    expect((input.ground as Ground).cover).toHaveLength(0);
    expect([...(await result).closing]).toEqual([1]);
    expect([...frames[0]]).toEqual([6, 6]);
    expect(kept).toHaveLength(0);
    expect(terminate).toHaveBeenCalledOnce();
  });

  it('passes on an error of the engine with its name, message and stack', async () => {
    const { handle } = start({
      run: () => {
        throw Object.assign(new Error('no such rate'), { name: 'EngineError' });
      },
    });
    const error = await handle.result.catch((e: unknown) => e as Error);
    expect(error).toMatchObject({ name: 'EngineError', message: 'no such rate' });
    expect((error as Error).stack).toContain('run-client.test');
  });

  it('rejects with its own reason when a year could not be saved', async () => {
    class Full extends Error {}
    const reason = new Full('no room');
    const { handle } = start(
      { run: (_: RunInput, listener: RunListener) => listener.onYear({ year: 1, rows: [] }) },
      { onYear: () => Promise.reject(reason) },
    );
    await expect(handle.result).rejects.toBe(reason);
  });

  it('ends at once when it is cancelled, and says nothing more', async () => {
    const heard: number[] = [];
    const { handle, terminate } = start(
      { run: () => new Promise(() => undefined) },
      { onYear: (e) => void heard.push(e.year) },
    );
    handle.cancel();
    expect(terminate).toHaveBeenCalledOnce();
    await expect(handle.result).rejects.toBeInstanceOf(RunCancelled);
    handle.pause();
    expect(heard).toEqual([]);
  });

  it('rejects when the worker crashes, with what the browser said', async () => {
    const { handle, emit, terminate } = start({ run: () => new Promise(() => undefined) });
    emit(Object.assign(new Event('error'), { message: 'Uncaught RangeError: out of memory' }));
    const error = await handle.result.catch((e: unknown) => e as Error);
    expect(error).toBeInstanceOf(RunWorkerDied);
    expect((error as Error).message).toContain('out of memory');
    expect(terminate).toHaveBeenCalledOnce();
  });

  it('rejects when what the worker sent cannot be read', async () => {
    const { handle, emit } = start({ run: () => new Promise(() => undefined) });
    emit(new Event('messageerror'));
    await expect(handle.result).rejects.toBeInstanceOf(RunWorkerDied);
  });

  it('notices a worker that dies without an event: its lock comes free', async () => {
    let free: (() => void) | undefined;
    let held: string | undefined;
    const locks = {
      request: (name: string, _: object, granted: () => void) => {
        expect(name).toBe(held);
        return new Promise<void>((resolve) => {
          free = () => {
            granted();
            resolve();
          };
        });
      },
    } as unknown as LockManager;
    const run = (_: RunInput, listener: RunListener, lock: string) => {
      held = lock;
      listener.onProgress?.({ stepsDone: 0, steps: 9, secondsLeft: undefined });
      return new Promise(() => undefined);
    };
    const { handle } = start({ run }, {}, locks);
    await vi.waitFor(() => {
      expect(free).toBeDefined();
    });
    free!();
    await expect(handle.result).rejects.toBeInstanceOf(RunWorkerDied);
  });

  it('tells when a paused run stands still', async () => {
    const onStandstill = vi.fn();
    const run = (_: RunInput, listener: RunListener) => {
      listener.onStandstill?.();
      return new Promise(() => undefined);
    };
    const { handle } = start({ run }, { onStandstill });
    await vi.waitFor(() => {
      expect(onStandstill).toHaveBeenCalledOnce();
    });
    handle.cancel();
    await expect(handle.result).rejects.toBeInstanceOf(RunCancelled);
  });

  it('carries pause, step and resume across', async () => {
    const calls: string[] = [];
    const { handle } = start({
      run: () => new Promise(() => undefined),
      pause: () => void calls.push('pause'),
      step: () => void calls.push('step'),
      resume: () => void calls.push('resume'),
    });
    handle.pause();
    handle.step();
    handle.resume();
    await vi.waitFor(() => {
      expect(calls).toEqual(['pause', 'step', 'resume']);
    });
    handle.cancel();
    await expect(handle.result).rejects.toBeInstanceOf(RunCancelled);
  });
});
