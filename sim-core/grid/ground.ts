import type { Curve } from '#sim-core/spec/layer-source.ts';
import { curveShare } from './curve-share.ts';
import { mapValues } from './map-values.ts';

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
  /** share = value × scale + offset, unless `classes` or `curve` is given */
  readonly scale?: number;
  readonly offset?: number;
  /** class number → share; a class that is not listed counts as no data */
  readonly classes?: Readonly<Record<string, number>>;
  /** value × scale + offset → share */
  readonly curve?: Curve;
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
 * @param out written and returned; a fresh array unless given
 * @param first number of the first cell, where the values are part of a raster
 * @throws ShareError naming the first value that leaves 0..1 (beyond rounding) and the cell it stands in
 */
export function toShares(
  values: CellValues,
  mapping: ShareMapping = {},
  out: Float32Array = new Float32Array(values.length),
  first = 0,
): Float32Array {
  return checked(values, mapping, (shareOf) => mapValues(values, out, shareOf), first);
}

/**
 * The shares of a raster's cells held in 8 bits, round(255 × share) of the Float32 share: what `toBytes` makes of
 * `toShares`, without the array in between.
 * @throws ShareError as `toShares`
 */
export function toShareBytes(values: CellValues, mapping: ShareMapping = {}): Uint8Array {
  return checked(values, mapping, (shareOf) =>
    mapValues(values, new Uint8Array(values.length), (value) =>
      Math.round(Math.fround(shareOf(value)) * 255),
    ),
  );
}

/** Hands out the mapping of one value, and refuses afterwards where a cell holds what it has no share for. */
function checked<T>(
  values: CellValues,
  mapping: ShareMapping,
  make: (shareOf: (value: number) => number) => T,
  first = 0,
): T {
  const { scale = 1, offset = 0, classes, curve, noData, fill = 0 } = mapping;
  const table = classes && new Map(Object.entries(classes).map(([k, v]) => [Number(k), v]));
  const mapped = (value: number) => {
    if (table) return table.get(value) ?? fill;
    const scaled = value * scale + offset;
    return curve ? curveShare(curve, scaled) : scaled;
  };
  const refused = new Set<number>();
  const made = make((value) => {
    if (Number.isNaN(value) || value === noData) return fill;
    const share = mapped(value);
    if (share >= -1e-6 && share <= 1 + 1e-6) return Math.min(1, Math.max(0, share));
    // A table is asked about values that no cell holds, too, so this is no error yet; one of many is enough.
    if (refused.size < 65_536) refused.add(value);
    return 0;
  });
  if (refused.size === 0) return made;
  const cell = values.findIndex((value: number) => refused.has(value));
  if (cell < 0) return made;
  const value = values[cell];
  const share = mapped(value);
  throw new ShareError(
    `Cell ${first + cell} holds ${value}${scale === 1 && offset === 0 ? '' : ` (${share} after scale and offset)`}; ` +
      'a share must lie between 0 and 1. Give a scale (0.01 for per cent, 1/255 for 8 bits) or a class table.',
  );
}

/** Shares held in 8 bits: round(255 × share). */
export function toBytes(shares: Float32Array): Uint8Array {
  return mapValues(shares, new Uint8Array(shares.length), (share) => Math.round(share * 255));
}

/** A constant share over all cells, held in 8 bits as `toBytes` holds it. */
export const constantBytes = (cells: number, share: number): Uint8Array =>
  new Uint8Array(cells).fill(Math.round(Math.fround(share) * 255));
