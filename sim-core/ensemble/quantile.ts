/**
 * Quantile of type 7: at h = (n − 1) p of the values in order, straight between neighbours (Hyndman & Fan 1996, The
 * American Statistician 50:361–365).
 *
 * @param count n
 * @param p 0..1
 * @param valueAt k-th value in ascending order, from 0
 * @throws RangeError of nothing, or of p outside 0..1
 */
export function quantileOf(count: number, p: number, valueAt: (k: number) => number): number {
  if (count < 1) throw new RangeError('No values; a quantile needs at least one');
  if (!(p >= 0 && p <= 1)) throw new RangeError(`The quantile ${p}; expected a share between 0 and 1`);
  const h = (count - 1) * p;
  const k = Math.floor(h);
  const low = valueAt(k);
  return h === k ? low : low + (h - k) * (valueAt(k + 1) - low);
}

/** Quantiles of type 7 of values in any order. */
export function quantiles(values: ArrayLike<number>, shares: readonly number[]): number[] {
  const sorted = Float64Array.from(values).sort();
  return shares.map((p) => quantileOf(sorted.length, p, (k) => sorted[k]));
}
