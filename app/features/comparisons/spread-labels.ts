/**
 * Heights for labels that would stand at `wanted`, moved as little as it takes to keep them `gap` apart and within
 * `low`…`high`; in the order of `wanted`.
 */
export function spreadLabels(wanted: readonly number[], gap: number, low: number, high: number): number[] {
  const order = wanted.map((_, i) => i).sort((a, b) => wanted[a] - wanted[b]);
  const placed = new Array<number>(wanted.length);
  let least = low;
  for (const i of order) {
    placed[i] = Math.max(wanted[i], least);
    least = placed[i] + gap;
  }
  let most = high;
  for (const i of order.toReversed()) {
    placed[i] = Math.min(placed[i], most);
    most = placed[i] - gap;
  }
  return placed;
}
