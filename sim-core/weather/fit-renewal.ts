import { kaplanMeier, countTimes, type CurvePoint } from '#sim-core/ensemble/kaplan-meier.ts';
import { log } from '#sim-core/numeric/log.ts';
import { moments } from '#sim-core/numeric/sums.ts';
import type { DroughtRenewal, WaitingLaw } from '#sim-core/spec/weather-source.ts';
import {
  bestFit,
  fitWaitingLaw,
  type FittedLaw,
  type SeenWaits,
  type WaitingFit,
} from './fit-waiting-law.ts';
import { recordDroughts, type RecordDroughts } from './record-droughts.ts';
import { meanWithin } from './waiting-law.ts';
import type { YearIndex } from './yearly-record.ts';

/** Beginnings of droughts that a fit takes at least. */
export const fewestBeginnings = 3;
const laws = ['exponential', 'weibull', 'gamma'] as const;

/** Droughts that come back, fitted to a record by year. */
export interface RenewalFit {
  readonly found: RecordDroughts;
  /** of the return interval, best first */
  readonly intervals: readonly WaitingFit[];
  /** the one that is taken */
  readonly interval: WaitingFit;
  /** share of intervals longer than so many years as seen, those still open counted as long as they were seen */
  readonly seen: readonly CurvePoint[];
  /** of the length of a drought: fixed where all are about as long */
  readonly length: WaitingLaw;
  readonly depth: number;
  readonly depthSpread: number;
  /** mean index of years that are no drought's */
  readonly between: number;
}

/**
 * Fits the return interval, length and depth of droughts at or below a threshold. Return intervals by maximum likelihood
 * with the open last interval and the first wait of each stretch (`logLikelihood`); lengths by the chance that
 * a drawn drought covers as many years as were seen (`lengthLikelihood`).
 *
 * @param years ascending
 * @returns undefined where fewer than `fewestBeginnings` droughts begin within the record
 */
export function fitRenewal(years: readonly YearIndex[], threshold: number): RenewalFit | undefined {
  const found = recordDroughts(years, threshold);
  const seen: SeenWaits = {
    whole: found.intervals,
    open: found.lastWaits,
    first: found.firstWaits,
    without: found.without,
  };
  if (found.intervals.length + found.firstWaits.length < fewestBeginnings) return undefined;
  const fits = laws.flatMap((law) => fitWaitingLaw(law, seen) ?? []);
  const interval = bestFit(fits);
  if (!interval) return undefined;
  const depths = moments(found.droughts.map(({ meanIndex }) => meanIndex));
  const other = years.filter(({ index }) => index > threshold).map(({ index }) => index);
  const between = other.length > 0 ? moments(other).mean : 0;
  return {
    found,
    intervals: [interval, ...fits.filter((fit) => fit !== interval).sort((a, b) => a.aic - b.aic)],
    interval,
    seen: kaplanMeier(
      countTimes([
        ...found.intervals.map((time) => ({ time, recovered: true })),
        ...found.lastWaits.map((time) => ({ time, recovered: false })),
      ]),
    ),
    length: fitLengths(found),
    depth: depths.mean,
    depthSpread: depths.count > 1 ? depths.standardDeviation : 0,
    between,
  };
}

/**
 * Likelihood of lengths in whole years as `drawRenewal` makes them: a drought of L years covers the middles of ⌊L⌋ or ⌈L⌉
 * years, of L on average, as it begins at any time of a year. So it covers n or more with the chance ∫S from n − 1 to n.
 * Droughts that cover none are never on record, and a law that makes them pays for it.
 */
function lengthLikelihood(wait: WaitingLaw, { whole, open }: Pick<SeenWaits, 'whole' | 'open'>): number {
  const safe = (chance: number) => log(Math.max(1e-300, chance));
  const atLeast = (n: number) => meanWithin(wait, n) - meanWithin(wait, n - 1);
  return (
    whole.reduce((s, n) => s + safe(atLeast(n) - atLeast(n + 1)), 0) +
    open.reduce((s, n) => s + safe(atLeast(n)), 0)
  );
}

/** The law of lengths of lowest AIC: exponential, Weibull or gamma, or always as long, which then is the mean on record. */
function fitLengths({ droughts }: RecordDroughts): WaitingLaw {
  const whole = droughts.filter(({ cutShort }) => !cutShort).map(({ years }) => years);
  const open = droughts.filter(({ cutShort }) => cutShort).map(({ years }) => years);
  const longest = Math.max(...whole, ...open);
  const fixed = { law: 'fixed', years: whole.length > 0 ? moments(whole).mean : longest } as const;
  if (whole.length < fewestBeginnings || longest === Math.min(...whole)) return fixed;
  const seen = { whole, open, first: [], without: [] };
  const fits: { wait: WaitingLaw; aic: number }[] = [
    { wait: fixed, aic: 2 - 2 * lengthLikelihood(fixed, seen) },
    ...laws.flatMap((law) => fitWaitingLaw(law, seen, lengthLikelihood) ?? []),
  ];
  return fits.reduce((a, b) => (b.aic < a.aic ? b : a)).wait;
}

/**
 * The weather of a fit, rounded to what a form shows.
 *
 * @param surveyYear years since the latest drought are counted to its end
 */
export function renewalOf(
  fit: RenewalFit,
  surveyYear: number,
  wait: FittedLaw = fit.interval.wait,
): DroughtRenewal {
  const latest = fit.found.droughts.filter(({ from }) => from <= surveyYear).at(-1);
  return {
    returnInterval: roundedLaw(wait),
    sinceLatest: latest ? surveyYear + 1 - latest.from : 0,
    depth: round(Math.min(fit.depth, fit.between)),
    depthSpread: round(fit.depthSpread),
    length: roundedLaw(fit.length),
    between: round(fit.between),
  };
}

const round = (x: number) => Math.round(x * 100) / 100;
function roundedLaw<L extends WaitingLaw>(law: L): L {
  const rounded = Object.entries(law).map(([key, x]) => [
    key,
    typeof x === 'number' ? Math.max(0.05, round(x)) : x,
  ]);
  return Object.fromEntries(rounded) as L;
}
