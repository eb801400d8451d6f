import { scaledBesselI } from '#sim-core/numeric/bessel.ts';
import { coshMinusOne, exp } from '#sim-core/numeric/exp.ts';
import { log } from '#sim-core/numeric/log.ts';

/** Mass that the cut kernel may leave outside, before it is scaled to sum to 1. */
export const cutMass = 1e-6;

/** Widest kernel that a run may use, cells. */
export const widestRadius = 256;
/** Variance above which the kernel would be wider than that, cells² a step. */
export const largestVariance = (widestRadius * widestRadius) / 27;

/**
 * Right half of the discrete Gaussian T(n; t) = e^(−t) I_n(t) (Lindeberg 1990, IEEE Trans. PAMI 12:234–254): the
 * weights of 0, 1 … radius cells, Float64. Cut at the smallest radius that leaves less than 1e−6 outside, then scaled so
 * that the whole, taps[0] + 2 (taps[1] + …), is 1.
 *
 * @param variance t, cells² a step
 */
export function discreteGaussian(variance: number): Float64Array {
  const weights = scaledBesselI(variance, Math.ceil(8 * Math.sqrt(variance)) + 12);
  let outside = 0;
  let radius = weights.length - 1;
  // From the outer end, so that small weights are not lost in a sum near 1.
  while (radius > 0 && outside + 2 * weights[radius] < cutMass) outside += 2 * weights[radius--];
  const taps = weights.slice(0, radius + 1);
  let sum = 0;
  for (let n = radius; n > 0; n--) sum += 2 * taps[n];
  sum += taps[0];
  for (let n = 0; n <= radius; n++) taps[n] /= sum;
  return taps;
}

/**
 * ln M of the whole discrete Gaussian on both axes for a front whose normal stands at angle φ to the rows:
 * t (cosh(θ cos φ) − 1) + t (cosh(θ sin φ) − 1).
 */
export const logMoment =
  (variance: number, cosine: number, sine: number) =>
  (theta: number): number =>
    variance * (coshMinusOne(theta * cosine) + coshMinusOne(theta * sine));

/** ln M of the taps as they are used, on both axes: what `logMoment` is without the cut. */
export function logMomentOfTaps(taps: Float64Array, cosine: number, sine: number) {
  const along = (theta: number) => {
    let sum = taps[0];
    for (let n = 1; n < taps.length; n++) sum += taps[n] * (exp(n * theta) + exp(-n * theta));
    return log(sum);
  };
  return (theta: number): number => along(theta * cosine) + along(theta * sine);
}
