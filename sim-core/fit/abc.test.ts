import { describe, expect, test } from 'vitest';
import { normalCdf } from '#sim-core/numeric/normal-cdf.ts';
import { normalQuantile } from '#sim-core/numeric/normal.ts';
import { uniform } from '#sim-core/random/philox.ts';
import { stream } from '#sim-core/random/streams.ts';
import { nextProposals, startAbc, takeRun, type AbcPlan, type AbcState, type Proposal } from './abc.ts';
import { effectiveSize, evenValues, weightedQuantiles } from './posterior.ts';

type Model = (proposal: Proposal) => number[] | null;

function fit(plan: AbcPlan, model: Model, batch = 250, from: AbcState = startAbc()): AbcState {
  let state = from;
  for (;;) {
    const proposals = nextProposals(plan, state, batch);
    if (proposals.length === 0) return state;
    for (const proposal of proposals) state = takeRun(plan, state, proposal, model(proposal));
  }
}

const luck = (purpose: Proposal) =>
  stream('luck of the model', `fit/${purpose.generation}/${purpose.number}`);
const normal = (random: { int32(): number }) => normalQuantile(uniform(random.int32() >>> 0));
const momentsOf = ({ population }: AbcState, i = 0) => {
  const mean = population.reduce((sum, p) => sum + p.weight * p.point[i], 0);
  const variance = population.reduce((sum, p) => sum + p.weight * (p.point[i] - mean) ** 2, 0);
  return { mean, deviation: Math.sqrt(variance) };
};

const plain: AbcPlan = {
  seed: 'tide',
  dimensions: 1,
  observed: [0.6],
  errors: [0],
  population: 400,
  priorRuns: 1200,
  mostRuns: 8000,
  leastAcceptance: 0.02,
};

describe('rejection', () => {
  // 7 of 10 with a uniform prior and an exact match: acceptance 1/11, posterior Beta(8, 4).
  // Pritchard et al. 1999, Mol. Biol. Evol. 16:1791; Beaumont, Zhang & Balding 2002, Genetics 162:2025.
  const sevenOfTen: Model = (proposal) => {
    const random = luck(proposal);
    return [
      Array.from({ length: 10 }, () => uniform(random.int32() >>> 0)).filter((u) => u < proposal.point[0])
        .length,
    ];
  };
  test('keeps Beta(8, 4)', () => {
    const plan = { ...plain, observed: [7], population: 700, priorRuns: 8000, mostRuns: 8000 };
    const state = fit(plan, sevenOfTen);
    expect(state.population.every((p) => p.distance === 0)).toBe(true);
    const { mean, deviation } = momentsOf(state);
    // four standard errors of 700 draws
    expect(Math.abs(mean - 2 / 3)).toBeLessThan(4 * Math.sqrt(0.017094 / 700));
    expect(Math.abs(deviation ** 2 - 0.017094)).toBeLessThan(0.2 * 0.017094);
    expect(state.ending).toBe('enough');
  });
});

describe('generations', () => {
  const seen =
    (deviation: number): Model =>
    (proposal) => [proposal.point[0] + deviation * normal(luck(proposal))];

  test('come close to the exact posterior of a normal observation', () => {
    const state = fit(plain, seen(0.05));
    const { mean, deviation } = momentsOf(state);
    const tolerance = state.generations.at(-1)!.tolerance * state.scales[0];
    expect(state.generations.length).toBeGreaterThan(3);
    // within the tolerance the observation is spread evenly, which adds its variance
    const expected = Math.sqrt(0.05 ** 2 + tolerance ** 2 / 3);
    expect(Math.abs(mean - 0.6)).toBeLessThan((4 * expected) / Math.sqrt(200));
    expect(Math.abs(deviation / expected - 1)).toBeLessThan(0.2);
  });

  test('at the edge of what is believed, where unweighted moves would crowd inwards', () => {
    const state = fit({ ...plain, observed: [0.02] }, seen(0.05));
    const tolerance = state.generations.at(-1)!.tolerance * state.scales[0];
    const spread = Math.sqrt(0.05 ** 2 + tolerance ** 2 / 3);
    // mean of a normal law cut at 0 (Johnson, Kotz & Balakrishnan 1994, Continuous Univariate Distributions 1, ch. 13)
    const a = -0.02 / spread;
    const expected = 0.02 + (spread * Math.exp((-a * a) / 2)) / Math.sqrt(2 * Math.PI) / (1 - normalCdf(a));
    expect(Math.abs(momentsOf(state).mean - expected)).toBeLessThan(0.1 * expected);
  });

  test('two rates of which only the sum shows stay as uncertain apart as they were', () => {
    const state = fit({ ...plain, dimensions: 2, observed: [1] }, ({ point }) => [point[0] + point[1]]);
    const sums = state.population.map(({ point }) => point[0] + point[1]);
    expect(Math.max(...sums) - Math.min(...sums)).toBeLessThan(0.1);
    // uniform along the line: deviation 1/√12
    expect(Math.abs(momentsOf(state).deviation * Math.sqrt(12) - 1)).toBeLessThan(0.15);
  });

  test('the error of an observation widens the posterior by as much', () => {
    const state = fit({ ...plain, errors: [0.1] }, ({ point }) => [point[0]]);
    const tolerance = state.generations.at(-1)!.tolerance * state.scales[0];
    const expected = Math.sqrt(0.1 ** 2 + tolerance ** 2 / 3);
    expect(Math.abs(momentsOf(state).deviation / expected - 1)).toBeLessThan(0.2);
  });

  test('hang neither on how many runs are asked for at once nor on a pause', () => {
    const plan = { ...plain, population: 60, priorRuns: 200, mostRuns: 8000, leastAcceptance: 0.1 };
    const whole = fit(plan, seen(0.05), 1);
    expect(whole.generations.length).toBeGreaterThan(2);
    const inBatches = fit(plan, seen(0.05), 37);
    expect(inBatches.generations).toEqual(whole.generations);
    expect(inBatches.population).toEqual(whole.population);
    let half = startAbc();
    while (half.runs < 333)
      for (const proposal of nextProposals(plan, half, 1))
        half = takeRun(plan, half, proposal, seen(0.05)(proposal));
    const resumed = fit(plan, seen(0.05), 1, JSON.parse(JSON.stringify(half)) as AbcState);
    expect(resumed).toEqual(whole);
  });

  test('a run that cannot be is tried and not kept', () => {
    const state = fit({ ...plain, population: 60, priorRuns: 300 }, (proposal) =>
      proposal.point[0] > 0.6 ? null : [proposal.point[0]],
    );
    expect(state.population.every(({ point }) => point[0] <= 0.6)).toBe(true);
    expect(state.runs).toBeGreaterThan(300);
  });

  test('never more runs than allowed, and a figure that tells nothing is left out', () => {
    const plan = { ...plain, observed: [0.6, 5], errors: [0, 0], priorRuns: 500, mostRuns: 700 };
    const state = fit(plan, (proposal) => [...seen(0.05)(proposal)!, 5]);
    expect(state).toMatchObject({ runs: 700, ending: 'no more runs' });
    expect(state.scales[1]).toBe(0);
    expect(state.population).toHaveLength(400);
  });

  test('nothing that can be run ends the fit with the reason', () => {
    expect(fit({ ...plain, priorRuns: 50 }, () => null)).toMatchObject({
      ending: 'hardly any kept',
      runs: 50,
    });
  });

  test('results out of turn are refused', () => {
    const [, second] = nextProposals(plain, startAbc(), 2);
    expect(() => takeRun(plain, startAbc(), second, [0.5])).toThrow(/expected run 0 of generation 0/);
  });
});

describe('weighted values', () => {
  test('even weights give the middle values', () => {
    expect(weightedQuantiles([4, 1, 3, 2], [1, 1, 1, 1], [0, 0.125, 0.5, 1])).toEqual([1, 1, 2.5, 4]);
  });
  test('a weight of two is two values', () => {
    expect(weightedQuantiles([1, 2, 3], [1, 2, 1], [0.5])).toEqual([2]);
    expect(effectiveSize([1, 1, 1, 1])).toBe(4);
    expect(effectiveSize([1, 0, 0, 0])).toBe(1);
  });
  test('even values have the mean of the weighted ones', () => {
    const given = Array.from({ length: 400 }, (_, i) => (i + 0.5) / 400);
    const values = evenValues(given, given, 1000);
    // density 2x on 0..1: mean 2/3, median √½
    expect(values.reduce((sum, v) => sum + v, 0) / 1000).toBeCloseTo(2 / 3, 3);
    expect(values[500]).toBeCloseTo(Math.SQRT1_2, 2);
  });
});
