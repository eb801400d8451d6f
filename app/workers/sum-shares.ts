import { toShares, type CellValues, type ShareMapping } from '#sim-core/grid/ground.ts';

/**
 * Sum of the shares of a raster's cells, each no more than the capacity where that is known, as the engine takes cover.
 * @param capacity round(255 × share), one a cell
 * @throws ShareError where a value is no share
 */
export function sumShares(
  values: CellValues,
  mapping: ShareMapping,
  capacity: Uint8Array | undefined,
): number {
  const shares = toShares(values, mapping);
  let sum = 0;
  for (let i = 0; i < shares.length; i++)
    sum += capacity === undefined ? shares[i] : Math.min(shares[i], capacity[i] / 255);
  return sum;
}
