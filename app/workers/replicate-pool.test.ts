// @vitest-environment node
import { describe, expect, it, vi } from 'vitest';
import type { ReplicateOutcome } from '#sim-core/ensemble/replicate.ts';
import { RunsCancelled, WorkerDied } from '#sim-core/ensemble/runner.ts';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import { createReplicatePool } from './replicate-pool.ts';
import type { RunInput } from './run-loop.ts';
import { portWorker } from './testing/port-worker.ts';

type Fake = ReturnType<typeof portWorker>;
const specs = (count: number) =>
  Array.from({ length: count }, (_, replicate) => ({ replicate, years: 2, stepsPerYear: 1 }) as RunSpec);
const input = { spec: specs(1)[0], grid: { width: 1, height: 1 } } as unknown as RunInput;
const keep = { closing: true, coverYears: [] };

/** A pool of fake workers. `run` is a worker's answer; it is told which worker it is and what it may break. */
function poolOf(workers: number, run: (spec: RunSpec, worker: number, fake: Fake) => unknown) {
  const fakes: Fake[] = [];
  const prepared = vi.fn();
  const createWorker = () => {
    const number = fakes.length;
    const fake: Fake = portWorker({
      prepare: (given: RunInput) => void prepared(given),
      run: (spec: RunSpec) => run(spec, number, fake),
    });
    fakes.push(fake);
    return fake.worker;
  };
  return { pool: createReplicatePool(input, { createWorker, workers }), fakes, prepared };
}
const outcomeOf = ({ replicate }: RunSpec) => ({ outcome: { replicate } });
/** Runs so many specs; what came of each by its place. */
async function runAll(pool: ReturnType<typeof poolOf>['pool'], count: number) {
  const came = new Map<number, unknown>();
  const job = pool.start(
    specs(count),
    {
      onResult: (outcome: ReplicateOutcome, index) => void came.set(index, outcome),
      onFailure: (error, index) => void came.set(index, error),
    },
    { keep },
  );
  await job.finished;
  return came;
}
const crash = () => Object.assign(new Event('error'), { message: 'out of memory' });

describe('the pool of replicates', () => {
  it('starts no more workers than it may, each on the ground once', async () => {
    const { pool, fakes, prepared } = poolOf(3, outcomeOf);
    const came = await runAll(pool, 8);
    expect([...came].sort(([a], [b]) => a - b)).toEqual(specs(8).map((s, i) => [i, outcomeOf(s).outcome]));
    expect(fakes).toHaveLength(3);
    expect(prepared).toHaveBeenCalledTimes(3);
    pool.close();
    for (const { terminate } of fakes) expect(terminate).toHaveBeenCalledOnce();
  });

  it('replaces a worker that dies and runs its replicate again', async () => {
    const tries: number[] = [];
    const { pool, fakes } = poolOf(2, (spec, worker, fake) => {
      if (spec.replicate !== 1) return outcomeOf(spec);
      tries.push(worker);
      if (tries.length > 1) return outcomeOf(spec);
      fake.emit(crash());
      return new Promise(() => undefined);
    });
    const came = await runAll(pool, 5);
    expect(came.size).toBe(5);
    expect(came.get(1)).toEqual({ replicate: 1 });
    expect(tries).toHaveLength(2);
    expect(tries[1]).not.toBe(tries[0]);
    expect(fakes[tries[0]].terminate).toHaveBeenCalledOnce();
    pool.close();
  });

  it('gives up on a replicate that kills every worker, and runs the others', async () => {
    let tries = 0;
    const { pool } = poolOf(2, (spec, _, fake) => {
      if (spec.replicate !== 2) return outcomeOf(spec);
      tries++;
      fake.emit(crash());
      return new Promise(() => undefined);
    });
    const came = await runAll(pool, 4);
    expect(tries).toBe(3);
    expect(came.get(2)).toBeInstanceOf(WorkerDied);
    expect((came.get(2) as Error).message).toContain('out of memory');
    expect([0, 1, 3].map((i) => came.get(i))).toEqual([0, 1, 3].map((replicate) => ({ replicate })));
    pool.close();
  });

  it('passes on what the engine refuses, without another try, and keeps the worker', async () => {
    const problems = [{ field: 'rates', message: 'too fast' }];
    let tries = 0;
    const { pool, fakes } = poolOf(1, (spec) => {
      if (spec.replicate !== 0) return outcomeOf(spec);
      tries++;
      return { refused: problems };
    });
    const came = await runAll(pool, 3);
    expect(came.get(0)).toBeInstanceOf(RunProblem);
    expect((came.get(0) as RunProblem).problems).toEqual(problems);
    expect(tries).toBe(1);
    expect(fakes).toHaveLength(1);
    pool.close();
  });

  it('ends all workers at once when it is cancelled, and hands nothing over', async () => {
    const came: number[] = [];
    const { pool, fakes } = poolOf(3, () => new Promise(() => undefined));
    const job = pool.start(
      specs(6),
      { onResult: (_, i) => void came.push(i), onFailure: (_, i) => void came.push(i) },
      { keep },
    );
    await vi.waitFor(() => {
      expect(fakes).toHaveLength(3);
    });
    job.cancel();
    await expect(job.finished).rejects.toBeInstanceOf(RunsCancelled);
    for (const { terminate } of fakes) expect(terminate).toHaveBeenCalledOnce();
    await new Promise((go) => setTimeout(go, 5));
    expect(came).toEqual([]);
    expect(fakes).toHaveLength(3);
  });
});
