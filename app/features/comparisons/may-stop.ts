import type { Comparison } from '#contract/comparisons.ts';
import { beforeDrought, firstToCome } from '#sim-core/ensemble/next-drought.ts';
import { levelOfLooks, pairedDifference, sureEnough } from '#sim-core/index.ts';
import { sharedReplicates, type KnownRecords } from '#sim-core/compare/known-records.ts';
import { recoveryTimes } from '#sim-core/compare/recovery-times.ts';

/** Why a comparison stops before all replicates are done. */
export type Enough = 'chances known' | 'rank settled';

/**
 * Why a comparison may stop before all replicates are done, or undefined where it must go on: under every outlook each
 * chance is known closely enough, or the best option leads the second.
 */
export function mayStop(
  { plan, id }: Pick<Comparison, 'plan' | 'id'>,
  known: KnownRecords,
): Enough | undefined {
  const { stop, outlooks, options } = plan;
  if (!stop) return undefined;
  const shared = sharedReplicates(known);
  const whys = outlooks.map((_, outlook) => {
    const times = options.map((__, option) => recoveryTimes(plan, known[option][outlook], shared));
    const chances = options.flatMap((__, option) => {
      const counts = { recovery: 0, drought: 0, neither: 0 };
      for (const replicate of shared) {
        const { recoveredYear, droughtYear } = known[option][outlook].get(replicate)!;
        counts[firstToCome(recoveredYear, droughtYear)]++;
      }
      return beforeDrought(counts, levelOfLooks).share ?? [];
    });
    const ranked = times
      .map((values, option) => ({ option, mean: values.reduce((a, b) => a + b, 0) / values.length }))
      .sort((a, b) => a.mean - b.mean);
    const lead =
      ranked.length > 1 && shared.length > 1
        ? pairedDifference(times[ranked[1].option], times[ranked[0].option], id, levelOfLooks)
        : undefined;
    return sureEnough({ replicates: shared.length, chances, lead }, stop);
  });
  return whys.every((why) => why !== undefined) ? whys[0] : undefined;
}
