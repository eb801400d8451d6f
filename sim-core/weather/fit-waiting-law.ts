import { exp } from '#sim-core/numeric/exp.ts';
import { logGamma } from '#sim-core/numeric/gamma.ts';
import { log } from '#sim-core/numeric/log.ts';
import { power } from '#sim-core/numeric/power.ts';
import type { WaitingLaw } from '#sim-core/spec/weather-source.ts';
import { largestOf } from './largest-of.ts';
import { chanceOfLonger, meanWait, meanWithin } from './waiting-law.ts';

/** Waits that were seen, years. All lists may be empty. */
export interface SeenWaits {
  /** seen from beginning to end */
  readonly whole: readonly number[];
  /** seen from their beginning, and still going on when last seen */
  readonly open: readonly number[];
  /** of a process that has gone on for long: from the first look to the next beginning */
  readonly first: readonly number[];
  /** looks of such a process without any beginning */
  readonly without: readonly number[];
}

export type FittedLaw = Exclude<WaitingLaw, { law: 'fixed' }>;

export interface WaitingFit {
  readonly wait: FittedLaw;
  readonly logLikelihood: number;
  /** 2 parameters − 2 log-likelihood; the lower the better */
  readonly aic: number;
  readonly mean: number;
  /** 95 % interval of the mean by likelihood ratio, within 1/50 to 50 times the mean */
  readonly meanInterval: readonly [low: number, high: number];
}

const shapes = [0.2, 40] as const;
/** χ² with one degree of freedom exceeds this in 5 of 100. */
const chiSquare95 = 3.841458820694124;

/**
 * Log-likelihood of waits. A whole wait counts by its density f, an open one by the chance S of longer. The first look at
 * a renewal process that has gone on for long falls into an interval of unknown age: the time to the next beginning has
 * the density S/μ, and no beginning in a look of length L the chance ∫_L^∞ S/μ (Cox 1962, Renewal Theory).
 */
export function logLikelihood(wait: FittedLaw, { whole, open, first, without }: SeenWaits): number {
  const mean = meanWait(wait);
  const survival = (t: number) => log(Math.max(1e-300, chanceOfLonger(wait, t)));
  return (
    whole.reduce((sum, t) => sum + logDensity(wait, t), 0) +
    open.reduce((sum, t) => sum + survival(t), 0) +
    first.reduce((sum, t) => sum + survival(t) - log(mean), 0) +
    without.reduce((sum, t) => sum + log(Math.max(1e-300, 1 - meanWithin(wait, t) / mean)), 0)
  );
}

function logDensity(wait: FittedLaw, t: number): number {
  switch (wait.law) {
    case 'exponential':
      return -log(wait.mean) - t / wait.mean;
    case 'weibull': {
      const ratio = t / wait.scale;
      return log(wait.shape / wait.scale) + (wait.shape - 1) * log(ratio) - power(ratio, wait.shape);
    }
    case 'gamma':
      return (wait.shape - 1) * log(t) - t / wait.scale - wait.shape * log(wait.scale) - logGamma(wait.shape);
  }
}

/** The law of a kind with a given mean; `shape` is not read of an exponential one. */
export function lawOf(law: FittedLaw['law'], mean: number, shape: number): FittedLaw {
  if (law === 'exponential') return { law, mean };
  const perMean = law === 'gamma' ? shape : exp(logGamma(1 + 1 / shape));
  return { law, shape, scale: mean / perMean };
}

/**
 * Fits a law to waits by maximum likelihood: of the mean, and for each mean of the shape, both on a log scale.
 *
 * @returns undefined where no beginning was seen at all
 */
export function fitWaitingLaw(
  law: FittedLaw['law'],
  seen: SeenWaits,
  likelihood: (wait: FittedLaw, seen: SeenWaits) => number = logLikelihood,
): WaitingFit | undefined {
  const times = [...seen.whole, ...seen.open, ...seen.first, ...seen.without].filter((t) => t > 0);
  if (seen.whole.length + seen.first.length === 0 || times.length === 0) return undefined;
  const rough = times.reduce((sum, t) => sum + t, 0) / (seen.whole.length + seen.first.length);
  const best = (mean: number) => {
    if (law === 'exponential') return { shape: 1, value: likelihood(lawOf(law, mean, 1), seen) };
    const top = largestOf(
      (logShape) => likelihood(lawOf(law, mean, exp(logShape)), seen),
      log(shapes[0]),
      log(shapes[1]),
    );
    return { shape: exp(top.at), value: top.value };
  };
  const profile = (logMean: number) => best(exp(logMean)).value;
  const top = largestOf(profile, log(rough / 50), log(rough * 50));
  const mean = exp(top.at);
  const wait = lawOf(law, mean, best(mean).shape);
  return {
    wait,
    logLikelihood: top.value,
    aic: 2 * (law === 'exponential' ? 1 : 2) - 2 * top.value,
    mean,
    meanInterval: [-1, 1].map((side) =>
      exp(crossing(profile, top.at, top.at + side * log(50), top.value - chiSquare95 / 2)),
    ) as [number, number],
  };
}

/** Where a profile that falls from `from` to `to` comes down to `level`; `to` where it does not. */
function crossing(profile: (x: number) => number, from: number, to: number, level: number): number {
  let [near, far] = [from, to];
  if (profile(far) > level) return far;
  for (let i = 0; i < 30; i++) {
    const middle = (near + far) / 2;
    if (profile(middle) > level) near = middle;
    else far = middle;
  }
  return (near + far) / 2;
}

/** The law of lowest AIC; among those within 2 of it the one with fewest parameters (Burnham & Anderson 2002). */
export function bestFit(fits: readonly WaitingFit[]): WaitingFit | undefined {
  if (fits.length === 0) return undefined;
  const lowest = Math.min(...fits.map(({ aic }) => aic));
  const near = fits.filter(({ aic }) => aic <= lowest + 2);
  return near.find(({ wait }) => wait.law === 'exponential') ?? near.find(({ aic }) => aic === lowest);
}
