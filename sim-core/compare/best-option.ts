import { wilsonInterval, type Interval } from '#sim-core/ensemble/proportion.ts';

/** How often an option is the best one, of all replicates; shares of a tie are split. */
export interface BestShare extends Interval {
  /** replicates in which it is as good as the best, alone or not */
  readonly atLeastTied: number;
}

/**
 * How often each option is best over replicates that share their luck. The interval is Wilson's, of the split count
 * rounded to whole replicates.
 *
 * @param losses by option, by replicate: less is better, e.g. years to recovery cut at the horizon
 * @throws RangeError of no option, no replicate, or unlike lengths
 */
export function bestShares(losses: readonly ArrayLike<number>[], level = 0.95): BestShare[] {
  const replicates = losses[0]?.length ?? 0;
  if (replicates === 0 || losses.some((option) => option.length !== replicates))
    throw new RangeError(
      `Found ${losses.map((o) => o.length).join(', ')} replicates; expected as many of each option, at least one`,
    );
  const split = new Float64Array(losses.length);
  const tied = new Uint32Array(losses.length);
  for (let r = 0; r < replicates; r++) {
    const least = Math.min(...losses.map((option) => option[r]));
    const best = losses.flatMap((option, i) => (option[r] === least ? [i] : []));
    for (const option of best) {
      split[option] += 1 / best.length;
      tied[option]++;
    }
  }
  return losses.map((_, option) => ({
    ...wilsonInterval(Math.round(split[option]), replicates, level),
    estimate: split[option] / replicates,
    atLeastTied: tied[option],
  }));
}
