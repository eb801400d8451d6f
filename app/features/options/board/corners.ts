import type { GroundPoint, Ring } from '#app/map/rings.ts';

/** The middles of a ring's sides: what is pulled there becomes a new corner. `closed` has one more, from last to first. */
export const middles = (ring: Ring, closed: boolean): GroundPoint[] =>
  ring.slice(0, closed ? ring.length : -1).map(([x, y], i): GroundPoint => {
    const [nx, ny] = ring[(i + 1) % ring.length];
    return [(x + nx) / 2, (y + ny) / 2];
  });

/** What is held of a ring: one of its corners, or the middle of the side that starts at one. */
export interface Hold {
  readonly kind: 'corner' | 'middle';
  readonly index: number;
}

/** The corner of a ring within reach of a place, else the middle of a side; m. */
export function holdAt(ring: Ring, x: number, y: number, reach: number, closed: boolean): Hold | undefined {
  const nearest = (points: readonly GroundPoint[]) => {
    let index = -1;
    let least = reach;
    points.forEach(([px, py], i) => {
      const away = Math.hypot(px - x, py - y);
      if (away > least) return;
      index = i;
      least = away;
    });
    return index;
  };
  const corner = nearest(ring);
  if (corner >= 0) return { kind: 'corner', index: corner };
  const middle = nearest(middles(ring, closed));
  return middle >= 0 ? { kind: 'middle', index: middle } : undefined;
}

/** The ring with what is held put elsewhere: a corner moved, or a new corner in a side. */
export const pulled = (ring: Ring, { kind, index }: Hold, to: GroundPoint): GroundPoint[] =>
  kind === 'corner'
    ? ring.map((point, i) => (i === index ? to : point))
    : [...ring.slice(0, index + 1), to, ...ring.slice(index + 1)];

/** The ring without one of its corners, or undefined where too few would be left. */
export const withoutCorner = (ring: Ring, index: number, closed: boolean): GroundPoint[] | undefined =>
  ring.length > (closed ? 3 : 2) ? ring.filter((_, i) => i !== index) : undefined;
