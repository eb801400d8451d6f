import { beliefQuantile, cutShare } from '#sim-core/belief/belief-quantile.ts';
import { allParameters, anyRateNames } from '#sim-core/spec/all-parameters.ts';
import type { Belief } from '#sim-core/spec/belief.ts';
import type { Parameter } from '#sim-core/spec/parameters.ts';
import type { DrawnRates } from '#sim-core/spec/uncertain.ts';
import { formatNumber, formatShare } from './formats.ts';

const figure = (x: number) => formatNumber(x, 3);

/** A belief in words, without its unit. */
export function beliefWords(belief: Belief): string {
  switch (belief.law) {
    case 'uniform':
      return `anywhere between ${figure(belief.low)} and ${figure(belief.high)}`;
    case 'triangular':
      return `between ${figure(belief.low)} and ${figure(belief.high)}, most likely ${figure(belief.mode)}`;
    case 'normal':
      return `about ${figure(belief.mean)}, two thirds within ± ${figure(belief.standardDeviation)}`;
    case 'log-normal':
      return (
        `about ${figure(belief.median)}, two thirds between ${figure(belief.median / belief.factor)} and ` +
        figure(belief.median * belief.factor)
      );
    case 'beta':
      return `between ${figure(belief.low)} and ${figure(belief.high)}, beta of ${figure(belief.alpha)} and ${figure(belief.beta)}`;
    case 'values':
      return `${belief.values.length} values from data, ${figure(Math.min(...belief.values))} to ${figure(Math.max(...belief.values))}`;
  }
}

/** What lies beyond the rate's range and is cut off, in words; nothing where hardly anything is. */
export function cutWords(belief: Belief, rate: Parameter): string | undefined {
  const share = cutShare(belief, rate);
  return share < 0.005
    ? undefined
    : `${formatShare(share)} of this law lies beyond ${figure(rate.min)} to ${figure(rate.max)} and is cut off.`;
}

/** The middle nine tenths of a law. */
export function middleOf(belief: Belief, rate: Parameter): { low: number; high: number } {
  const quantile = beliefQuantile(belief, rate);
  return { low: quantile(0.05), high: quantile(0.95) };
}

/** The rates that a future drew, in words: `lateral spread 0.41 m/yr, tolerance −2.1 index`. Empty where it drew none. */
export const drawnWords = (drawn: DrawnRates): string =>
  anyRateNames
    .flatMap((name) => {
      const [value, { label, unit }] = [drawn[name], allParameters[name]];
      return value === undefined
        ? []
        : [`${label.toLowerCase()} ${figure(value)}${unit === '–' ? '' : ` ${unit}`}`];
    })
    .join(', ');
