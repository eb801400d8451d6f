import { Unzlib } from 'fflate';

/** Compressed bytes handed over at a time: a piece can grow by 1032 at most, so this bounds what one step allocates. */
const pieceLength = 16_384;

export class InflateError extends Error {
  override name = 'InflateError';
}

/**
 * Inflates a zlib stream (RFC 1950) that must come out at exactly `size` bytes, checksum included. It stops at the
 * first byte too many, so a stream that would grow without end costs no more than an honest one.
 * @throws InflateError when the stream is broken, too short, too long, or fails its checksum
 */
export function inflateExactly(stream: Uint8Array, size: number): Uint8Array<ArrayBuffer> {
  if (stream.length < 6)
    throw new InflateError(`a zlib stream of ${stream.length} bytes is too short to be one`);
  const out = new Uint8Array(size);
  let filled = 0;
  const inflate = new Unzlib((piece) => {
    if (filled + piece.length > size) throw new InflateError(`more than the ${size} bytes that belong there`);
    out.set(piece, filled);
    filled += piece.length;
  });
  try {
    for (let start = 0; start < stream.length; start += pieceLength)
      // The last piece keeps the whole checksum together, as the inflater cuts it off there.
      inflate.push(
        stream.subarray(start, Math.min(start + pieceLength, stream.length)),
        start + pieceLength >= stream.length,
      );
  } catch (error) {
    if (error instanceof InflateError) throw error;
    throw new InflateError(`a broken zlib stream (${error instanceof Error ? error.message : 'unknown'})`);
  }
  if (filled < size) throw new InflateError(`${filled} bytes where ${size} belong`);
  const tail = new DataView(stream.buffer, stream.byteOffset + stream.length - 4, 4);
  if (adler32(out) !== tail.getUint32(0)) throw new InflateError('a zlib stream that fails its checksum');
  return out;
}

/** Adler-32 checksum (RFC 1950). */
export function adler32(bytes: Uint8Array): number {
  let a = 1;
  let b = 0;
  for (let start = 0; start < bytes.length;) {
    // 3800 additions of 255 keep both sums within 31 bits.
    const end = Math.min(start + 3800, bytes.length);
    for (; start < end; start++) {
      a += bytes[start];
      b += a;
    }
    a %= 65521;
    b %= 65521;
  }
  return ((b << 16) | a) >>> 0;
}
