import type { Area } from '#sim-core/spec/run-spec.ts';

/** A point in the site's CRS, m. */
export type Point = readonly [x: number, y: number];

/** Length of a closed ring's outline, m. */
export function ringLength(ring: readonly Point[]): number {
  return ring.reduce((length, [x, y], i) => {
    const [nextX, nextY] = ring[(i + 1) % ring.length];
    return length + Math.hypot(nextX - x, nextY - y);
  }, 0);
}

/** Area inside a ring that does not cross itself, m², by the shoelace formula. */
export function ringArea(ring: readonly Point[]): number {
  // From the first corner: coordinates of millions of metres would lose digits.
  const [x0, y0] = ring[0];
  const twice = ring.reduce((sum, [x, y], i) => {
    const [nextX, nextY] = ring[(i + 1) % ring.length];
    return sum + (x - x0) * (nextY - y0) - (nextX - x0) * (y - y0);
  }, 0);
  return Math.abs(twice) / 2;
}

/** Area and outline of a disc or a polygon, m² and m; holes are no part of the area, and their edge is outline too. */
export function areaExtent(area: Area): { readonly area: number; readonly outline: number } {
  if (area.shape === 'disc')
    return { area: Math.PI * area.radius * area.radius, outline: 2 * Math.PI * area.radius };
  const { ring, holes = [] } = area;
  return {
    area: holes.reduce((rest, hole) => rest - ringArea(hole), ringArea(ring)),
    outline: holes.reduce((sum, hole) => sum + ringLength(hole), ringLength(ring)),
  };
}
