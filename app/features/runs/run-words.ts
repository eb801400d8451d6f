import type { Run, RunSummary } from '#contract/runs.ts';
import type { Mode } from '#sim-core/spec/run-spec.ts';
import { formatDuration, formatShare } from '#app/lib/formats.ts';
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

type Recovery = Pick<RunSummary, 'status' | 'recoveredYear' | 'lostYear' | 'surveyYear' | 'years'>;

/**
 * `recovered in 2047`, `recovered in 2048, lost again in 2049`, `still open in 2060`; nothing where a run did not reach
 * its horizon. With the `target` a recovery that did not last is told as `reached 90 % in 2048, lost again in 2049`.
 */
export function recoveryWords(run: Recovery, target?: number): string | undefined {
  const years = recoveryYears(run);
  if (years === undefined || run.recoveredYear === null) return years;
  return `${run.lostYear === null || target === undefined ? 'recovered' : `reached ${formatShare(target)}`} in ${years}`;
}

/** `2047`, `2048, lost again in 2049`, `still open in 2060`: to stand beside another run's. */
export function recoveryYears({
  status,
  recoveredYear,
  lostYear,
  surveyYear,
  years,
}: Recovery): string | undefined {
  if (status !== 'finished') return undefined;
  if (recoveredYear === null) return `still open in ${surveyYear + years}`;
  return `${Math.ceil(recoveredYear)}${lostYear === null ? '' : `, lost again in ${lostYear}`}`;
}

/** Whether the digest agreed when it was run again. */
export function checkWords({ check, status }: Pick<Run, 'check' | 'status'>): string {
  if (status !== 'finished') return '–';
  if (!check) return 'not run again yet';
  return check.agreed ? 'agrees' : 'differs';
}

/** First characters of a digest: enough to tell runs apart by eye. */
export const shortDigest = (digest: string): string => digest.slice(0, 10);
