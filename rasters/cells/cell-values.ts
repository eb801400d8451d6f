import { zlibSync } from 'fflate';
import type { CellValues } from '#sim-core/grid/ground.ts';
import { inflateExactly, InflateError } from './inflate-exactly.ts';

/**
 * The binary in which arrays of cell values are sent and stored. Little-endian:
 * bytes 0–3 `FHCV`, 4 version (1), 5 type code, 6–7 zero, 8–11 width, 12–15 height, then the values, row-major from the
 * north-west, as a zlib stream.
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
const version = 1;
const headerLength = 16;
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
const littleEndianHost = new Uint8Array(Uint16Array.of(1).buffer)[0] === 1;

/**
 * Packs width × height values of any number type.
 * @throws CellValuesError when the number of values is not width × height
 */
export function encodeCellValues({ width, height, values }: CellArray): Uint8Array {
  if (!isSize(width) || !isSize(height) || values.length !== width * height)
    throw new CellValuesError(
      `Found ${values.length} values for ${width} × ${height} cells; expected one value a cell.`,
    );
  const code = arrayTypes.findIndex((type) => values instanceof type);
  if (code < 0)
    throw new CellValuesError('Found no typed array of numbers; expected one, such as Uint8Array.');
  const bytes = new Uint8Array(values.buffer, values.byteOffset, values.byteLength);
  // Level 3 is three times as fast as the usual 6 on frames, and some per cent larger.
  const body = zlibSync(littleEndianHost ? bytes : swapped(bytes, values.BYTES_PER_ELEMENT), { level: 3 });
  const packed = new Uint8Array(headerLength + body.length);
  packed.set(magic);
  packed[4] = version;
  packed[5] = code;
  const view = new DataView(packed.buffer);
  view.setUint32(8, width, true);
  view.setUint32(12, height, true);
  packed.set(body, headerLength);
  return packed;
}

/**
 * Unpacks cell values into a fresh array. Magic, version, type, size and limit are checked before anything is inflated,
 * and no more is inflated than the size says.
 * @throws CellValuesError saying what was found and what was expected
 */
export function decodeCellValues(packed: Uint8Array, limits: CellLimits = defaultCellLimits): CellArray {
  if (packed.length < headerLength || magic.some((byte, i) => packed[i] !== byte))
    throw new CellValuesError('Found no cell values (they begin with FHCV); fetch the file again.');
  if (packed[4] !== version)
    throw new CellValuesError(
      `Found cell values of version ${packed[4]}; this program reads version ${version}.`,
    );
  const type = arrayTypes.at(packed[5] < arrayTypes.length ? packed[5] : arrayTypes.length);
  if (!type)
    throw new CellValuesError(
      `Found the type code ${packed[5]}; this program knows 0 to ${arrayTypes.length - 1}.`,
    );
  const view = new DataView(packed.buffer, packed.byteOffset, packed.byteLength);
  const width = view.getUint32(8, true);
  const height = view.getUint32(12, true);
  const cells = width * height;
  if (cells === 0 || cells > limits.cells)
    throw new CellValuesError(
      `Found ${width} × ${height} cells; expected at least 1 and at most ${limits.cells}.`,
    );
  const bytes = inflateBody(packed.subarray(headerLength), cells * type.BYTES_PER_ELEMENT);
  const ordered = littleEndianHost ? bytes : swapped(bytes, type.BYTES_PER_ELEMENT);
  return { width, height, values: new type(ordered.buffer as ArrayBuffer) };
}

function inflateBody(body: Uint8Array, size: number): Uint8Array {
  try {
    return inflateExactly(body, size);
  } catch (error) {
    if (!(error instanceof InflateError)) throw error;
    throw new CellValuesError(`The cell values are damaged: found ${error.message}. Fetch the file again.`);
  }
}

const isSize = (n: number): boolean => Number.isInteger(n) && n > 0 && n <= 0xffffffff;

/** A copy with the bytes of each element in the other order. */
function swapped(bytes: Uint8Array, size: number): Uint8Array {
  const copy = bytes.slice();
  for (let start = 0; start < copy.length; start += size) copy.subarray(start, start + size).reverse();
  return copy;
}
