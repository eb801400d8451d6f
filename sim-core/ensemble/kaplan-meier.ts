import { exp } from '#sim-core/numeric/exp.ts';
import { log } from '#sim-core/numeric/log.ts';
import { normalBound, type Interval } from './proportion.ts';

/** What happened at one time to those that were still open just before. */
export interface TimeCount {
  /** 0 or later */
  readonly time: number;
  /** that recovered at this time */
  readonly events: number;
  /** that were last seen at this time, still open; they count as at risk at it */
  readonly censored: number;
}

/** The curve from one time on, to the next point's. */
export interface CurvePoint extends TimeCount {
  /** still open just before this time */
  readonly atRisk: number;
  /** S: share that is still open after this time */
  readonly open: number;
  /** Greenwood's standard error of `open`; 0 where it is 0 or 1, as his formula sees no spread there */
  readonly standardError: number;
  readonly low: number;
  readonly high: number;
}

export interface CurveOptions {
  /** of the pointwise band, 0.95 unless said */
  readonly level?: number;
  /**
   * `log-log` (the default) is the plain band on the scale ln(−ln S), which stays within 0..1 and holds its level
   * where few are left (Kalbfleisch & Prentice 1980); `plain` is S ± z standard errors, cut to 0..1.
   */
  readonly band?: 'log-log' | 'plain';
}

/** Counts by time from single times; `recovered: false` means last seen open then. */
export function countTimes(observations: Iterable<{ time: number; recovered: boolean }>): TimeCount[] {
  const byTime = new Map<number, { events: number; censored: number }>();
  for (const { time, recovered } of observations) {
    const count = byTime.get(time) ?? { events: 0, censored: 0 };
    if (recovered) count.events++;
    else count.censored++;
    byTime.set(time, count);
  }
  return [...byTime].map(([time, count]) => ({ time, ...count }));
}

/**
 * Share still open over time, with those that are censored counted for as long as they were seen (Kaplan & Meier 1958,
 * JASA 53:457–481) and Greenwood's (1926) standard error. The share recovered is 1 − `open`.
 *
 * @returns one point for each time, ascending; before the first all are open. Empty of nothing
 */
export function kaplanMeier(counts: readonly TimeCount[], options: CurveOptions = {}): CurvePoint[] {
  const { level = 0.95, band = 'log-log' } = options;
  const z = normalBound(level);
  const sorted = counts.toSorted((a, b) => a.time - b.time);
  let atRisk = sorted.reduce((sum, c) => sum + c.events + c.censored, 0);
  let open = 1;
  /** Σ d / (n (n − d)) */
  let hazardVariance = 0;
  return sorted.map((count) => {
    const before = atRisk;
    const left = before - count.events;
    open = left === 0 ? 0 : open * (left / before);
    if (left > 0) hazardVariance += count.events / (before * left);
    atRisk = left - count.censored;
    const standardError = open * Math.sqrt(hazardVariance);
    const [low, high] = bandAt(open, hazardVariance, z, band);
    return { ...count, atRisk: before, open, standardError, low, high };
  });
}

function bandAt(
  open: number,
  hazardVariance: number,
  z: number,
  band: 'log-log' | 'plain',
): [number, number] {
  const deviation = Math.sqrt(hazardVariance);
  if (band === 'plain') {
    const half = z * open * deviation;
    return [Math.max(0, open - half), Math.min(1, open + half)];
  }
  if (open === 0 || open === 1) return [open, open];
  const logOpen = log(open);
  const factor = exp((z * deviation) / -logOpen);
  return [exp(logOpen * factor), exp(logOpen / factor)];
}

/** A hair for products of fractions that should come to exactly one half. */
const hair = 1e-12;

/** First time at which no more than half are open, or undefined where more than half stay open. */
export const medianTime = (curve: readonly CurvePoint[]): number | undefined =>
  curve.find((point) => point.open <= 0.5 + hair)?.time;

/**
 * The times at which the band's two edges come to one half (Brookmeyer & Crowley 1982, Biometrics 38:29–41): the
 * interval of the median; undefined where an edge does not.
 */
export const medianInterval = (
  curve: readonly CurvePoint[],
): { low: number | undefined; high: number | undefined } => ({
  low: curve.find((point) => point.low <= 0.5 + hair)?.time,
  high: curve.find((point) => point.high <= 0.5 + hair)?.time,
});

/**
 * Mean time to recovery, cut at `to`: the area under the curve from 0 to there, with its standard error (Meier 1975, in
 * Perspectives in Probability and Statistics, 67–87; no correction for few). Runs that are open at `to` count as `to`.
 *
 * @throws RangeError where the curve is not known up to `to`: what was seen last was seen open before
 */
export function restrictedMean(
  curve: readonly CurvePoint[],
  to: number,
  level = 0.95,
): Interval & { readonly standardError: number } {
  const last = curve.at(-1);
  if (!last || (last.open > 0 && to > last.time))
    throw new RangeError(
      `The curve is known to ${last?.time ?? 0}; a mean cut at ${to} needs it that far. Cut it at ${last?.time ?? 0} or before`,
    );
  const z = normalBound(level);
  let area = 0;
  let variance = 0;
  // From the end, so that the area still to come is known at each time.
  for (let i = curve.length - 1, end = to; i >= 0; i--) {
    const { time, open, events, atRisk } = curve[i];
    if (time >= to) continue;
    area += open * (end - time);
    end = time;
    if (events < atRisk) variance += (area * area * events) / (atRisk * (atRisk - events));
  }
  const estimate = area + Math.min(to, curve[0].time);
  const standardError = Math.sqrt(variance);
  return {
    estimate,
    low: Math.max(0, estimate - z * standardError),
    high: Math.min(to, estimate + z * standardError),
    standardError,
  };
}
