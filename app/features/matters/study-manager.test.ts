// @vitest-environment node
import { expect, it, vi } from 'vitest';
import { createRunner } from '#sim-core/ensemble/runner.ts';
import { runReplicate } from '#sim-core/ensemble/replicate.ts';
import { RunProblem } from '#sim-core/index.ts';
import { specAtRates, studyKeys } from '#sim-core/matters/study-run.ts';
import { studyDesign } from '#sim-core/matters/study-design.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { Ground } from '#sim-core/grid/ground.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import type { StudyRun } from '#sim-core/spec/study-run.ts';
import { ProblemError } from '#app/lib/api-client.ts';
import { createStudyManager, isStudying, type StudyManager, type StudyTask } from './study-manager.ts';

const [width, height] = [10, 6];
const grid: Grid = { width, height, cellSize: 1, originX: 500_000, originY: 4_000_000, epsg: 32617 };
const whole = () => new Uint8Array(width * height);
const ground: Ground = {
  capacity: whole().fill(255),
  vigour: whole().fill(255),
  exposure: whole(),
  refuge: whole(),
  fence: whole(),
  cover: Float32Array.from({ length: width * height }, (_, i) => (i % width < 3 ? 0.8 : 0)),
};
const base = runSpecSchema.parse({
  version: 1,
  seed: 'small study',
  surveyYear: 2020,
  years: 6,
  rates: { lateralSpread: 1 },
  layers: { cover: 0.5 },
});
const ensemble = { siteId: 'site', comparisonId: 'comparison', option: 0, outlook: 0 };
const keyOf = studyKeys(base);

/** What a study of so many rows lacks. */
function tasksOf(rows: number, manager: StudyManager, stored: ReadonlyMap<string, StudyRun>): StudyTask[] {
  const { points } = studyDesign({
    method: 'indices',
    size: rows,
    seed: 'study',
    rates: { lateralSpread: { law: 'uniform', low: 0.5, high: 1.5 } },
    luck: true,
  });
  return points.flatMap(({ rates, replicate }) => {
    const key = keyOf(replicate, rates);
    return stored.has(key) || manager.madeRun(ensemble, key)
      ? []
      : [{ ensemble, key, rates, spec: specAtRates(base, replicate, rates) }];
  });
}

function setUp(onBegin: (begun: number) => void = () => undefined) {
  const stored = new Map<string, StudyRun>();
  let begun = 0;
  let refuseFrom = Infinity;
  let away = 0;
  const manager = createStudyManager({
    server: {
      put: (_, runs) => {
        if (away-- > 0) return Promise.reject(ProblemError.unreachable());
        for (const run of runs) stored.set(keyOf(run.replicate, run.rates), run);
        return Promise.resolve();
      },
    },
    createPool: () => ({
      ...createRunner({
        workers: 2,
        now: () => 0,
        begin: (spec, keep) => {
          onBegin(++begun);
          const refused = begun > refuseFrom;
          return {
            outcome: Promise.resolve().then(() => {
              if (refused) throw new RunProblem([{ field: 'rates', message: 'No kernel' }]);
              return runReplicate({ spec, grid, ground }, keep);
            }),
            cancel: () => undefined,
          };
        },
      }),
      close: () => undefined,
    }),
    wait: () => Promise.resolve(),
    now: () => 0,
  });
  const study = async (rows: number) => {
    let still = 0;
    manager.start({
      comparisonId: 'comparison',
      grid,
      tasks: tasksOf(rows, manager, stored),
      loadLayers: () => Promise.resolve(new Map()),
      onStill: () => still++,
    });
    await vi.waitFor(() => expect(isStudying(manager.get('comparison')?.phase)).toBe(false), {
      timeout: 20_000,
    });
    await vi.waitFor(() => expect(still).toBe(1));
  };
  return {
    manager,
    stored,
    study,
    begun: () => begun,
    refuseFrom: (n: number) => (refuseFrom = n),
    away: (n: number) => (away = n),
  };
}

it('stores every run, and a larger study runs only what is new', async () => {
  const { manager, stored, study, begun } = setUp();
  await study(16);
  expect(manager.get('comparison')).toMatchObject({ phase: 'done', error: undefined });
  expect([begun(), stored.size]).toEqual([16 * 4, 16 * 4]);
  await study(32);
  expect([begun(), stored.size]).toEqual([32 * 4, 32 * 4]);
  await study(16);
  expect(begun()).toBe(32 * 4);
  const [run] = stored.values();
  expect(run.coveredArea).toHaveLength(7);
  expect(run.closedShare).toHaveLength(7);
  expect(run.closedShare.every((share, i) => i === 0 || share >= run.closedShare[i - 1])).toBe(true);
  expect(run.closedShare[6]).toBeGreaterThan(run.closedShare[0]);
});

it('paused, keeps what is done, and goes on from what the server holds, in a tab that knows nothing', async () => {
  const first = setUp((begun) => {
    if (begun === 20) first.manager.pause('comparison');
  });
  await first.study(16);
  expect(first.manager.get('comparison')?.phase).toBe('paused');
  const kept = first.stored.size;
  expect(kept).toBeGreaterThan(10);
  expect(kept).toBeLessThan(64);
  const second = setUp();
  for (const [key, run] of first.stored) second.stored.set(key, run);
  await second.study(16);
  expect([second.begun(), second.stored.size]).toEqual([64 - kept, 64]);
  const straight = setUp();
  await straight.study(16);
  const digests = (runs: ReadonlyMap<string, StudyRun>) =>
    [...runs].map(([key, { digest }]) => `${key} ${digest}`).sort();
  expect(digests(second.stored)).toEqual(digests(straight.stored));
});

it('leaves out runs that cannot be, and waits for a server that is away', async () => {
  const { manager, stored, study, refuseFrom, away } = setUp();
  refuseFrom(60);
  away(3);
  await study(16);
  expect(manager.get('comparison')).toMatchObject({ phase: 'done', refused: 4, trouble: undefined });
  expect(stored.size).toBe(60);
});
