// @vitest-environment node
import { describe, expect, it } from 'vitest';
import {
  createRunLoop,
  unacknowledgedLimit,
  type RunInput,
  type RunProgress,
  type StepwiseRun,
  type YearEvent,
} from './run-loop.ts';

const input = (years: number, stepsPerYear = 2) =>
  ({ spec: { surveyYear: 2026, years, stepsPerYear }, grid: { width: 2, height: 1 } }) as unknown as RunInput;

/** A stand-in for the engine that counts its years, reports every other frame and may break in one of them. */
function countingRun(years: number, breakIn?: number) {
  const asked: number[] = [];
  const run: StepwiseRun = {
    survey: { year: 2026, rows: [], frame: Uint8Array.of(1, 2) },
    nextYear: (onStep) => {
      const year = 2027 + asked.length;
      if (year > 2026 + years) return undefined;
      asked.push(year);
      if (year === breakIn) throw new RangeError('cover left 0..1');
      onStep?.(asked.length * 2 - 1, years * 2);
      return { year, rows: [], frame: year % 2 ? Uint8Array.of(year - 2000, 0) : undefined };
    },
    closing: () => Int16Array.of(2030, 0),
    result: () => ({ digest: 'of this run' }) as never,
  };
  return { run, asked };
}
const pack = ({ values }: { values: Uint8Array | Int16Array }) =>
  new Blob([Uint8Array.of(values.length, values[0] & 255)]);
const bytesOf = async (blob: Blob | undefined) => blob && [...new Uint8Array(await blob.arrayBuffer())];
const turns = async (n: number) => {
  for (let i = 0; i < n; i++) await new Promise((resolve) => setImmediate(resolve));
};

describe('createRunLoop', () => {
  it('hands over the survey, then every year, with the frame packed where there is one', async () => {
    const { run } = countingRun(3);
    const seen: YearEvent[] = [];
    const loop = createRunLoop({ createRun: () => run, pack, now: () => 0 });
    const outcome = await loop.run(input(3), { onYear: (e) => void seen.push(e) });
    expect(seen.map((e) => e.year)).toEqual([2026, 2027, 2028, 2029]);
    expect(await Promise.all(seen.map((e) => bytesOf(e.packed)))).toEqual([
      [2, 1],
      [2, 27],
      undefined,
      [2, 29],
    ]);
    expect([...outcome.closing]).toEqual([2030, 0]);
    expect(await bytesOf(outcome.packedClosing)).toEqual([2, 2030 & 255]);
    expect(outcome.result.digest).toBe('of this run');
  });

  it('does not run ahead of whoever saves its years', async () => {
    const { run, asked } = countingRun(20);
    const saved: (() => void)[] = [];
    const loop = createRunLoop({ createRun: () => run, pack, now: () => 0 });
    const done = loop.run(input(20), { onYear: () => new Promise<void>((r) => saved.push(r)) });
    await turns(50);
    expect(saved).toHaveLength(unacknowledgedLimit);
    expect(asked).toHaveLength(unacknowledgedLimit - 1);
    saved[0]();
    await turns(50);
    expect(saved).toHaveLength(unacknowledgedLimit + 1);
    for (let i = 1; i < 21; i++) {
      saved[i]();
      await turns(5);
    }
    await done;
    expect(asked).toHaveLength(20);
  });

  it('pauses, steps one year at a time and goes on', async () => {
    const { run, asked } = countingRun(9);
    const loop = createRunLoop({ createRun: () => run, pack, now: () => 0 });
    loop.pause();
    const stoodAt: number[] = [];
    const onStandstill = () => stoodAt.push(asked.length);
    const done = loop.run(input(9), { onYear: () => undefined, onStandstill });
    await turns(20);
    expect(asked).toEqual([]);
    expect(stoodAt).toEqual([0]);
    loop.step();
    await turns(20);
    expect(asked).toEqual([2027]);
    expect(stoodAt).toEqual([0, 1]);
    loop.step();
    loop.step();
    await turns(20);
    expect(asked).toEqual([2027, 2028, 2029]);
    expect(stoodAt).toEqual([0, 1, 3]);
    loop.resume();
    await done;
    expect(asked).toHaveLength(9);
  });

  it('says how far it is, and how long is left from the pace of the steps', async () => {
    const { run } = countingRun(4);
    let clock = 0;
    const said: RunProgress[] = [];
    const slow: StepwiseRun = {
      ...run,
      nextYear: (onStep) => {
        clock += 500;
        const outcome = run.nextYear(onStep);
        clock += 500;
        return outcome;
      },
    };
    const loop = createRunLoop({ createRun: () => slow, pack, now: () => clock });
    await loop.run(input(4), { onYear: () => undefined, onProgress: (p) => said.push(p) });
    expect(said[0]).toEqual({ stepsDone: 0, steps: 8, secondsLeft: undefined });
    expect(said[1]).toEqual({ stepsDone: 1, steps: 8, secondsLeft: 3.5 });
    expect(said[2]).toEqual({ stepsDone: 2, steps: 8, secondsLeft: 3 });
    expect(said.at(-1)).toEqual({ stepsDone: 8, steps: 8, secondsLeft: 0 });
  });

  it('rejects with what the engine threw', async () => {
    const { run } = countingRun(4, 2028);
    const loop = createRunLoop({ createRun: () => run, pack, now: () => 0 });
    await expect(loop.run(input(4), { onYear: () => undefined })).rejects.toThrow(
      new RangeError('cover left 0..1'),
    );
  });

  it('stops when a year cannot be saved', async () => {
    const { run, asked } = countingRun(50);
    const loop = createRunLoop({ createRun: () => run, pack, now: () => 0 });
    const done = loop.run(input(50), {
      onYear: ({ year }) =>
        year === 2028 ? Promise.reject(new Error('disk full')) : new Promise(() => undefined),
    });
    await expect(done).rejects.toThrow('disk full');
    expect(asked.length).toBeLessThan(unacknowledgedLimit);
  });
});
