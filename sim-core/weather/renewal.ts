import { normalQuantile } from '#sim-core/numeric/normal.ts';
import type { DroughtRenewal } from '#sim-core/spec/weather-source.ts';
import { droughtClock, type DroughtClock } from './trend.ts';
import { remainingWait, waitExceededWith } from './waiting-law.ts';

/**
 * Index of each step. A step is a drought's when the drought lasts at the middle of the step: a length of whole steps
 * then always fills as many steps, any other does so on average, and the depth is never thinned out.
 *
 * Each drought takes the same three draws (how deep, how long, when the next one begins), in order of time, so a longer
 * horizon begins with the same years.
 *
 * A drought is seen once the middle of a step is dry, so what is known at the survey is that none began up to the middle
 * of the last step before it: the wait for the next one goes on from there. Under the exponential law the chance that a
 * drought begins to show is then the same in the first step as in any other. A fixed interval is taken as known exactly.
 *
 * @param uniform draws strictly between 0 and 1
 * @param clock by which droughts come back where a trend makes them more or less frequent; lengths stay as they are
 * @returns Float64, one value a step
 */
export function drawRenewal(
  renewal: DroughtRenewal,
  steps: number,
  stepsPerYear: number,
  uniform: () => number,
  clock: DroughtClock = droughtClock({}),
): Float64Array {
  const { returnInterval, sinceLatest, depth, depthSpread = 0, length, between = 0 } = renewal;
  const indices = new Float64Array(steps).fill(between);
  /** first step whose middle comes at or after a time in years from the end of the survey year */
  const stepFrom = (time: number) => Math.max(0, Math.ceil(time * stepsPerYear - 0.5));
  let begins = -sinceLatest;
  /** the same on the clock of droughts */
  let time = -sinceLatest;
  let waited = returnInterval.law === 'fixed' ? sinceLatest : Math.max(0, sinceLatest - 0.5 / stepsPerYear);
  while (stepFrom(begins) < steps) {
    const index = Math.min(between, depth + depthSpread * normalQuantile(uniform()));
    const ends = begins + waitExceededWith(length, uniform());
    const wait = uniform();
    time +=
      waited > 0
        ? waited + remainingWait(returnInterval, waited, wait)
        : waitExceededWith(returnInterval, wait);
    waited = 0;
    const next = clock.yearsAt(time);
    indices.fill(index, stepFrom(begins), stepFrom(Math.min(ends, next)));
    begins = next;
  }
  return indices;
}
