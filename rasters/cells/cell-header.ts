import type { CellValues } from '#sim-core/grid/ground.ts';

/**
 * The binary in which arrays of cell values are sent and stored. Little-endian:
 * bytes 0–3 `FHCV`, 4 version, 5 type code, 6–7 zero, 8–11 width, 12–15 height, then the values, row-major from the
 * north-west: in version 1 as a zlib stream, in version 2, which holds bytes alone, as `context-code.ts` packs them.
 */
export interface CellArray {
  readonly width: number;
  readonly height: number;
  readonly values: CellValues;
}

export interface CellLimits {
  /** most cells that may be decoded */
  readonly cells: number;
}

/** As many cells as the largest grid that a run may ask for. */
export const defaultCellLimits: CellLimits = { cells: 67_108_864 };

export class CellValuesError extends Error {
  override name = 'CellValuesError';
}

const magic = [0x46, 0x48, 0x43, 0x56];
/** How the values are packed; the version is the place in this list, from 1 on. */
const packings = ['zlib', 'context'] as const;
export type Packing = (typeof packings)[number];
export const headerLength = 16;
/** The type code is the place in this list; codes are never given anew. */
const arrayTypes = [
  Uint8Array,
  Int8Array,
  Uint16Array,
  Int16Array,
  Uint32Array,
  Int32Array,
  Float32Array,
  Float64Array,
] as const;

/** What the first 16 bytes say of the values that follow. */
export interface CellHeader {
  readonly width: number;
  readonly height: number;
  readonly type: (typeof arrayTypes)[number];
  readonly packing: Packing;
  /** bytes of all values, once inflated */
  readonly byteLength: number;
}

/**
 * Reads and checks magic, version, type, size and limit; nothing is inflated.
 * @throws CellValuesError saying what was found and what was expected
 */
export function readCellHeader(packed: Uint8Array, limits: CellLimits = defaultCellLimits): CellHeader {
  if (packed.length < headerLength || magic.some((byte, i) => packed[i] !== byte))
    throw new CellValuesError('Found no cell values (they begin with FHCV); fetch the file again.');
  const packing = packings.at(packed[4] > 0 ? packed[4] - 1 : packings.length);
  if (!packing)
    throw new CellValuesError(
      `Found cell values of version ${packed[4]}; this program reads versions 1 to ${packings.length}.`,
    );
  const type = arrayTypes.at(packed[5] < arrayTypes.length ? packed[5] : arrayTypes.length);
  if (!type)
    throw new CellValuesError(
      `Found the type code ${packed[5]}; this program knows 0 to ${arrayTypes.length - 1}.`,
    );
  if (packing === 'context' && type !== Uint8Array)
    throw new CellValuesError(
      `Found the type code ${packed[5]} in cell values of version 2, which hold bytes (0) alone.`,
    );
  const view = new DataView(packed.buffer, packed.byteOffset, packed.byteLength);
  const width = view.getUint32(8, true);
  const height = view.getUint32(12, true);
  const cells = width * height;
  if (cells === 0 || cells > limits.cells)
    throw new CellValuesError(
      `Found ${width} × ${height} cells; expected at least 1 and at most ${limits.cells}.`,
    );
  return { width, height, type, packing, byteLength: cells * type.BYTES_PER_ELEMENT };
}

/**
 * Writes the header of `cells` to the first bytes of `packed`.
 * @throws CellValuesError when the number of values is not width × height
 */
export function writeCellHeader(
  packed: Uint8Array,
  { width, height, values }: CellArray,
  packing: Packing,
): void {
  if (!isSize(width) || !isSize(height) || values.length !== width * height)
    throw new CellValuesError(
      `Found ${values.length} values for ${width} × ${height} cells; expected one value a cell.`,
    );
  const code = arrayTypes.findIndex((type) => values instanceof type);
  if (code < 0)
    throw new CellValuesError('Found no typed array of numbers; expected one, such as Uint8Array.');
  packed.set(magic);
  packed[4] = packings.indexOf(packing) + 1;
  packed[5] = code;
  const view = new DataView(packed.buffer, packed.byteOffset, packed.byteLength);
  view.setUint32(8, width, true);
  view.setUint32(12, height, true);
}

const isSize = (n: number): boolean => Number.isInteger(n) && n > 0 && n <= 0xffffffff;

/** What to throw when the body is not what the header says. */
export const damagedCells = (found: string): CellValuesError =>
  new CellValuesError(`The cell values are damaged: found ${found}. Fetch the file again.`);

/** whether this machine keeps the lowest byte of a number first, as nearly all do */
export const littleEndianHost = new Uint8Array(Uint16Array.of(1).buffer)[0] === 1;

/** Bytes of a body as this machine's numbers; `bytes` must stand alone in their buffer. */
export function cellsOf({ width, height, type }: CellHeader, bytes: Uint8Array<ArrayBuffer>): CellArray {
  const ordered = littleEndianHost ? bytes : swapped(bytes, type.BYTES_PER_ELEMENT);
  return { width, height, values: new type(ordered.buffer) };
}

/** Values as the bytes of a body, little-endian. */
export function bytesOf(values: CellValues): Uint8Array {
  const bytes = new Uint8Array(values.buffer, values.byteOffset, values.byteLength);
  return littleEndianHost ? bytes : swapped(bytes, values.BYTES_PER_ELEMENT);
}

/** A copy with the bytes of each element in the other order. */
function swapped(bytes: Uint8Array, size: number): Uint8Array<ArrayBuffer> {
  const copy = new Uint8Array(bytes);
  for (let start = 0; start < copy.length; start += size) copy.subarray(start, start + size).reverse();
  return copy;
}
