import type { CellValues } from './ground.ts';

/** Lowest and highest value of the types that have few. */
const ranges = new Map<unknown, readonly [number, number]>([
  [Uint8Array, [0, 255]],
  [Int8Array, [-128, 127]],
  [Uint16Array, [0, 65_535]],
  [Int16Array, [-32_768, 32_767]],
]);

/**
 * Writes `of(value)` of every cell to `out`, of the same length. Where the type knows fewer values than there are
 * cells, each is asked for once: `of` must give the same answer to the same value.
 */
export function mapValues<T extends Float32Array | Uint8Array>(
  values: CellValues,
  out: T,
  of: (value: number) => number,
): T {
  const range = ranges.get(values.constructor);
  if (!range || range[1] - range[0] >= values.length) {
    for (let i = 0; i < values.length; i++) out[i] = of(values[i]);
    return out;
  }
  const [lowest, highest] = range;
  // Of the type of `out`, so that rounding is the same and the loop below only copies.
  const table = out instanceof Uint8Array ? new Uint8Array(65_536) : new Float32Array(65_536);
  for (let value = lowest; value <= highest; value++) table[value & 65_535] = of(value);
  for (let i = 0; i < values.length; i++) out[i] = table[values[i] & 65_535];
  return out;
}
