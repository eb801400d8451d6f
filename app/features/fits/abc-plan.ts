import type { FitPlan } from '#contract/fits.ts';
import type { AbcPlan } from '#sim-core/fit/abc.ts';

/** A fit's plan as the engine's fitting takes it. */
export const abcPlanOf = ({ base, rates, figures, ...sizes }: FitPlan): AbcPlan => ({
  seed: base.seed,
  dimensions: rates.length,
  observed: figures.map(({ observed }) => observed),
  errors: figures.map(({ error }) => error),
  population: sizes.population,
  priorRuns: sizes.priorRuns,
  mostRuns: sizes.mostRuns,
  leastAcceptance: sizes.leastAcceptance,
});
