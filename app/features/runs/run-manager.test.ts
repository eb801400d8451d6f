// @vitest-environment node
import { describe, expect, it, vi } from 'vitest';
import type { Run } from '#contract/runs.ts';
import type { RunResult } from '#sim-core/spec/run-result.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { RunWorkerDied, type RunHandle } from '#app/workers/run-client.ts';
import { createRunLoop, unacknowledgedLimit } from '#app/workers/run-loop.ts';
import { createRunManager, type RunManagerParts } from './run-manager.ts';

const digest = 'd'.repeat(64);
const run = {
  id: 'run-1',
  siteId: 'site-1',
  name: 'Wait, first',
  surveyYear: 2026,
  years: 12,
  spec: { years: 12, stepsPerYear: 1 },
  grid: { width: 2, height: 1 },
  digest,
} as unknown as Run;
const later = () => new Promise<void>((resolve) => setTimeout(resolve));
const lately = async (until: () => boolean) => {
  for (let i = 0; i < 200 && !until(); i++) await later();
  expect(until()).toBe(true);
};
const unreachable = () => ProblemError.unreachable();
const refused = (status: number) => new ProblemError(status, 'conflict', 'It was stopped meanwhile.');

/** The real loop on a fake engine, without a worker: the same acknowledgements, none of the threads. */
function loopWorker(made: { years: number }) {
  let fail: (error: unknown) => void = () => undefined;
  const startWorker: RunManagerParts['startWorker'] = (input, listener) => {
    const last = 2026 + input.spec.years;
    let year = 2026;
    const outcome = () => ({ year, rows: [{ time: year } as never], frame: new Uint8Array(2) });
    const loop = createRunLoop({
      createRun: () => ({
        survey: outcome(),
        nextYear: () => {
          if (year === last) return undefined;
          year++;
          made.years++;
          return outcome();
        },
        closing: () => Int16Array.of(2030, 0),
        result: () => ({ digest, engineVersion: '1' }) as RunResult,
      }),
      pack: () => new Blob(),
      now: () => 0,
    });
    const died = new Promise<never>((_, reject) => (fail = reject));
    const handle: RunHandle = {
      result: Promise.race([loop.run(input, listener), died]),
      pause: () => loop.pause(),
      resume: () => loop.resume(),
      step: () => loop.step(),
      cancel: () => fail(new Error('cancelled')),
    };
    handle.result.catch(() => undefined);
    return handle;
  };
  return { startWorker, die: (error: unknown) => fail(error) };
}

function setUp() {
  const made = { years: 0 };
  const worker = loopWorker(made);
  const stored: number[] = [];
  const server = {
    putFrame: vi.fn((_: string, year: number) => {
      stored.push(year);
      return Promise.resolve();
    }),
    putClosing: vi.fn(() => Promise.resolve()),
    finish: vi.fn(() => Promise.resolve({ ...run, status: 'finished' } as Run)),
    stop: vi.fn(() => Promise.resolve({ ...run, status: 'stopped' } as Run)),
    check: vi.fn(() => Promise.resolve(run)),
  };
  const waits: number[] = [];
  const onFrame = vi.fn();
  const onChange = vi.fn();
  const onRecord = vi.fn();
  const manager = createRunManager({
    server,
    startWorker: worker.startWorker,
    wait: (ms) => {
      waits.push(ms);
      return later();
    },
    onFrame,
    onChange,
  });
  const parts = { run, loadLayers: () => Promise.resolve(new Map<string, never>()), onRecord };
  return { manager, server, made, stored, waits, onFrame, onChange, onRecord, parts, die: worker.die };
}
const phase = (t: ReturnType<typeof setUp>) => t.manager.get('run-1')?.phase;

describe('createRunManager', () => {
  it('stores every year as it comes and then the end', async () => {
    const t = setUp();
    t.manager.start(t.parts);
    expect(phase(t)).toBe('loading');
    await lately(() => phase(t) === 'done');
    expect(t.stored).toEqual(Array.from({ length: 13 }, (_, i) => 2026 + i));
    expect(t.onFrame).toHaveBeenCalledTimes(13);
    expect(t.manager.get('run-1')).toMatchObject({ year: 2038, digest, savedYears: t.stored });
    expect(t.manager.get('run-1')?.rows.map((row) => row.time)).toEqual(t.stored);
    expect(t.onRecord).toHaveBeenCalledWith(expect.objectContaining({ status: 'finished' }));
    expect(t.onChange.mock.calls.at(-1)).toEqual([0]);
  });

  it('does not run ahead of a server that does not answer', async () => {
    const t = setUp();
    const answers: (() => void)[] = [];
    t.server.putFrame.mockImplementation(() => new Promise<void>((resolve) => answers.push(resolve)));
    t.manager.start(t.parts);
    for (let i = 0; i < 30; i++) await later();
    expect(answers).toHaveLength(unacknowledgedLimit);
    answers.shift()?.();
    for (let i = 0; i < 30; i++) await later();
    expect(answers).toHaveLength(unacknowledgedLimit);
    expect(t.made.years).toBe(unacknowledgedLimit);
  });

  it('waits longer and longer for a lost connection, says so, and goes on', async () => {
    const t = setUp();
    const failures = [unreachable(), unreachable(), new ProblemError(503, 'internal', 'Busy.')];
    t.server.putFrame.mockImplementation((_, year) => {
      const failure = year === 2026 && failures.shift();
      return failure ? Promise.reject(failure) : Promise.resolve();
    });
    const troubles = new Set<string | undefined>();
    t.manager.subscribe(() => troubles.add(t.manager.get('run-1')?.trouble));
    t.manager.start(t.parts);
    await lately(() => phase(t) === 'done');
    expect(t.waits).toEqual([1000, 2000, 4000]);
    expect([...troubles].some((words) => words?.includes('cannot be reached'))).toBe(true);
    expect(t.manager.get('run-1')?.trouble).toBeUndefined();
    expect([...t.manager.get('run-1')!.savedYears]).toEqual(Array.from({ length: 13 }, (_, i) => 2026 + i));
  });

  it('fails with the reason when the server refuses for good, and stops the run there', async () => {
    const t = setUp();
    t.server.putFrame.mockRejectedValueOnce(refused(409));
    t.manager.start(t.parts);
    await lately(() => phase(t) === 'failed');
    expect(t.manager.get('run-1')?.error).toBe('It was stopped meanwhile.');
    expect(t.server.stop).toHaveBeenCalledWith('run-1');
    expect(t.waits).toEqual([]);
  });

  it('says so when the worker dies, and stops the run on the server', async () => {
    const t = setUp();
    t.server.putFrame.mockImplementation(() => new Promise(() => undefined));
    t.manager.start(t.parts);
    await lately(() => phase(t) === 'running');
    t.die(new RunWorkerDied('The run’s worker stopped: out of memory'));
    await lately(() => phase(t) === 'failed');
    expect(t.manager.get('run-1')?.error).toContain('out of memory');
    expect(t.server.stop).toHaveBeenCalledTimes(1);
  });

  it('fails where the layers cannot be read, before any work', async () => {
    const t = setUp();
    t.manager.start({ ...t.parts, loadLayers: () => Promise.reject(refused(404)) });
    await lately(() => phase(t) === 'failed');
    expect(t.made.years).toBe(0);
    expect(t.server.stop).toHaveBeenCalledTimes(1);
  });

  it('cancels at once, keeps what is stored, and takes nothing more', async () => {
    const t = setUp();
    const answers: (() => void)[] = [];
    t.server.putFrame.mockImplementation(() => new Promise<void>((resolve) => answers.push(resolve)));
    t.manager.start(t.parts);
    await lately(() => answers.length === unacknowledgedLimit);
    answers[0]();
    await lately(() => t.manager.get('run-1')?.savedYears.length === 1);
    await t.manager.cancel('run-1');
    expect(phase(t)).toBe('stopped');
    expect(t.onRecord).toHaveBeenCalledWith(expect.objectContaining({ status: 'stopped' }));
    for (let i = 0; i < 20; i++) await later();
    expect(phase(t)).toBe('stopped');
    expect(t.server.finish).not.toHaveBeenCalled();
    expect(t.server.stop).toHaveBeenCalledTimes(1);
  });

  it('stands still while paused and takes one year a step', async () => {
    const t = setUp();
    t.manager.start(t.parts);
    t.manager.pause('run-1');
    await lately(() => t.stored.length === 1);
    for (let i = 0; i < 20; i++) await later();
    expect([t.made.years, phase(t)]).toEqual([0, 'paused']);
    t.manager.step('run-1');
    expect(phase(t)).toBe('pausing');
    await lately(() => t.stored.length === 2);
    for (let i = 0; i < 20; i++) await later();
    expect([t.made.years, phase(t)]).toEqual([1, 'paused']);
    t.manager.resume('run-1');
    await lately(() => phase(t) === 'done');
  });

  it('says that it is pausing until the year is done, and lets that be taken back', async () => {
    const t = setUp();
    const answers: (() => void)[] = [];
    t.server.putFrame.mockImplementation(() => new Promise<void>((resolve) => answers.push(resolve)));
    t.manager.start(t.parts);
    await lately(() => answers.length === unacknowledgedLimit);
    t.manager.pause('run-1');
    expect(phase(t)).toBe('pausing');
    t.manager.resume('run-1');
    expect(phase(t)).toBe('running');
    t.manager.pause('run-1');
    expect(phase(t)).toBe('pausing');
    answers.forEach((answer) => answer());
    await lately(() => phase(t) === 'paused');
    const { years } = t.made;
    for (let i = 0; i < 20; i++) await later();
    expect([t.made.years, phase(t)]).toEqual([years, 'paused']);
  });

  it('repeats without storing a frame and records the digest', async () => {
    const t = setUp();
    t.manager.repeat(t.parts);
    await lately(() => phase(t) === 'done');
    expect(t.stored).toEqual([]);
    expect(t.onFrame).not.toHaveBeenCalled();
    expect(t.server.finish).not.toHaveBeenCalled();
    expect(t.server.check).toHaveBeenCalledWith('run-1', { digest, engineVersion: '1' });
  });

  it('does not start twice, and dismisses only what is over', async () => {
    const t = setUp();
    t.manager.start(t.parts);
    t.manager.start(t.parts);
    t.manager.dismiss('run-1');
    expect(t.manager.list()).toHaveLength(1);
    await lately(() => phase(t) === 'done');
    expect(t.stored).toHaveLength(13);
    t.manager.dismiss('run-1');
    expect(t.manager.list()).toEqual([]);
  });
});
