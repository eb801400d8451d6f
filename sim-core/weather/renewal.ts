import { normalQuantile } from '#sim-core/numeric/normal.ts';
import { remainingWait, waitExceededWith, type WaitingLaw } from './waiting-law.ts';

/** Droughts that come back: a renewal process of their beginnings. */
export interface DroughtRenewal {
  /** from the beginning of one drought to that of the next */
  readonly returnInterval: WaitingLaw;
  /** years since the latest drought before the end of the survey year began; that drought may still last */
  readonly sinceLatest: number;
  /** index while a drought lasts: its mean, and the standard deviation between droughts (0 unless said) */
  readonly depth: number;
  readonly depthSpread?: number;
  /** how long a drought lasts; it ends early where the next one begins */
  readonly length: WaitingLaw;
  /** index at other times, 0 unless said; no drought is milder */
  readonly between?: number;
}

/**
 * Index of each step. A step is a drought's when the drought lasts at the middle of the step: a length of whole steps
 * then always fills as many steps, any other does so on average, and the depth is never thinned out.
 *
 * Each drought takes the same three draws (how deep, how long, when the next one begins), in order of time, so a longer
 * horizon begins with the same years.
 *
 * @param uniform draws strictly between 0 and 1
 * @returns Float64, one value a step
 */
export function drawRenewal(
  renewal: DroughtRenewal,
  steps: number,
  stepsPerYear: number,
  uniform: () => number,
): Float64Array {
  const { returnInterval, sinceLatest, depth, depthSpread = 0, length, between = 0 } = renewal;
  const indices = new Float64Array(steps).fill(between);
  /** first step whose middle comes at or after a time in years from the end of the survey year */
  const stepFrom = (time: number) => Math.max(0, Math.ceil(time * stepsPerYear - 0.5));
  let begins = -sinceLatest;
  let waited = sinceLatest;
  while (stepFrom(begins) < steps) {
    const index = Math.min(between, depth + depthSpread * normalQuantile(uniform()));
    const ends = begins + waitExceededWith(length, uniform());
    const wait = uniform();
    const next =
      waited > 0
        ? remainingWait(returnInterval, waited, wait)
        : begins + waitExceededWith(returnInterval, wait);
    waited = 0;
    indices.fill(index, stepFrom(begins), stepFrom(Math.min(ends, next)));
    begins = next;
  }
  return indices;
}
