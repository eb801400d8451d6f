import type { Point } from './extent.ts';
import type { OpenGround } from './open-ground.ts';

/** Places that are tried around a point before it is left (Bridson 2007). */
const tries = 30;

/**
 * Points anywhere on the ground, no two nearer than `distance` metres, until none fits any more: Poisson-disc sampling
 * (Bridson 2007, ACM SIGGRAPH 2007 sketches, article 22), spreading from a place in each cell that is still free, so that
 * ground in several pieces fills too.
 *
 * @param count how many to keep, chosen among all alike; all unless said
 */
export function pointsApart(
  ground: OpenGround,
  distance: number,
  random: () => number,
  count = Infinity,
): Point[] {
  const [west, south, east, north] = ground.box;
  // A square of this side holds at most one point.
  const side = distance / Math.SQRT2;
  const columns = Math.max(1, Math.ceil((east - west) / side));
  const rows = Math.max(1, Math.ceil((north - south) / side));
  /** number of the point in each square, one more, 0 of none */
  const squares = new Int32Array(columns * rows);
  const points: Point[] = [];

  function fits(x: number, y: number): boolean {
    if (!ground.isOpen(x, y)) return false;
    const column = Math.floor((x - west) / side);
    const row = Math.floor((y - south) / side);
    for (let r = Math.max(0, row - 2); r <= Math.min(rows - 1, row + 2); r++)
      for (let c = Math.max(0, column - 2); c <= Math.min(columns - 1, column + 2); c++) {
        const there = squares[r * columns + c];
        if (there === 0) continue;
        const [ox, oy] = points[there - 1];
        if ((x - ox) ** 2 + (y - oy) ** 2 < distance * distance) return false;
      }
    return true;
  }
  function place(x: number, y: number): void {
    points.push([x, y]);
    const column = Math.min(columns - 1, Math.floor((x - west) / side));
    const row = Math.min(rows - 1, Math.floor((y - south) / side));
    squares[row * columns + column] = points.length;
  }
  function spreadFrom(first: number): void {
    const active = [first];
    while (active.length > 0) {
      const pick = Math.floor(random() * active.length);
      const [x, y] = points[active[pick]];
      let found = false;
      for (let i = 0; i < tries && !found; i++) {
        // Evenly over the ring between one and two distances.
        const away = distance * Math.sqrt(1 + 3 * random());
        const turn = 2 * Math.PI * random();
        const [nx, ny] = [x + away * Math.cos(turn), y + away * Math.sin(turn)];
        if (!fits(nx, ny)) continue;
        active.push(points.length);
        place(nx, ny);
        found = true;
      }
      if (found) continue;
      active[pick] = active[active.length - 1];
      active.pop();
    }
  }

  for (const [x, y] of ground.everyCell(random))
    if (fits(x, y)) {
      place(x, y);
      spreadFrom(points.length - 1);
    }
  return count < points.length ? some(points, count, random) : points;
}

/** `count` of the points, each set of them as likely. */
function some(points: Point[], count: number, random: () => number): Point[] {
  const left = points.slice();
  return Array.from({ length: count }, () => {
    const pick = Math.floor(random() * left.length);
    const chosen = left[pick];
    left[pick] = left[left.length - 1];
    left.pop();
    return chosen;
  });
}
