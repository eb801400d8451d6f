import { drawLatinHypercube } from '#sim-core/ensemble/latin-hypercube.ts';
import { quantiles } from '#sim-core/ensemble/quantile.ts';
import { normalQuantile } from '#sim-core/numeric/normal.ts';
import { uniform } from '#sim-core/random/philox.ts';
import { stream } from '#sim-core/random/streams.ts';
import { movesAbout } from './particle-moves.ts';

/** What a fit sets out to do. Points are shares of belief: a rate's share is where it lies in its prior law, 0..1. */
export interface AbcPlan {
  readonly seed: string;
  /** rates to fit */
  readonly dimensions: number;
  /** what was observed, and the standard error of each figure: 0 of what is known exactly */
  readonly observed: readonly number[];
  readonly errors: readonly number[];
  /** members of each generation */
  readonly population: number;
  /** runs of the first generation, from the prior alone, of which the nearest are kept */
  readonly priorRuns: number;
  /** the fit ends before it takes more runs than these */
  readonly mostRuns: number;
  /** the fit ends with a generation that keeps a smaller share of its runs */
  readonly leastAcceptance: number;
}

/** A set of rates, what it came to, and its share of belief. */
export interface Particle {
  readonly point: readonly number[];
  readonly summaries: readonly number[];
  readonly distance: number;
  readonly weight: number;
}

/** A generation that is complete. */
export interface Generation {
  /** distance up to which its members were kept */
  readonly tolerance: number;
  readonly runs: number;
  /** kept among its runs */
  readonly acceptance: number;
}

export type AbcEnding = 'enough' | 'no more runs' | 'hardly any kept';

/** Where a fit stands: plain data, from which it goes on anywhere. */
export interface AbcState {
  /** what one unit of distance is, by summary; 0 of those that told nothing. Empty in the first generation. */
  readonly scales: readonly number[];
  /** complete generations, the prior's first */
  readonly generations: readonly Generation[];
  /** of the last complete generation; empty in the first */
  readonly population: readonly Particle[];
  /** of the generation that is being made: kept so far (in the first, all that ran), and runs so far */
  readonly kept: readonly Particle[];
  readonly tried: number;
  readonly runs: number;
  /** runs that could not be, whose rates the fit therefore does not know */
  readonly refused: number;
  /** all that ran of the first generation: what the prior alone foresees. Empty until it is complete. */
  readonly prior: readonly Pick<Particle, 'point' | 'summaries'>[];
  readonly ending: AbcEnding | null;
}

/** A run that the fit asks for. */
export interface Proposal {
  readonly generation: number;
  /** number in its generation, from 0 */
  readonly number: number;
  readonly point: readonly number[];
}

/** Share of a population that the next generation's tolerance would keep. */
const closer = 0.5;

export const startAbc = (): AbcState => ({
  scales: [],
  generations: [],
  population: [],
  kept: [],
  tried: 0,
  runs: 0,
  refused: 0,
  prior: [],
  ending: null,
});

/**
 * The next runs of a fit: a Latin hypercube of the prior first, then moves about the last population. Each follows from
 * the seed, its generation and its number, so that it matters neither how many are asked for at once nor who runs them.
 *
 * @returns at most `count`; none once the fit has ended
 */
export function nextProposals(plan: AbcPlan, state: AbcState, count: number): Proposal[] {
  if (state.ending) return [];
  const generation = state.generations.length;
  if (generation === 0) {
    const all = drawLatinHypercube(stream(plan.seed, 'fit/prior'), plan.priorRuns, plan.dimensions);
    return all
      .slice(state.tried, state.tried + count)
      .map((point, i) => ({ generation, number: state.tried + i, point: [...point] }));
  }
  const moves = movesAbout(state.population);
  const runsLeft = plan.mostRuns - state.runs;
  return Array.from({ length: Math.max(0, Math.min(count, runsLeft)) }, (_, i) => {
    const number = state.tried + i;
    return { generation, number, point: moves.draw(stream(plan.seed, `fit/${generation}/${number}`)) };
  });
}

/**
 * Takes what a proposal came to, in the order of the proposals: rejection from the prior first (Pritchard et al. 1999,
 * Mol. Biol. Evol. 16:1791–1798), then population Monte Carlo (Beaumont, Cornuet, Marin & Robert 2009, Biometrika
 * 96:983–990). Distances are root mean squares of differences over the median absolute deviation of the prior's runs
 * (as Csilléry et al. 2012, Methods Ecol. Evol. 3:475–479, from memory). Simulated figures get the error of the observed
 * ones added, so that the posterior is that of an observation with such an error (Wilkinson 2013, Stat. Appl. Genet. Mol.
 * Biol. 12:129–141).
 *
 * @param summaries in the order of `observed`; null of a run that could not be
 * @throws RangeError of a proposal that is not the next one
 */
export function takeRun(
  plan: AbcPlan,
  state: AbcState,
  { generation, number, point }: Proposal,
  summaries: readonly number[] | null,
): AbcState {
  if (state.ending) return state;
  // Asked for before its generation was complete: nothing may hang on how many were asked for at once.
  if (generation < state.generations.length) return state;
  if (generation > state.generations.length || number !== state.tried)
    throw new RangeError(
      `Found run ${number} of generation ${generation}; expected run ${state.tried} of generation ${state.generations.length}`,
    );
  const noisy = summaries && withErrors(plan, generation, number, summaries);
  const next = {
    ...state,
    tried: state.tried + 1,
    runs: state.runs + 1,
    refused: state.refused + (summaries ? 0 : 1),
  };
  if (generation === 0) {
    const kept = noisy ? [...state.kept, { point, summaries: noisy, distance: 0, weight: 0 }] : state.kept;
    return next.tried < plan.priorRuns ? { ...next, kept } : endOfPrior(plan, { ...next, kept });
  }
  const tolerance = nextTolerance(state.population);
  const distance = noisy ? distanceOf(plan.observed, noisy, state.scales) : Infinity;
  if (noisy && distance <= tolerance) {
    const weight = 1 / movesAbout(state.population).density(point);
    const kept = [...state.kept, { point, summaries: noisy, distance, weight }];
    if (kept.length === plan.population) return endOfGeneration(plan, { ...next, kept }, tolerance);
    return endAtLimits(plan, { ...next, kept });
  }
  return endAtLimits(plan, next);
}

/** Tolerance of the generation that is being made: half of the last population lies within it. */
export const nextTolerance = (population: readonly Particle[]): number =>
  quantiles(
    population.map((particle) => particle.distance),
    [closer],
  )[0];

function withErrors(
  plan: AbcPlan,
  generation: number,
  number: number,
  summaries: readonly number[],
): number[] {
  if (plan.errors.every((error) => error === 0)) return [...summaries];
  const random = stream(plan.seed, `fit-errors/${generation}/${number}`);
  return summaries.map((value, i) => value + plan.errors[i] * normalQuantile(uniform(random.int32() >>> 0)));
}

/** Root mean square of differences over their scales; figures of scale 0 are left out. */
export function distanceOf(
  observed: readonly number[],
  summaries: readonly number[],
  scales: readonly number[],
): number {
  let sum = 0;
  let told = 0;
  scales.forEach((scale, i) => {
    if (scale === 0) return;
    sum += ((summaries[i] - observed[i]) / scale) ** 2;
    told++;
  });
  return told === 0 ? 0 : Math.sqrt(sum / told);
}

/** Median absolute deviation; where more than half of the values are alike, the mean one; 0 where all are. */
function spreadOf(values: readonly number[]): number {
  const [middle] = quantiles(values, [0.5]);
  const deviations = values.map((value) => Math.abs(value - middle));
  const [median] = quantiles(deviations, [0.5]);
  return median > 0 ? median : deviations.reduce((sum, d) => sum + d, 0) / deviations.length;
}

function endOfPrior(plan: AbcPlan, state: AbcState): AbcState {
  if (state.kept.length < 2) return { ...state, ending: 'hardly any kept' };
  const scales = plan.observed.map((_, i) => spreadOf(state.kept.map(({ summaries }) => summaries[i])));
  const nearest = state.kept
    .map((particle) => ({ ...particle, distance: distanceOf(plan.observed, particle.summaries, scales) }))
    .sort((a, b) => a.distance - b.distance)
    .slice(0, plan.population);
  const prior = state.kept.map(({ point, summaries }) => ({ point, summaries }));
  return endOfGeneration(
    plan,
    { ...state, scales, prior, kept: nearest.map((particle) => ({ ...particle, weight: 1 })) },
    nearest[nearest.length - 1].distance,
  );
}

function endOfGeneration(plan: AbcPlan, state: AbcState, tolerance: number): AbcState {
  const total = state.kept.reduce((sum, { weight }) => sum + weight, 0);
  const generation = { tolerance, runs: state.tried, acceptance: state.kept.length / state.tried };
  const population = state.kept.map((particle) => ({ ...particle, weight: particle.weight / total }));
  const next = {
    ...state,
    population,
    generations: [...state.generations, generation],
    kept: [],
    tried: 0,
  };
  if (nextTolerance(population) >= tolerance) return { ...next, ending: 'enough' };
  if (state.generations.length > 0 && generation.acceptance < plan.leastAcceptance)
    return { ...next, ending: 'hardly any kept' };
  return endAtLimits(plan, next);
}

function endAtLimits(plan: AbcPlan, state: AbcState): AbcState {
  if (state.runs >= plan.mostRuns) return { ...state, ending: 'no more runs' };
  if (state.tried * plan.leastAcceptance > plan.population) return { ...state, ending: 'hardly any kept' };
  return state;
}
