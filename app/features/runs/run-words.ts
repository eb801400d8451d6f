import type { Run, RunSummary } from '#contract/runs.ts';
import type { Mode } from '#sim-core/spec/run-spec.ts';
import { formatDuration } from '#app/lib/formats.ts';
import { isAtWork, type LiveRun } from './run-manager.ts';

export const modeWords: Record<Mode, { name: string; means: string }> = {
  counts: {
    name: 'counts',
    means: 'Clumps are counted and chance decides about each: one possible future, grainy as ground is.',
  },
  'mean-field': {
    name: 'mean field',
    means: 'Every cell follows its expectation: smooth, without chance; the seed then changes nothing.',
  },
};

/** Where a run stands, in words: what this tab is doing with it first, then what the server knows. */
export function statusWords(
  run: Pick<RunSummary, 'status' | 'frames' | 'years'>,
  live: LiveRun | undefined,
): string {
  if (live?.repeat && isAtWork(live)) return `running again, ${progressWords(live)}`;
  if (live && !live.repeat && isAtWork(live)) return `${phaseWords[live.phase]}, ${progressWords(live)}`;
  if (run.status === 'running')
    return `left, or running in another tab; ${run.frames} of ${run.years + 1} years stored`;
  if (run.status === 'stopped') return `stopped; ${run.frames} of ${run.years + 1} years stored`;
  return 'finished';
}

const phaseWords: Partial<Record<LiveRun['phase'], string>> = {
  loading: 'fetching the ground',
  running: 'running',
  pausing: 'pausing after this year',
  paused: 'paused',
  saving: 'saving the end',
};

function progressWords({ year, surveyYear, years, progress, phase }: LiveRun): string {
  const done = year === undefined ? 0 : year - surveyYear;
  const left = phase === 'running' && progress?.secondsLeft;
  return `year ${done} of ${years}${typeof left === 'number' ? `, ${formatDuration(left)} left` : ''}`;
}

/** `recovered in 2047`, `open at 2060`; nothing where a run did not reach its horizon. */
export function recoveryWords({
  status,
  recoveredYear,
  surveyYear,
  years,
}: Pick<RunSummary, 'status' | 'recoveredYear' | 'surveyYear' | 'years'>): string | undefined {
  if (status !== 'finished') return undefined;
  return recoveredYear === null
    ? `open at ${surveyYear + years}`
    : `recovered in ${Math.ceil(recoveredYear)}`;
}

/** Whether the digest agreed when it was run again. */
export function checkWords({ check, status }: Pick<Run, 'check' | 'status'>): string {
  if (status !== 'finished') return '–';
  if (!check) return 'not run again yet';
  return check.agreed ? 'agrees' : 'differs';
}

/** First characters of a digest: enough to tell runs apart by eye. */
export const shortDigest = (digest: string): string => digest.slice(0, 10);
