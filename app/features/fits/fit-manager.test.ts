// @vitest-environment node
import { describe, expect, it, vi } from 'vitest';
import type { Fit, FitPlan, FitState } from '#contract/fits.ts';
import { createRunner } from '#sim-core/ensemble/runner.ts';
import { startAbc } from '#sim-core/fit/abc.ts';
import type { FitTarget } from '#sim-core/fit/fit-target.ts';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import { createFitManager, isFitting } from './fit-manager.ts';
import type { FitServer } from './change-fit.ts';

const plan = {
  base: {
    seed: 'tide',
    surveyYear: 2026,
    years: 4,
    stepsPerYear: 1,
    rates: { lateralSpread: 1 },
    processes: {},
  },
  data: { maps: [], areas: [{ year: 2030, area: 60, error: 0 }], fronts: [] },
  rates: [{ name: 'lateralSpread', belief: { law: 'uniform', low: 0.5, high: 1.5 } }],
  figures: [{ kind: 'area', year: 2030, observed: 60, error: 0 }],
  population: 20,
  priorRuns: 60,
  mostRuns: 300,
  leastAcceptance: 0.03,
} as unknown as FitPlan;
const stored = (state: FitState = startAbc() as FitState): Fit => ({
  id: 'fit',
  siteId: 'site',
  name: 'A fit',
  status: 'running',
  startedAt: '2026-12-01T00:00:00.000Z',
  startedBy: 'Invented Person',
  runs: state.runs,
  mostRuns: plan.mostRuns,
  generations: state.generations.length,
  accepted: null,
  plan,
  state,
  grid: { width: 1, height: 1, cellSize: 1, originX: 0, originY: 0, epsg: 32631 },
  layers: [],
});

/** Covered area that follows from the spread and, a little, from the replicate. */
const areaOf = ({ rates, replicate }: RunSpec) => 50 * rates.lateralSpread + ((replicate * 37) % 11) / 11;

function setUp(workers: number, run: (spec: RunSpec) => number = areaOf) {
  let kept = stored();
  const server = {
    fit: vi.fn(() => Promise.resolve(kept)),
    putState: vi.fn((_: unknown, state: FitState) => {
      // As JSON: nothing may hang on what does not survive a reload.
      kept = stored(JSON.parse(JSON.stringify(state)) as FitState);
      return Promise.resolve();
    }),
    stop: vi.fn(() => Promise.resolve({ ...kept, status: 'stopped' as const })),
  } satisfies FitServer;
  const close = vi.fn();
  let started = 0;
  let onRun: (started: number) => void = () => undefined;
  const manager = createFitManager({
    server,
    createPool: () => ({
      ...createRunner({
        workers,
        now: () => 0,
        begin: (spec) => ({
          outcome: Promise.resolve().then(() => {
            onRun(++started);
            return { figures: [run(spec)] } as never;
          }),
          cancel: () => undefined,
        }),
      }),
      close,
    }),
    wait: () => Promise.resolve(),
    now: () => 0,
  });
  const onRecord = vi.fn();
  const start = () =>
    manager.start({
      fit: kept,
      loadLayers: () => Promise.resolve(new Map()),
      loadTarget: () => Promise.resolve({} as FitTarget),
      onRecord,
    });
  const settled = () => vi.waitFor(() => expect(isFitting(manager.get('fit'))).toBe(false));
  return {
    ...{ manager, server, start, settled, onRecord, close },
    kept: () => kept.state,
    each: (listener: typeof onRun) => (onRun = listener),
  };
}

describe('a fit in a tab', () => {
  it('runs generation after generation, saves each, and ends', async () => {
    const fit = setUp(3);
    fit.start();
    await fit.settled();
    const state = fit.kept();
    expect(fit.manager.get('fit')).toMatchObject({ phase: 'done', error: undefined });
    expect(state.ending).not.toBeNull();
    expect(state.generations.length).toBeGreaterThan(1);
    expect(fit.server.putState.mock.calls.length).toBeGreaterThanOrEqual(state.generations.length);
    const spread = state.population.reduce((sum, p) => sum + p.weight * (0.5 + p.point[0]), 0);
    expect(Math.abs(spread - 1.19)).toBeLessThan(0.03);
    expect(fit.onRecord).toHaveBeenCalledOnce();
    expect(fit.close).toHaveBeenCalledOnce();
  });

  it('comes to the same with any number of workers, and after a pause', async () => {
    const [one, many, paused] = [setUp(1), setUp(7), setUp(2)];
    one.start();
    many.start();
    paused.each((started) => {
      if (started === 83) paused.manager.pause('fit');
    });
    paused.start();
    await Promise.all([one.settled(), many.settled(), paused.settled()]);
    expect(paused.manager.get('fit')?.phase).toBe('paused');
    expect(paused.kept().ending).toBeNull();
    expect(paused.kept().runs).toBeGreaterThan(0);
    paused.start();
    await paused.settled();
    expect(many.kept()).toEqual(one.kept());
    expect(paused.kept()).toEqual(one.kept());
  });

  it('stops by hand with what is done', async () => {
    const fit = setUp(2);
    fit.each((started) => {
      if (started === 30) fit.manager.stop('fit');
    });
    fit.start();
    await fit.settled();
    expect(fit.server.stop).toHaveBeenCalledOnce();
    expect(fit.onRecord.mock.calls[0][0]).toMatchObject({ status: 'stopped' });
  });

  it('goes on without runs that no kernel can show, and fails with any other error', async () => {
    const problem = new RunProblem([{ field: 'rates.lateralSpread', message: 'Too slow' }]);
    const some = setUp(2, (spec) => {
      if (spec.rates.lateralSpread < 0.7) throw problem;
      return areaOf(spec);
    });
    some.start();
    await some.settled();
    expect(some.manager.get('fit')?.phase).toBe('done');
    expect(some.kept().refused).toBeGreaterThan(5);
    const broken = setUp(2, () => {
      throw new Error('The worker lost its ground');
    });
    broken.start();
    await broken.settled();
    expect(broken.manager.get('fit')).toMatchObject({ phase: 'failed' });
    expect(broken.close).toHaveBeenCalledOnce();
  });
});
