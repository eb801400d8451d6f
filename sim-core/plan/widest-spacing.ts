import type { Point } from './extent.ts';

/**
 * The points of the widest spacing that gives as many as are asked for, by halving; what is over at their end is left
 * out. Fewer where the narrowest spacing does not give as many.
 *
 * @param lay the points of a spacing, m, in order
 */
export function widestSpacing(
  lay: (spacing: number) => Point[],
  count: number,
  narrowest: number,
  widest: number,
): Point[] {
  let [low, high] = [narrowest, widest];
  let points = lay(high);
  if (points.length < count) {
    points = lay(low);
    if (points.length < count) return points;
    for (let i = 0; i < 40 && high / low > 1 + 1e-9; i++) {
      const middle = Math.sqrt(low * high);
      const found = lay(middle);
      if (found.length >= count) [low, points] = [middle, found];
      else high = middle;
    }
  }
  return points.slice(0, count);
}
