import { exp } from '#sim-core/numeric/exp.ts';
import { gammaAbove, gammaQuantileAbove, logGamma } from '#sim-core/numeric/gamma.ts';
import { log } from '#sim-core/numeric/log.ts';
import { power } from '#sim-core/numeric/power.ts';
import type { WaitingLaw } from '#sim-core/spec/weather-source.ts';

/** Mean, years: of the Weibull law scale Γ(1 + 1/shape), of the gamma law shape × scale. */
export function meanWait(wait: WaitingLaw): number {
  switch (wait.law) {
    case 'fixed':
      return wait.years;
    case 'exponential':
      return wait.mean;
    case 'weibull':
      return wait.scale * exp(logGamma(1 + 1 / wait.shape));
    case 'gamma':
      return wait.shape * wait.scale;
  }
}

/** Chance that it takes longer than this many years. */
export function chanceOfLonger(wait: WaitingLaw, years: number): number {
  if (wait.law === 'fixed') return years < wait.years ? 1 : 0;
  if (!(years > 0)) return 1;
  switch (wait.law) {
    case 'exponential':
      return exp(-years / wait.mean);
    case 'weibull':
      return exp(-power(years / wait.scale, wait.shape));
    case 'gamma':
      return gammaAbove(wait.shape, years / wait.scale);
  }
}

/**
 * Mean of the part of a wait that falls into its first `years` years, ∫₀^years S. Of the Weibull law
 * scale Γ(1 + 1/shape) P(1/shape, (years/scale)^shape), of the gamma law years S + shape scale P(shape + 1, years/scale),
 * P the lower incomplete gamma function (by integration; cf. NIST Digital Library of Mathematical Functions, chapter 8).
 */
export function meanWithin(wait: WaitingLaw, years: number): number {
  if (!(years > 0)) return 0;
  switch (wait.law) {
    case 'fixed':
      return Math.min(years, wait.years);
    case 'exponential':
      return wait.mean * (1 - exp(-years / wait.mean));
    case 'weibull':
      return meanWait(wait) * (1 - gammaAbove(1 / wait.shape, power(years / wait.scale, wait.shape)));
    case 'gamma':
      return (
        years * chanceOfLonger(wait, years) +
        meanWait(wait) * (1 - gammaAbove(wait.shape + 1, years / wait.scale))
      );
  }
}

/** Years that are exceeded with the given chance, strictly between 0 and 1; falls as the chance rises. */
export function waitExceededWith(wait: WaitingLaw, chance: number): number {
  switch (wait.law) {
    case 'fixed':
      return wait.years;
    case 'exponential':
      return -wait.mean * log(chance);
    case 'weibull':
      return wait.scale * power(-log(chance), 1 / wait.shape);
    case 'gamma':
      return wait.scale * gammaQuantileAbove(wait.shape, chance);
  }
}

/**
 * Years still to wait after `waited` years without: the law given that it takes longer.
 *
 * @param uniform strictly between 0 and 1
 */
export function remainingWait(wait: WaitingLaw, waited: number, uniform: number): number {
  if (wait.law === 'fixed') return Math.max(0, wait.years - waited);
  const left = chanceOfLonger(wait, waited) * uniform;
  // So far out that no double is left of the chance: it is about to come.
  return left > 0 ? Math.max(0, waitExceededWith(wait, left) - waited) : 0;
}
