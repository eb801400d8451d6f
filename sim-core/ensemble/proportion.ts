import { normalQuantile } from '#sim-core/numeric/normal.ts';

/** A figure with the interval that holds it at a level of confidence. */
export interface Interval {
  readonly estimate: number;
  readonly low: number;
  readonly high: number;
}

/** Standard normal value that bounds the middle `level`: 1.96 at 0.95. */
export function normalBound(level: number): number {
  if (!(level > 0 && level < 1))
    throw new RangeError(`A level of confidence of ${level}; expected one between 0 and 1, such as 0.95`);
  return normalQuantile(0.5 + level / 2);
}

/**
 * A share with its score interval (Wilson 1927, JASA 22:209–212), which stays within 0..1 and has a width also where
 * none or all of the trials succeed.
 *
 * @throws RangeError where the counts are not 0 ≤ successes ≤ trials, trials ≥ 1
 */
export function wilsonInterval(successes: number, trials: number, level = 0.95): Interval {
  if (
    !(Number.isInteger(successes) && Number.isInteger(trials) && successes >= 0 && successes <= trials) ||
    !trials
  )
    throw new RangeError(
      `${successes} of ${trials}; expected whole counts, at least one trial, and no more successes than trials`,
    );
  const z = normalBound(level);
  const estimate = successes / trials;
  const shrink = 1 / (1 + (z * z) / trials);
  const centre = shrink * (estimate + (z * z) / (2 * trials));
  const half = shrink * z * Math.sqrt((estimate * (1 - estimate)) / trials + (z * z) / (4 * trials * trials));
  return {
    estimate,
    low: successes === 0 ? 0 : centre - half,
    high: successes === trials ? 1 : centre + half,
  };
}
