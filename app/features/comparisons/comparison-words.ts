import type { ComparisonSummary } from '#contract/comparisons.ts';
import type { ComparisonPhase } from './comparison-manager.ts';

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
  phase: ComparisonPhase | undefined,
): string {
  if (decision) return `decided: ${decision.optionName}`;
  const of = `${done} of ${replicates} futures`;
  if (phase === 'running') return 'at work in this tab';
  if (phase === 'saving') return 'saving its maps';
  if (phase === 'paused') return `paused, ${of}`;
  if (phase === 'failed') return `failed, ${of} are saved`;
  if (status === 'running') return `not at work in this tab, ${of} are saved`;
  // A copy stands still as it was made until somebody goes on with it.
  return `${ending ? endingWords[ending] : 'a copy, not gone on with'}, ${of}`;
}
