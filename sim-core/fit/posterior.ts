/**
 * Quantiles of values with weights: where the weights below a value, and half its own, come to the share; straight
 * between neighbours.
 *
 * @param weights above 0, in the order of the values; they need not sum to 1
 */
export function weightedQuantiles(
  values: readonly number[],
  weights: readonly number[],
  shares: readonly number[],
): number[] {
  if (values.length === 0) throw new RangeError('No values; a quantile needs at least one');
  const order = values.map((_, i) => i).sort((a, b) => values[a] - values[b]);
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  let below = 0;
  const middles = order.map((i) => {
    const middle = (below + weights[i] / 2) / total;
    below += weights[i];
    return middle;
  });
  return shares.map((share) => {
    const next = middles.findIndex((middle) => middle >= share);
    if (next === 0) return values[order[0]];
    if (next < 0) return values[order[order.length - 1]];
    const along = (share - middles[next - 1]) / (middles[next] - middles[next - 1]);
    const before = values[order[next - 1]];
    return before + along * (values[order[next]] - before);
  });
}

/** How many equally likely members say as much: 1 / Σ w² of weights that sum to 1 (Kish 1965, Survey Sampling). */
export const effectiveSize = (weights: readonly number[]): number => {
  const total = weights.reduce((sum, weight) => sum + weight, 0);
  return total ** 2 / weights.reduce((sum, weight) => sum + weight ** 2, 0);
};

/** As many values, each as likely, that have the same law as weighted ones. */
export const evenValues = (values: readonly number[], weights: readonly number[], count: number): number[] =>
  weightedQuantiles(
    values,
    weights,
    Array.from({ length: count }, (_, i) => (i + 0.5) / count),
  );
