import type { Fit, FitSummary } from '#contract/fits.ts';
import { formatArea, formatCount, formatCounted, formatNumber } from '#app/lib/formats.ts';
import type { Figure } from '#sim-core/spec/fit-figure.ts';
import type { FitPhase } from './fit-manager.ts';

type Standing = Pick<FitSummary, 'status' | 'runs' | 'mostRuns' | 'generations' | 'accepted'>;

/** How a fit stands, in a few words. */
export function standingWords(
  { status, runs, mostRuns, generations, accepted }: Standing,
  phase?: FitPhase,
): string {
  const done = `${formatCounted(generations, 'generation')}, ${formatCount(runs)} runs`;
  if (phase === 'loading' || phase === 'running' || phase === 'saving')
    return `at work in this tab: run ${formatCount(runs)} of at most ${formatCount(mostRuns)}`;
  if (accepted) return `taken over by the plant; ${done}`;
  if (status === 'finished') return `finished: ${done}`;
  return status === 'stopped' ? `stopped: ${done}` : `not finished: ${done}`;
}

/** Why a fit came to its end. */
export const endingWords: Record<NonNullable<Fit['state']['ending']>, string> = {
  enough:
    'Ended because half of its members already fit as well as the tolerance asks: more runs would not narrow it.',
  'no more runs': 'Ended with its budget of runs.',
  'hardly any kept':
    'Ended because hardly any new run fitted better: more runs would cost much and tell little.',
};

const figureLabels: Record<Figure['kind'], string> = {
  'map area': 'covered area',
  'map edge': 'length of edges',
  'map reach': 'mean distance from what stood at the start',
  area: 'covered area (series)',
  front: 'advance of edges',
};
export const figureLabel = ({ kind, year }: Pick<Figure, 'kind' | 'year'>): string =>
  `${year}: ${figureLabels[kind]}`;

/** A figure with its unit. */
export function figureValue({ kind }: Pick<Figure, 'kind'>, value: number): string {
  if (kind === 'map area' || kind === 'area') return formatArea(value);
  if (kind === 'front') return `${formatNumber(value, 2)} m/yr`;
  return `${formatNumber(value, 1)} m`;
}
