import type { Point } from './extent.ts';

/** A ring's edges by the rows of cells that they pass through, so that a point is asked of a few of them alone. */
export interface RingRows {
  /** Where a level line crosses the ring, from one side to the other. */
  crossings(y: number): number[];
  /** Whether a point lies in the ring, by the even-odd rule. */
  isInside(x: number, y: number): boolean;
}

/**
 * @param ring corners in cells; all that is asked of lies within `rows` rows from `top` on
 */
export function ringRows(ring: readonly Point[], top: number, rows: number): RingRows {
  const edges = Array.from({ length: rows }, (): number[] => []);
  ring.forEach(([, y], i) => {
    const [, before] = ring[(i + ring.length - 1) % ring.length];
    const from = Math.max(0, Math.floor(Math.min(y, before)) - top);
    const to = Math.min(rows - 1, Math.floor(Math.max(y, before)) - top);
    for (let row = from; row <= to; row++) edges[row].push(i);
  });
  /** Calls with where each edge crosses the level line. */
  function across(y: number, cross: (x: number) => void): void {
    for (const i of edges[Math.floor(y) - top] ?? []) {
      const [xi, yi] = ring[i];
      const [xj, yj] = ring[(i + ring.length - 1) % ring.length];
      if (yi > y !== yj > y) cross(xi + ((y - yi) / (yj - yi)) * (xj - xi));
    }
  }
  return {
    crossings(y) {
      const found: number[] = [];
      across(y, (x) => found.push(x));
      return found.sort((a, b) => a - b);
    },
    isInside(x, y) {
      let within = false;
      across(y, (crossing) => {
        if (x < crossing) within = !within;
      });
      return within;
    },
  };
}
