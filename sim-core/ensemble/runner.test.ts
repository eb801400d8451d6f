import { expect, test, vi } from 'vitest';
import { specOf } from '#sim-core/testing/setups.ts';
import type { ReplicateOutcome } from './replicate.ts';
import { attemptsOfRun, createRunner, RunsCancelled, WorkerDied, type RunnerProgress } from './runner.ts';

/** A place whose runs end when the test says so. */
function manualPlace(workers: number) {
  const attempts: {
    replicate: number;
    step: (done: number) => void;
    end: () => Promise<void>;
    fail: (error: unknown) => Promise<void>;
    cancelled: boolean;
  }[] = [];
  const place = {
    workers,
    time: 0,
    now: () => place.time,
    begin: (spec: { replicate: number }, _: unknown, step: (done: number) => void) => {
      let resolve!: (outcome: ReplicateOutcome) => void;
      let reject!: (error: unknown) => void;
      const outcome = new Promise<ReplicateOutcome>((yes, no) => ([resolve, reject] = [yes, no]));
      const attempt = {
        replicate: spec.replicate,
        step,
        end: () => (resolve({ replicate: spec.replicate } as unknown as ReplicateOutcome), settled()),
        fail: (error: unknown) => (reject(error), settled()),
        cancelled: false,
      };
      attempts.push(attempt);
      return { outcome, cancel: () => void (attempt.cancelled = true) };
    },
  };
  return { place, attempts, begun: () => attempts.map(({ replicate }) => replicate) };
}
const settled = () => new Promise<void>((resolve) => setTimeout(resolve));
const specs = (count: number) =>
  Array.from({ length: count }, (_, replicate) => specOf({ replicate, years: 10 }));
const keep = { closing: false, coverYears: [] };

function listen(given: { onResult?: (index: number) => void | Promise<void> } = {}) {
  const heard: (number | string)[] = [];
  const progress: RunnerProgress[] = [];
  return {
    heard,
    progress,
    listener: {
      onResult: (_: ReplicateOutcome, index: number) => {
        heard.push(index);
        return given.onResult?.(index);
      },
      onFailure: (error: unknown, index: number) => void heard.push(`${index}: ${(error as Error).message}`),
      onProgress: (said: RunnerProgress) => void progress.push(said),
    },
  };
}

test('as many runs at once as there are workers, handed over as they come', async () => {
  const { place, attempts, begun } = manualPlace(2);
  const { listener, heard } = listen();
  const { finished } = createRunner(place).start(specs(3), listener, { keep });
  expect(begun()).toEqual([0, 1]);
  await attempts[1].end();
  expect(begun()).toEqual([0, 1, 2]);
  await attempts[2].end();
  await attempts[0].end();
  await finished;
  expect(heard).toEqual([1, 2, 0]);
});

test('in order: early outcomes are held, and no more than the workers need', async () => {
  const { place, attempts, begun } = manualPlace(2);
  const { listener, heard } = listen();
  const { finished } = createRunner(place).start(specs(6), listener, { keep, inOrder: true });
  for (const early of [1, 2, 3]) await attempts[early].end();
  expect(heard).toEqual([]);
  expect(begun()).toEqual([0, 1, 2, 3]);
  await attempts[0].end();
  expect(heard).toEqual([0, 1, 2, 3]);
  for (const late of [5, 4]) await attempts[late].end();
  await finished;
  expect(heard).toEqual([0, 1, 2, 3, 4, 5]);
});

test('whoever takes the outcomes slowly slows the runs, and hears of one at a time', async () => {
  const { place, attempts, begun } = manualPlace(1);
  const taken: (() => void)[] = [];
  const { listener, heard } = listen({ onResult: () => new Promise((resolve) => taken.push(resolve)) });
  const { finished } = createRunner(place).start(specs(4), listener, { keep });
  await attempts[0].end();
  await attempts[1].end();
  expect(heard).toEqual([0]);
  expect(begun()).toEqual([0, 1]);
  taken[0]();
  await settled();
  expect(heard).toEqual([0, 1]);
  expect(begun()).toEqual([0, 1, 2]);
  await attempts[2].end();
  taken[1]();
  await settled();
  taken[2]();
  await settled();
  await attempts[3].end();
  taken[3]();
  await finished;
});

test('a run is tried again where its worker died, so often and no more; others go on', async () => {
  const { place, attempts } = manualPlace(1);
  const { listener, heard } = listen();
  const { finished } = createRunner(place).start(specs(3), listener, { keep });
  await attempts[0].fail(new WorkerDied('gone'));
  await attempts[1].end();
  for (let i = 0; i < attemptsOfRun; i++) await attempts[2 + i].fail(new WorkerDied('gone'));
  expect(attempts).toHaveLength(3 + attemptsOfRun);
  await attempts.at(-1)!.fail(new Error('not so'));
  await finished;
  expect(heard).toEqual([0, '1: gone', '2: not so']);
});

test('progress counts the steps of all runs and forgets those of a lost one', async () => {
  const { place, attempts } = manualPlace(2);
  const { listener, progress } = listen();
  const { finished } = createRunner(place).start(specs(4), listener, { keep });
  place.time = 1000;
  attempts[0].step(5);
  place.time = 1010;
  attempts[0].step(6);
  place.time = 2000;
  attempts[1].step(4);
  expect(progress).toEqual([
    { runsDone: 0, runs: 4, stepsDone: 5, steps: 40, secondsLeft: 7 },
    { runsDone: 0, runs: 4, stepsDone: 10, steps: 40, secondsLeft: 6 },
  ]);
  place.time = 3000;
  await attempts[1].fail(new WorkerDied('gone'));
  await attempts[0].end();
  expect(progress.at(-1)).toMatchObject({ runsDone: 1, stepsDone: 10 });
  for (const i of [1, 2, 3, 4]) await attempts[i].end();
  await finished;
  expect(progress.at(-1)).toEqual({ runsDone: 4, runs: 4, stepsDone: 40, steps: 40, secondsLeft: 0 });
});

test('cancelling ends what runs, and nothing is handed over afterwards', async () => {
  const { place, attempts } = manualPlace(2);
  const { listener, heard } = listen();
  const job = createRunner(place).start(specs(4), listener, { keep });
  await attempts[0].end();
  job.cancel();
  expect(attempts.map((attempt) => attempt.cancelled)).toEqual([false, true, true]);
  await expect(job.finished).rejects.toThrow(RunsCancelled);
  await attempts[1].end();
  await attempts[2].fail(new WorkerDied('gone'));
  expect(heard).toEqual([0]);
  expect(attempts).toHaveLength(3);
});

test('what the listener throws ends the runs and comes out', async () => {
  for (const part of ['onResult', 'onProgress'] as const) {
    const { place, attempts } = manualPlace(2);
    const { listener } = listen();
    const throwing = { ...listener, [part]: vi.fn(() => { throw new Error('disk full'); }) }; // prettier-ignore
    const { finished } = createRunner(place).start(specs(4), throwing, { keep });
    const ended = expect(finished).rejects.toThrow('disk full');
    place.time = 1000;
    if (part === 'onProgress') attempts[0].step(1);
    else await attempts[0].end();
    await ended;
    expect(attempts[1].cancelled).toBe(true);
    expect(throwing[part]).toHaveBeenCalledOnce();
  }
});

test('nothing to run is done at once', async () => {
  const { listener } = listen();
  await createRunner(manualPlace(2).place).start([], listener, { keep }).finished;
});
