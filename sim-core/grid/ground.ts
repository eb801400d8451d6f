/**
 * What the engine stands on: one value a cell, row-major, all of width × height.
 * Shares are held in 8 bits (k/255): finer than any survey, small, and exactly what is hashed.
 */
export interface Ground {
  /** largest share of the cell that the plant can hold; 0 = cannot grow */
  readonly capacity: Uint8Array;
  /** growth as a share of growth on good ground */
  readonly vigour: Uint8Array;
  /** chronic physical stress */
  readonly exposure: Uint8Array;
  /** strength of the surveyed refuge */
  readonly refuge: Uint8Array;
  /** share of grazing kept out */
  readonly fence: Uint8Array;
  /** share of the cell that is covered at the survey, 0..1 */
  readonly cover: Float32Array;
}

export const groundLayers = ['capacity', 'vigour', 'exposure', 'refuge', 'fence', 'cover'] as const;
export type GroundLayer = (typeof groundLayers)[number];

/** Arrays that hold the values of a decoded raster. */
export type CellValues =
  Uint8Array | Int8Array | Uint16Array | Int16Array | Uint32Array | Int32Array | Float32Array | Float64Array;

/** How the numbers of a raster become shares. */
export interface ShareMapping {
  /** share = value × scale + offset, unless `classes` is given */
  readonly scale?: number;
  readonly offset?: number;
  /** class number → share; a class that is not listed counts as no data */
  readonly classes?: Readonly<Record<string, number>>;
  /** raster value that means no data; NaN always does */
  readonly noData?: number | null;
  /** share where there is no data, 0 unless said */
  readonly fill?: number;
}

export class ShareError extends Error {
  override name = 'ShareError';
}

/**
 * Shares 0..1 of a raster's cells, Float32, same length.
 * @throws ShareError naming the first value that leaves 0..1 (beyond rounding) and the cell it stands in
 */
export function toShares(values: CellValues, mapping: ShareMapping = {}): Float32Array {
  const { scale = 1, offset = 0, classes, noData, fill = 0 } = mapping;
  const shares = new Float32Array(values.length);
  const table = classes && new Map(Object.entries(classes).map(([k, v]) => [Number(k), v]));
  for (let i = 0; i < values.length; i++) {
    const value = values[i];
    if (Number.isNaN(value) || value === noData) {
      shares[i] = fill;
      continue;
    }
    const share = table ? (table.get(value) ?? fill) : value * scale + offset;
    if (!(share >= -1e-6 && share <= 1 + 1e-6))
      throw new ShareError(
        `Cell ${i} holds ${value}${scale === 1 && offset === 0 ? '' : ` (${share} after scale and offset)`}; ` +
          'a share must lie between 0 and 1. Give a scale (0.01 for per cent, 1/255 for 8 bits) or a class table.',
      );
    shares[i] = Math.min(1, Math.max(0, share));
  }
  return shares;
}

/** Shares held in 8 bits: round(255 × share). */
export function toBytes(shares: Float32Array): Uint8Array {
  const bytes = new Uint8Array(shares.length);
  for (let i = 0; i < shares.length; i++) bytes[i] = Math.round(shares[i] * 255);
  return bytes;
}

/** A constant share over all cells. */
export const constantBytes = (cells: number, share: number): Uint8Array =>
  new Uint8Array(cells).fill(Math.round(share * 255));
