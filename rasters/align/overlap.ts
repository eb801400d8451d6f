import type { CellMap } from './cell-map.ts';

interface Size {
  readonly width: number;
  readonly height: number;
}

const stepsAlongSide = 64;

/**
 * How much of the rectangle `to` a rectangle `from` covers that `map` carries into it, in cells of `to`. The sides are
 * followed at 64 steps each, as a projection bends them.
 * @returns NaN where the map has no such points
 */
export function overlap(from: Size, to: Size, map: CellMap): number {
  let polygon = outline(from).map(([x, y]) => {
    const out: [number, number] = [0, 0];
    map(x, y, out);
    return out;
  });
  // Sutherland & Hodgman 1974, Communications of the ACM 17:32: one side of the rectangle after the other.
  for (const [axis, sign, limit] of [
    [0, 1, 0],
    [0, -1, to.width],
    [1, 1, 0],
    [1, -1, to.height],
  ] as const) {
    const inside = (p: Corner) => sign * (p[axis] - limit) >= 0;
    polygon = polygon.flatMap((p, i): Corner[] => {
      const q = polygon[(i + 1) % polygon.length];
      if (inside(p) === inside(q)) return inside(p) ? [p] : [];
      const t = (limit - p[axis]) / (q[axis] - p[axis]);
      const cut: Corner = [p[0] + t * (q[0] - p[0]), p[1] + t * (q[1] - p[1])];
      cut[axis] = limit;
      return inside(p) ? [p, cut] : [cut];
    });
  }
  return Math.abs(
    polygon.reduce((sum, [x, y], i) => {
      const [x2, y2] = polygon[(i + 1) % polygon.length];
      return sum + (x * y2 - x2 * y) / 2;
    }, 0),
  );
}

type Corner = [x: number, y: number];

function outline({ width, height }: Size): Corner[] {
  const along = Array.from({ length: stepsAlongSide }, (_, i) => i / stepsAlongSide);
  return [
    ...along.map((t): Corner => [t * width, 0]),
    ...along.map((t): Corner => [width, t * height]),
    ...along.map((t): Corner => [(1 - t) * width, height]),
    ...along.map((t): Corner => [0, (1 - t) * height]),
  ];
}
