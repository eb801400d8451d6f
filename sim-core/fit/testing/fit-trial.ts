import { stream } from '#sim-core/random/streams.ts';
import { uniform } from '#sim-core/random/philox.ts';
import { runReplicate } from '#sim-core/ensemble/replicate.ts';
import { gridOf, groundOf, specOf } from '#sim-core/testing/setups.ts';
import { nextProposals, startAbc, takeRun, type AbcPlan, type AbcState } from '../abc.ts';
import { ratesAt, runOfProposal, type FittedRate } from '../fit-run.ts';
import { fitTarget, observedFigures, type FitTarget } from '../fit-target.ts';
import { resurveyOf } from '../resurvey.ts';
import { weightedQuantiles } from '../posterior.ts';

const [width, height, cellSize] = [36, 36, 2];
const grid = gridOf(width, height, cellSize);
const cells = { width, height, cellSize };
const surveyYear = 2020;
const years = 6;

/** What is believed of the rates before: the truth of each trial is drawn from it. */
export const fitted: readonly FittedRate[] = [
  { name: 'lateralSpread', belief: { law: 'uniform', low: 0.5, high: 2.5 } },
  { name: 'fillRate', belief: { law: 'uniform', low: 0.4, high: 1.6 } },
];

/** Bare mud with a few survivors. */
const ground = (() => {
  const cover = new Float32Array(width * height);
  for (const [x, y] of [
    [8, 9],
    [26, 12],
    [15, 27],
  ])
    for (let dy = -2; dy <= 2; dy++) for (let dx = -2; dx <= 2; dx++) cover[(y + dy) * width + x + dx] = 0.9;
  return groundOf(width * height, { cover });
})();

const baseOf = (seed: string) => specOf({ seed, surveyYear, years, mode: 'counts' });

export interface Trial {
  readonly truth: readonly number[];
  /** 5, 50 and 95 % of each rate afterwards */
  readonly intervals: readonly (readonly number[])[];
  readonly state: AbcState;
}

export interface TrialSize {
  readonly population: number;
  readonly priorRuns: number;
  readonly mostRuns: number;
}

/** The surveys of 2023 and 2026 that a run with the true rates leads to. */
function surveyed(seed: string, point: readonly number[]): FitTarget {
  const truth = runOfProposal(baseOf(`${seed}/truth`), fitted, { generation: 0, number: 1, point });
  const { covers } = runReplicate(
    { spec: truth, grid, ground },
    { closing: false, coverYears: [2023, 2026] },
  );
  const maps = [...covers].map(([year, cover]) => ({
    ...resurveyOf(year, cover, ground.capacity, cells),
    areaError: 0,
  }));
  return fitTarget(ground.cover, ground.capacity, cells, { maps, areas: [], fronts: [] });
}

/** Draws true rates from the prior, simulates their resurveys, and fits the rates to these. */
export function runTrial(seed: string, size: TrialSize): Trial {
  const random = stream(seed, 'fit/check');
  const truthPoint = fitted.map(() => uniform(random.int32() >>> 0));
  const target = surveyed(seed, truthPoint);
  const figures = observedFigures(target);
  const plan: AbcPlan = {
    seed,
    dimensions: fitted.length,
    observed: figures.map(({ observed }) => observed),
    errors: figures.map(({ error }) => error),
    leastAcceptance: 0.02,
    ...size,
  };
  const base = baseOf(seed);
  let state = startAbc();
  for (;;) {
    const proposals = nextProposals(plan, state, 8);
    if (proposals.length === 0) break;
    for (const proposal of proposals) {
      const keep = { closing: false, coverYears: [], fit: { target, want: 'figures' } } as const;
      const { figures: got } = runReplicate(
        { spec: runOfProposal(base, fitted, proposal), grid, ground },
        keep,
      );
      state = takeRun(plan, state, proposal, [...got!]);
    }
  }
  const weights = state.population.map(({ weight }) => weight);
  const rates = (point: readonly number[]) => {
    const at = ratesAt(fitted, point);
    return fitted.map(({ name }) => at[name]!);
  };
  const values = state.population.map(({ point }) => rates(point));
  return {
    truth: rates(truthPoint),
    intervals: fitted.map((_, i) =>
      weightedQuantiles(
        values.map((row) => row[i]),
        weights,
        [0.05, 0.5, 0.95],
      ),
    ),
    state,
  };
}
