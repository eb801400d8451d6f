import { beliefQuantile } from '#sim-core/belief/belief-quantile.ts';
import { withRates } from '#sim-core/belief/rates-of-run.ts';
import { allParameters, type AnyRateName } from '#sim-core/spec/all-parameters.ts';
import type { Belief } from '#sim-core/spec/belief.ts';
import type { RunSpec } from '#sim-core/spec/run-spec.ts';
import type { DrawnRates } from '#sim-core/spec/uncertain.ts';
import type { Proposal } from './abc.ts';

/** A rate that is fitted, and what was believed of it before. */
export interface FittedRate {
  readonly name: AnyRateName;
  readonly belief: Belief;
}

/** Most runs of a generation, and generations: each run of a fit has a replicate of its own, so luck of its own. */
export const mostInGeneration = 100_000;
export const mostGenerations = 150;
/** Generation under whose numbers the runs stand that look at what a fit came to. */
export const checkGeneration = mostGenerations;

/** The values of the fitted rates at a point: each rate's share of its belief. */
export const ratesAt = (fitted: readonly FittedRate[], point: readonly number[]): DrawnRates =>
  Object.fromEntries(
    fitted.map(({ name, belief }, i) => [name, beliefQuantile(belief, allParameters[name])(point[i])]),
  );

/** The run of a proposal. Rates that are uncertain but not fitted are drawn as in any ensemble. */
export function runOfProposal(
  base: Omit<RunSpec, 'replicate'>,
  fitted: readonly FittedRate[],
  { generation, number, point }: Proposal,
): RunSpec {
  const replicate = generation * mostInGeneration + number;
  // Its frames are never looked at.
  return { ...base, ...withRates(base, ratesAt(fitted, point)), replicate, reportYears: [] };
}
