import { damaged } from './raster-error.ts';
import type { RasterDataType } from './tiff-layout.ts';

/** What a LERC blob says of itself, as far as TIFF has use for it. */
export interface LercBlob {
  /** which cells hold a value, most significant bit first; undefined when all do */
  readonly mask: Uint8Array | undefined;
}

interface Shape {
  readonly width: number;
  /** values of a cell */
  readonly samples: number;
  readonly rows: number;
  readonly dataType: RasterDataType;
}

const imageTypes: readonly RasterDataType[] = [
  'int8',
  'uint8',
  'int16',
  'uint16',
  'int32',
  'uint32',
  'float32',
  'float64',
];
/** Where the fields of a version 2.4 header stand, all little-endian; the mask follows. */
const fields = {
  version: 6,
  height: 14,
  width: 18,
  valuesPerCell: 22,
  validCells: 26,
  microBlock: 30,
  blobSize: 34,
  imageType: 38,
  maskSize: 66,
} as const;
const maskAt = 70;
const largestMicroBlock = 256;

/**
 * Checks the header of a LERC blob, of version 2.4 as TIFF has it, against the strip or tile that it should hold, before
 * it is decoded: the decoder allocates what the header says, and loops without end at a blob or micro-block of size 0.
 * Layout of the header and mask from the decoder that geotiff.js uses (lerc, LercDecode.js).
 * @throws RasterError `raster-truncated` when the header says anything else
 */
export function readLercBlob(blob: Uint8Array, { width, samples, rows, dataType }: Shape): LercBlob {
  if (blob.length < maskAt || !new TextDecoder().decode(blob.subarray(0, 6)).startsWith('Lerc2 '))
    throw damaged('a LERC block without its header');
  const view = new DataView(blob.buffer, blob.byteOffset, blob.byteLength);
  const says = (at: number) => view.getInt32(at, true);
  if (says(fields.version) !== 4) throw damaged(`a LERC block of version 2.${says(fields.version)}, not 2.4`);
  if (says(fields.width) !== width || says(fields.height) !== rows)
    throw damaged(
      `a LERC block of ${says(fields.width)} × ${says(fields.height)} cells where ${width} × ${rows} belong`,
    );
  if (says(fields.valuesPerCell) !== samples || imageTypes[says(fields.imageType)] !== dataType)
    throw damaged(`a LERC block of other numbers than ${samples} ${dataType} a cell`);
  if (says(fields.blobSize) !== blob.length)
    throw damaged(`a LERC block of ${blob.length} bytes that says ${says(fields.blobSize)}`);
  const microBlock = says(fields.microBlock);
  if (microBlock < 1 || microBlock > largestMicroBlock)
    throw damaged(`a LERC block in steps of ${microBlock} cells`);
  const cells = width * rows;
  const valid = says(fields.validCells);
  if (valid === cells) return { mask: undefined };
  if (valid === 0) return { mask: new Uint8Array(Math.ceil(cells / 8)) };
  return { mask: readMask(blob.subarray(maskAt, maskAt + says(fields.maskSize)), Math.ceil(cells / 8)) };
}

/** Undoes the mask's run lengths: a 16-bit count, then so many bytes as they are, or when negative one byte repeated. */
function readMask(runs: Uint8Array, size: number): Uint8Array {
  const view = new DataView(runs.buffer, runs.byteOffset, runs.byteLength);
  const mask = new Uint8Array(size);
  for (let at = 0, filled = 0; filled < size;) {
    if (at + 3 > runs.length) throw damaged('a LERC block whose mask ends too early');
    const count = view.getInt16(at, true);
    at += 2;
    const length = Math.abs(count);
    if (length === 0 || filled + length > size || (count > 0 && at + length > runs.length))
      throw damaged('a LERC block whose mask is of another size');
    if (count > 0) mask.set(runs.subarray(at, at + length), filled);
    else mask.fill(runs[at], filled, filled + length);
    at += count > 0 ? length : 1;
    filled += length;
  }
  return mask;
}
