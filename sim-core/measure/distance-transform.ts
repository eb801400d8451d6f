/**
 * Distance of every cell's centre to the centre of the nearest marked cell, exactly: the lower envelope of parabolas
 * along rows, then along columns (Felzenszwalb & Huttenlocher 2012, Theory of Computing 8:415–428).
 *
 * @param marked row-major, width × height, not 0 where marked
 * @returns Float32 distances in cells, 0 in marked cells; Infinity everywhere where nothing is marked
 */
export function distanceTo(marked: Uint8Array, width: number, height: number): Float32Array {
  const squared = Float64Array.from(marked, (m) => (m ? 0 : Infinity));
  const longest = Math.max(width, height);
  const scratch: Envelope = {
    line: new Float64Array(longest),
    places: new Int32Array(longest),
    ends: new Float64Array(longest + 1),
  };
  for (let y = 0; y < height; y++) lowerEnvelope(squared, y * width, 1, width, scratch);
  for (let x = 0; x < width; x++) lowerEnvelope(squared, x, width, height, scratch);
  return Float32Array.from(squared, Math.sqrt);
}

/** Arrays that one line after the other works in. */
interface Envelope {
  /** the line's values before */
  readonly line: Float64Array;
  /** where the parabolas of the envelope stand, and from where on each is the lowest */
  readonly places: Int32Array;
  readonly ends: Float64Array;
}

/** Replaces f by min over q of f(q) + (p − q)² along one line of `count` values, `stride` apart. */
function lowerEnvelope(
  values: Float64Array,
  first: number,
  stride: number,
  count: number,
  { line, places, ends }: Envelope,
) {
  let top = -1;
  for (let q = 0; q < count; q++) {
    const value = values[first + q * stride];
    line[q] = value;
    if (value === Infinity) continue;
    let from = -Infinity;
    for (; top >= 0; top--) {
      const p = places[top];
      from = (value + q * q - (line[p] + p * p)) / (2 * (q - p));
      if (from > ends[top]) break;
      from = -Infinity;
    }
    places[++top] = q;
    ends[top] = from;
    ends[top + 1] = Infinity;
  }
  if (top < 0) return;
  for (let p = 0, k = 0; p < count; p++) {
    while (ends[k + 1] < p) k++;
    values[first + p * stride] = (p - places[k]) ** 2 + line[places[k]];
  }
}
