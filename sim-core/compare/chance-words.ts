import type { BeforeDrought } from '#sim-core/ensemble/next-drought.ts';

/** Whole futures of 100, for people who decide. */
export const of100 = (share: number): number => Math.round(100 * share);

/**
 * The chance to close before the next drought as a sentence, with its interval and on how many futures it rests. Futures
 * in which neither came by the horizon are told, never dropped.
 */
export function chanceSentence({ share, neither, recovery, drought }: BeforeDrought): string {
  if (!share) return 'No future has been run yet.';
  const all = recovery + drought + neither;
  const open =
    neither === 0
      ? ''
      : ` In ${neither} of them neither came by the horizon; they count as not closed in time.`;
  return `In ${of100(share.estimate)} of 100 futures this closes before the next drought (${of100(share.low)} to ${of100(share.high)}), from ${all} that were run.${open}`;
}
