import type { Point } from '#server/files/place-projection.ts';

/** How far ahead a stretch of the round is tried the other way about; rounds up to this length are tried throughout. */
const reach = 300;

/**
 * A short way through all points, open at its end: nearest neighbour, then stretches are turned about as long as that
 * shortens the way (2-opt: Croes 1958, A method for solving traveling-salesman problems, Operations Research 6).
 *
 * @param start where the round begins; the westernmost point unless said
 * @returns the order of visit, as indices of `points`
 */
export function shortRound(points: readonly Point[], start?: Point): number[] {
  if (points.length === 0) return [];
  const order = nearestNeighbours(points, start ?? westernmost(points));
  // Without a start of its own the round keeps its first point, with one even that may change.
  const first = start ? 0 : 1;
  const at = (i: number): Point => (i < 0 ? start! : points[order[i]]);
  for (let shorter = true; shorter;) {
    shorter = false;
    for (let i = first; i < order.length - 1; i++) {
      const before = at(i - 1);
      for (let j = i + 1; j < Math.min(order.length, i + reach); j++) {
        const after = j + 1 < order.length ? at(j + 1) : undefined;
        const now = distance(before, at(i)) + (after ? distance(at(j), after) : 0);
        const turned = distance(before, at(j)) + (after ? distance(at(i), after) : 0);
        if (turned >= now - 1e-9) continue;
        reverse(order, i, j);
        shorter = true;
      }
    }
  }
  return order;
}

/** Length of a way through points in an order, from a start where there is one. */
export function wayLength(points: readonly Point[], order: readonly number[], start?: Point): number {
  const way = [...(start ? [start] : []), ...order.map((i) => points[i])];
  return way.slice(1).reduce((sum, point, i) => sum + distance(way[i], point), 0);
}

const distance = (a: Point, b: Point): number => Math.sqrt((a[0] - b[0]) ** 2 + (a[1] - b[1]) ** 2);

const westernmost = (points: readonly Point[]): Point =>
  points.reduce((west, point) => (point[0] < west[0] ? point : west));

function nearestNeighbours(points: readonly Point[], start: Point): number[] {
  const left = points.map((_, i) => i);
  const order: number[] = [];
  for (let here = start; left.length > 0; here = points[order[order.length - 1]]) {
    let nearest = 0;
    let shortest = Infinity;
    for (let i = 0; i < left.length; i++) {
      const [x, y] = points[left[i]];
      const squared = (x - here[0]) ** 2 + (y - here[1]) ** 2;
      if (squared < shortest) [nearest, shortest] = [i, squared];
    }
    order.push(left[nearest]);
    left[nearest] = left[left.length - 1];
    left.pop();
  }
  return order;
}

function reverse(order: number[], from: number, to: number): void {
  for (let i = from, j = to; i < j; i++, j--) [order[i], order[j]] = [order[j], order[i]];
}
