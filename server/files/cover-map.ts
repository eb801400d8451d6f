import { cannotClose } from '#sim-core/measure/closing.ts';

/** Cover of a cell that cannot hold the plant, in every GeoTIFF of cover. */
export const noCover = -9999;

/** What a GeoTIFF of cover says of how exact its values are. */
export const coverPrecision = {
  stored: 'Shares 0 to 1, rounded to steps of 1/255, as runs keep them; no data where the plant cannot grow.',
  exact: 'Shares 0 to 1 in single precision, not rounded; no data where the plant cannot grow.',
} as const;

/**
 * Cover as a GeoTIFF holds it, Float32: `share(cell)` 0..1, and `noCover` where the plant cannot grow.
 *
 * @param closing closing years of the same cells, which know where that is; undefined where nobody knows it
 */
export const coverValues = (
  cells: number,
  share: (cell: number) => number,
  closing: ArrayLike<number> | undefined,
): Float32Array =>
  Float32Array.from({ length: cells }, (_, cell) =>
    closing?.[cell] === cannotClose ? noCover : share(cell),
  );
