import type { Point } from './extent.ts';

/** Whether a point lies in a ring, by the even-odd rule. */
export function insideRing(x: number, y: number, ring: readonly Point[]): boolean {
  let within = false;
  for (let i = 0, j = ring.length - 1; i < ring.length; j = i++) {
    const [xi, yi] = ring[i];
    const [xj, yj] = ring[j];
    if (yi > y !== yj > y && x < xi + ((y - yi) / (yj - yi)) * (xj - xi)) within = !within;
  }
  return within;
}
