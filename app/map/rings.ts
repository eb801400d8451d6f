export { ringArea } from '#sim-core/plan/extent.ts';

/** A point in the grid's CRS: easting and northing, m. */
export type GroundPoint = readonly [x: number, y: number];
/** An outline; its last point joins its first. */
export type Ring = readonly GroundPoint[];

/** Whether a point lies inside a ring, by the even-odd rule. */
export function isInside(ring: Ring, x: number, y: number): boolean {
  let inside = false;
  for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
    const [xi, yi] = ring[i];
    const [xj, yj] = ring[j];
    if (yi > y !== yj > y && x < xi + ((y - yi) / (yj - yi)) * (xj - xi)) inside = !inside;
  }
  return inside;
}

/** Distance of a point to the nearest piece of a line, m; a closed one ends where it began. */
export function distanceToLine(line: Ring, x: number, y: number, closed: boolean): number {
  let least = Infinity;
  for (let i = closed ? 0 : 1; i < line.length; i++) {
    const [x0, y0] = line[(i + line.length - 1) % line.length];
    const [dx, dy] = [line[i][0] - x0, line[i][1] - y0];
    const length = dx * dx + dy * dy;
    const t = length > 0 ? Math.min(1, Math.max(0, ((x - x0) * dx + (y - y0) * dy) / length)) : 0;
    least = Math.min(least, Math.hypot(x - x0 - t * dx, y - y0 - t * dy));
  }
  return least;
}

/** Length of a line, or of a ring all round, m. */
export function lineLength(line: Ring, closed: boolean): number {
  let sum = 0;
  for (let i = closed ? 0 : 1; i < line.length; i++) {
    const [x0, y0] = line[(i + line.length - 1) % line.length];
    sum += Math.hypot(line[i][0] - x0, line[i][1] - y0);
  }
  return sum;
}

const turn = ([ax, ay]: GroundPoint, [bx, by]: GroundPoint, [cx, cy]: GroundPoint) =>
  Math.sign((bx - ax) * (cy - ay) - (by - ay) * (cx - ax));

/** Whether two sides of a ring cross each other, so that its inside cannot be told. */
export function crossesItself(ring: Ring): boolean {
  const n = ring.length;
  for (let i = 0; i < n; i++)
    for (let j = i + 2; j < n; j++) {
      if (i === 0 && j === n - 1) continue;
      const [a, b, c, d] = [ring[i], ring[i + 1], ring[j], ring[(j + 1) % n]];
      if (turn(a, b, c) * turn(a, b, d) < 0 && turn(c, d, a) * turn(c, d, b) < 0) return true;
    }
  return false;
}

/** Middle of a ring's bounding box and of a few tries inside it: a point of its inside where one is easily found. */
export function pointInside(ring: Ring): GroundPoint {
  const xs = ring.map(([x]) => x);
  const ys = ring.map(([, y]) => y);
  const [west, east] = [Math.min(...xs), Math.max(...xs)];
  const [south, north] = [Math.min(...ys), Math.max(...ys)];
  let best: GroundPoint = [(west + east) / 2, (south + north) / 2];
  let most = -1;
  const tries = 8;
  for (let i = 1; i < tries; i++)
    for (let j = 1; j < tries; j++) {
      const x = west + ((east - west) * i) / tries;
      const y = south + ((north - south) * j) / tries;
      const room = isInside(ring, x, y) ? distanceToLine(ring, x, y, true) : -1;
      if (room > most) [best, most] = [[x, y], room];
    }
  return best;
}

/** A disc as a ring of 32 points. */
export const discRing = (x: number, y: number, radius: number): Ring =>
  Array.from({ length: 32 }, (_, i): GroundPoint => {
    const angle = (i * Math.PI) / 16;
    return [x + radius * Math.cos(angle), y + radius * Math.sin(angle)];
  });
