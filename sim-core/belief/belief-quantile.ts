import { quantileOf } from '#sim-core/ensemble/quantile.ts';
import { betaQuantile } from '#sim-core/numeric/beta.ts';
import { exp } from '#sim-core/numeric/exp.ts';
import { log } from '#sim-core/numeric/log.ts';
import { normalCdf } from '#sim-core/numeric/normal-cdf.ts';
import { normalQuantile } from '#sim-core/numeric/normal.ts';
import type { Belief } from '#sim-core/spec/belief.ts';
import type { Parameter } from '#sim-core/spec/parameters.ts';

/** What a rate may be, in its unit. */
export type RateRange = Pick<Parameter, 'min' | 'max'>;

/**
 * Quantile function of a belief about a rate: the value below which a share of the law lies, never outside the rate's
 * range. Rises with the share; basic operations and our own exponentials alone, so the same bits on every machine.
 * Pasted values are quantiles of type 7 (Hyndman & Fan 1996), straight between neighbours.
 *
 * @returns function of a share strictly between 0 and 1
 */
export function beliefQuantile(belief: Belief, range: RateRange): (share: number) => number {
  const held = (x: number) => Math.min(range.max, Math.max(range.min, x));
  switch (belief.law) {
    case 'uniform': {
      const { low, high } = belief;
      return (p) => held(low + p * (high - low));
    }
    case 'triangular':
      return (p) => held(triangular(belief, p));
    case 'normal': {
      const { mean, standardDeviation } = belief;
      const cut = cutNormal((range.min - mean) / standardDeviation, (range.max - mean) / standardDeviation);
      return (p) => held(mean + standardDeviation * cut.quantile(p));
    }
    case 'log-normal': {
      const { middle, spread, bottom, top } = ofLogarithm(belief, range);
      const cut = cutNormal(bottom, top);
      return (p) => held(exp(middle + spread * cut.quantile(p)));
    }
    case 'beta': {
      const { alpha, beta, low, high } = belief;
      return (p) => held(low + (high - low) * betaQuantile(alpha, beta, p));
    }
    case 'values': {
      const sorted = Float64Array.from(belief.values).sort();
      return (p) => quantileOf(sorted.length, p, (k) => sorted[k]);
    }
  }
}

/** Share of a law that lay outside the rate's range and was cut off; 0 for laws that have bounds of their own. */
export function cutShare(belief: Belief, range: RateRange): number {
  if (belief.law === 'normal') {
    const { mean, standardDeviation } = belief;
    return cutNormal((range.min - mean) / standardDeviation, (range.max - mean) / standardDeviation).outside;
  }
  if (belief.law === 'log-normal') {
    const { bottom, top } = ofLogarithm(belief, range);
    return cutNormal(bottom, top).outside;
  }
  return 0;
}

/** The value that a single run takes for a rate of which this is believed: the mode of a triangular law, else the median. */
export const centralValue = (belief: Belief, range: RateRange): number =>
  belief.law === 'triangular' ? belief.mode : beliefQuantile(belief, range)(0.5);

function triangular({ low, mode, high }: Extract<Belief, { law: 'triangular' }>, p: number): number {
  const width = high - low;
  return p * width <= mode - low
    ? low + Math.sqrt(p * width * (mode - low))
    : high - Math.sqrt((1 - p) * width * (high - mode));
}

function ofLogarithm({ median, factor }: Extract<Belief, { law: 'log-normal' }>, { min, max }: RateRange) {
  const [middle, spread] = [log(median), log(factor)];
  const place = (x: number) => (x > 0 ? (log(x) - middle) / spread : -Infinity);
  return { middle, spread, bottom: place(min), top: place(max) };
}

/** The standard normal law between two bounds, of which the lower is at most 0 and the upper at least 0. */
function cutNormal(bottom: number, top: number) {
  const below = normalCdf(bottom);
  const above = normalCdf(-top);
  const inside = 1 - below - above;
  return {
    outside: below + above,
    /** from the nearer end, so that neither tail loses its digits */
    quantile: (p: number) =>
      below + p * inside <= 0.5
        ? normalQuantile(below + p * inside)
        : -normalQuantile(above + (1 - p) * inside),
  };
}
