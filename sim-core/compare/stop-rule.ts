import type { Interval } from '#sim-core/ensemble/proportion.ts';

/** When a comparison may stop before all replicates are done. */
export interface StopRule {
  /** replicates of each option before any look */
  readonly atLeast: number;
  /** sure where every chance is known to within this, 0 to 1 */
  readonly halfWidth?: number;
  /** sure where the best option leads the second in pairs, beyond its interval */
  readonly rankSettled?: boolean;
}

/** What is known so far. */
export interface Standing {
  readonly replicates: number;
  /** chance to close in time, by option */
  readonly chances: readonly Interval[];
  /** mean lead of the best option over the second, in pairs, at `levelOfLooks`; undefined of one option */
  readonly lead: Interval | undefined;
}

/** Level of confidence of intervals that are looked at again and again: a false stop is likelier with each look. */
export const levelOfLooks = 0.99;

/** Why a comparison may stop, or undefined where it must go on. */
export function sureEnough(standing: Standing, rule: StopRule): 'chances known' | 'rank settled' | undefined {
  const { replicates, chances, lead } = standing;
  const { atLeast, halfWidth, rankSettled } = rule;
  if (replicates < atLeast) return undefined;
  if (rankSettled && lead && lead.low > 0) return 'rank settled';
  const widest = Math.max(...chances.map(({ low, high }) => (high - low) / 2));
  if (halfWidth !== undefined && chances.length > 0 && widest <= halfWidth) return 'chances known';
  return undefined;
}
