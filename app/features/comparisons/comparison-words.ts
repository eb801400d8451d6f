import type { ComparisonSummary } from '#contract/comparisons.ts';
import type { LiveComparison } from './comparison-manager.ts';

const endingWords: Record<NonNullable<ComparisonSummary['ending']>, string> = {
  'all replicates': 'finished',
  'chances known': 'finished early: every chance is known closely enough',
  'rank settled': 'finished early: the best leads for sure',
  'stopped by hand': 'stopped by hand',
};

/** Where a comparison stands, in words. */
export function standingWords(
  {
    status,
    ending,
    done,
    replicates,
    decision,
  }: Pick<ComparisonSummary, 'status' | 'ending' | 'done' | 'replicates' | 'decision'>,
  live: LiveComparison | undefined,
): string {
  if (decision) return `decided: ${decision.optionName}`;
  const of = `${done} of ${replicates} futures`;
  if (live?.phase === 'running') return 'at work in this tab';
  if (live?.phase === 'saving') return 'saving its maps';
  if (live?.phase === 'paused') return `paused, ${of}`;
  if (live?.phase === 'failed') return `failed, ${of} are saved`;
  if (status === 'running') return `not at work in this tab, ${of} are saved`;
  return `${ending ? endingWords[ending] : status}, ${of}`;
}
