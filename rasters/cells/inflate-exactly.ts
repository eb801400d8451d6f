import { unzlibSync, Unzlib } from 'fflate';

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
  const out = inflateAtMost(stream, size);
  if (out.length < size) throw new InflateError(`${out.length} bytes where ${size} belong`);
  return out;
}

/**
 * Inflates a zlib stream that must come out at `most` bytes or fewer, as `inflateExactly` does.
 * @throws InflateError when the stream is broken, too short, too long, or fails its checksum
 */
export function inflateAtMost(stream: Uint8Array, most: number): Uint8Array<ArrayBuffer> {
  if (stream.length < 6)
    throw new InflateError(`a zlib stream of ${stream.length} bytes is too short to be one`);
  let out: Uint8Array<ArrayBuffer>;
  try {
    out = stream.length <= pieceLength ? inflateAtOnce(stream, most) : inflateByPieces(stream, most);
  } catch (error) {
    if (error instanceof InflateError) throw error;
    throw new InflateError(`a broken zlib stream (${error instanceof Error ? error.message : 'unknown'})`);
  }
  const tail = new DataView(stream.buffer, stream.byteOffset + stream.length - 4, 4);
  if (adler32(out) !== tail.getUint32(0)) throw new InflateError('a zlib stream that fails its checksum');
  return out;
}

const tooMany = (most: number) => new InflateError(`more than the ${most} bytes that belong there`);

/** A short stream costs far less at once; what it would write beyond the buffer it is given is dropped, at most 17 MB. */
function inflateAtOnce(stream: Uint8Array, most: number): Uint8Array<ArrayBuffer> {
  const out = unzlibSync(stream, { out: new Uint8Array(most + 1) });
  if (out.length > most) throw tooMany(most);
  return out.slice();
}

function inflateByPieces(stream: Uint8Array, most: number): Uint8Array<ArrayBuffer> {
  const out = new Uint8Array(most);
  let filled = 0;
  const inflate = new Unzlib((piece) => {
    if (filled + piece.length > most) throw tooMany(most);
    out.set(piece, filled);
    filled += piece.length;
  });
  for (let start = 0; start < stream.length; start += pieceLength)
    // The last piece keeps the whole checksum together, as the inflater cuts it off there.
    inflate.push(
      stream.subarray(start, Math.min(start + pieceLength, stream.length)),
      start + pieceLength >= stream.length,
    );
  return out.subarray(0, filled);
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
