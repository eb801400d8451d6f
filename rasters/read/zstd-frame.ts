import { damaged } from './raster-error.ts';

const magic = 0xfd2fb528;
/** Lengths of the content size by the two upper bits of the descriptor; 0 is 1 byte in a frame of a single segment. */
const sizeLengths = [0, 2, 4, 8] as const;

/**
 * A ZSTD frame (RFC 8878, section 3.1) that says how many bytes it holds. geotiff.js decodes such a frame in one step,
 * into a buffer of that size; without the size it decodes piece by piece in a loop that never ends at a damaged block.
 * So the frame is walked from block to block, and gets the size where it says none. What follows the frame is cut off.
 * @param accepts whether the frame may hold so many bytes; `otherwise` is the size of a frame that does not say
 * @throws RasterError `raster-truncated` when the frame is not whole or of another size
 */
export function sizedZstdFrame(
  bytes: Uint8Array,
  { accepts, otherwise }: { accepts: (size: number) => boolean; otherwise: number | undefined },
): Uint8Array<ArrayBuffer> {
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  if (bytes.length < 6 || view.getUint32(0, true) !== magic) throw damaged('a ZSTD block without its header');
  const descriptor = bytes[4];
  const singleSegment = (descriptor & 0x20) !== 0;
  if ((descriptor & 0x0b) !== 0) throw damaged('a ZSTD block that needs a dictionary, or with reserved bits');
  const sizeAt = singleSegment ? 5 : 6;
  const sizeLength = descriptor >> 6 === 0 && singleSegment ? 1 : sizeLengths[descriptor >> 6];
  const blocksAt = sizeAt + sizeLength;
  // This also makes sure that the header, which is read below, lies inside.
  const end = endOfBlocks(bytes, blocksAt) + (descriptor & 4);
  if (end > bytes.length) throw damaged('a ZSTD block that ends too early');
  const size = sizeLength === 0 ? otherwise : contentSize(view, sizeAt, sizeLength);
  if (size === undefined || !accepts(size))
    throw damaged(`a ZSTD block of ${size ?? 'an unknown number of'} bytes where another number belongs`);
  if (sizeLength > 0) return new Uint8Array(bytes.subarray(0, end));
  const sized = new Uint8Array(end + 4);
  sized.set(bytes.subarray(0, sizeAt));
  sized[4] = descriptor | 0x80;
  new DataView(sized.buffer).setUint32(sizeAt, size, true);
  sized.set(bytes.subarray(blocksAt, end), sizeAt + 4);
  return sized;
}

function contentSize(view: DataView, at: number, length: 1 | 2 | 4 | 8): number {
  if (length === 1) return view.getUint8(at);
  if (length === 2) return view.getUint16(at, true) + 256;
  if (length === 4) return view.getUint32(at, true);
  return Number(view.getBigUint64(at, true));
}

/** Where the last block of the frame ends. Each begins with 3 bytes: 1 bit "last", 2 bits kind, 21 bits size. */
function endOfBlocks(bytes: Uint8Array, start: number): number {
  for (let at = start; at + 3 <= bytes.length;) {
    const head = bytes[at] | (bytes[at + 1] << 8) | (bytes[at + 2] << 16);
    const kind = (head >> 1) & 3;
    if (kind === 3) throw damaged('a ZSTD block of a kind that does not exist');
    const runOfOneByte = kind === 1;
    at += 3 + (runOfOneByte ? 1 : head >> 3);
    if ((head & 1) !== 0) return at;
  }
  throw damaged('a ZSTD block that ends too early');
}
