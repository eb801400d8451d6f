import { zlibSync } from 'fflate';
import {
  bytesOf,
  cellsOf,
  damagedCells,
  headerLength,
  readCellHeader,
  writeCellHeader,
  type CellArray,
  type CellLimits,
} from './cell-header.ts';
import { contextCode, contextDecode } from './context-code.ts';
import { inflateExactly, InflateError } from './inflate-exactly.ts';

export { CellValuesError, type CellArray, type CellLimits } from './cell-header.ts';

/**
 * Packs width × height values of any number type.
 *
 * @param effort `quick` takes half the time, for up to a fifth more room
 * @throws CellValuesError when the number of values is not width × height
 */
export function encodeCellValues(cells: CellArray, effort: 'small' | 'quick' = 'small'): Uint8Array {
  const { values, width } = cells;
  const header = new Uint8Array(headerLength);
  // First, for it refuses what is no map.
  writeCellHeader(header, cells, 'zlib');
  let body = effort === 'small' && values instanceof Uint8Array ? contextCode(values, width) : undefined;
  if (body && body.length < values.byteLength) writeCellHeader(header, cells, 'context');
  // Level 3 is three times as fast as the usual 6, and some per cent larger.
  else body = zlibSync(bytesOf(values), { level: effort === 'small' ? 3 : 1 });
  const packed = new Uint8Array(headerLength + body.length);
  packed.set(header);
  packed.set(body, headerLength);
  return packed;
}

/**
 * Unpacks cell values into a fresh array. Magic, version, type, size and limit are checked before anything is inflated,
 * and no more is inflated than the size says.
 * @throws CellValuesError saying what was found and what was expected
 */
export function decodeCellValues(packed: Uint8Array, limits?: CellLimits): CellArray {
  const header = readCellHeader(packed, limits);
  const { width, byteLength, packing } = header;
  const body = packed.subarray(headerLength);
  const bytes =
    packing === 'context' ? contextDecode(body, width, byteLength) : inflateBody(body, byteLength);
  return cellsOf(header, bytes);
}

function inflateBody(body: Uint8Array, size: number): Uint8Array<ArrayBuffer> {
  try {
    return inflateExactly(body, size);
  } catch (error) {
    if (!(error instanceof InflateError)) throw error;
    throw damagedCells(error.message);
  }
}
