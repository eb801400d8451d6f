import { mirrored } from '#sim-core/grid/mirrored.ts';
import type { Boundary } from '#sim-core/spec/run-spec.ts';

/** Φ = T * C of one row at a time, so that C may be overwritten row by row behind it. */
export interface Neighbourhood {
  /**
   * Φ of row y for the columns from `from` up to `to`, in `values`; it is 0 in all others. Rows are asked for in order,
   * 0 first, and C may have changed in rows above y, not in y and below.
   */
  row(y: number): { readonly values: Float64Array; readonly from: number; readonly to: number };
}

/**
 * Neighbourhood of `cover` by a separable kernel, rows first, then columns. Weights of equal distance are summed before
 * they are weighed, so that a mirrored map gives the mirrored result to the last bit.
 *
 * @param cover Float32, row-major, width × height
 * @param taps weights of 0, 1 … radius cells
 * @param skip leave out what no living cell reaches
 */
export function neighbourhood(
  cover: Float32Array,
  width: number,
  height: number,
  taps: Float64Array,
  boundary: Boundary,
  skip: boolean,
): Neighbourhood {
  const radius = taps.length - 1;
  const slots = Math.min(height, 2 * radius + 1);
  /** rows that are spread along themselves and still needed, and one row of nothing at the end */
  const spread = new Float64Array((slots + 1) * width);
  /** columns of each slot that may differ from 0 */
  const starts = new Int32Array(slots + 1).fill(width);
  const ends = new Int32Array(slots + 1);
  /** one row of C with its boundary on both sides */
  const padded = new Float64Array(width + 2 * radius);
  const values = new Float64Array(width);
  /** start in `spread` of the row above and below at each distance */
  const above = new Int32Array(radius + 1);
  const below = new Int32Array(radius + 1);
  let done = 0;

  const spreadRow = (y: number) => {
    const slot = y % slots;
    const first = y * width;
    let low = 0;
    let high = width;
    if (skip) {
      while (low < width && cover[first + low] === 0) low++;
      while (high > low && cover[first + high - 1] === 0) high--;
    }
    spread.fill(0, slot * width, (slot + 1) * width);
    if (low === high) {
      starts[slot] = width;
      ends[slot] = 0;
      return;
    }
    for (let x = 0; x < width; x++) padded[radius + x] = cover[first + x];
    if (boundary === 'mirror')
      for (let d = 0; d < radius; d++) {
        padded[radius - 1 - d] = cover[first + mirrored(-1 - d, width)];
        padded[radius + width + d] = cover[first + mirrored(width + d, width)];
      }
    const from = (starts[slot] = Math.max(0, low - radius));
    const to = (ends[slot] = Math.min(width, high + radius));
    const out = slot * width;
    for (let x = from; x < to; x++) {
      const centre = x + radius;
      let sum = taps[0] * padded[centre];
      for (let d = 1; d <= radius; d++) sum += taps[d] * (padded[centre - d] + padded[centre + d]);
      spread[out + x] = sum;
    }
  };

  const slotOf = (y: number): number => {
    if (y >= 0 && y < height) return y % slots;
    return boundary === 'mirror' ? mirrored(y, height) % slots : slots;
  };

  return {
    row(y) {
      if (y === 0) done = 0;
      for (const last = Math.min(height - 1, y + radius); done <= last; done++) spreadRow(done);
      let from = skip ? width : 0;
      let to = skip ? 0 : width;
      for (let d = 0; d <= radius; d++) {
        const up = slotOf(y - d);
        const down = slotOf(y + d);
        above[d] = up * width;
        below[d] = down * width;
        from = Math.min(from, starts[up], starts[down]);
        to = Math.max(to, ends[up], ends[down]);
      }
      for (let x = from; x < to; x++) {
        let sum = taps[0] * spread[above[0] + x];
        for (let d = 1; d <= radius; d++) sum += taps[d] * (spread[above[d] + x] + spread[below[d] + x]);
        values[x] = sum;
      }
      values.fill(0, 0, from);
      values.fill(0, to);
      return { values, from, to };
    },
  };
}
