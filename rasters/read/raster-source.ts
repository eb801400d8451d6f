import { damaged } from './raster-error.ts';

/** Bytes that can be read in pieces: a file handle, a blob, a buffer. */
export interface RasterSource {
  /** length in bytes */
  readonly size: number;
  /** gives `length` bytes from `offset`; both always lie within `size` */
  read(offset: number, length: number): Promise<Uint8Array>;
}

/** A buffer as a source; a source as it is. */
export const toSource = (source: Uint8Array | RasterSource): RasterSource =>
  source instanceof Uint8Array
    ? {
        size: source.length,
        read: (offset, length) => Promise.resolve(source.subarray(offset, offset + length)),
      }
    : source;

/**
 * Bytes from a source, never past its end.
 * @throws RasterError `raster-truncated` when the source does not hold them; `what` says whose bytes they are
 */
export async function readBytes(
  source: RasterSource,
  offset: number,
  length: number,
  what: string,
): Promise<Uint8Array> {
  const end = offset + length;
  if (!Number.isSafeInteger(end) || offset < 0 || length < 0 || end > source.size)
    throw damaged(`${what} at byte ${offset}, ${length} long, in a file of ${source.size} bytes`);
  const bytes = await source.read(offset, length);
  if (bytes.length !== length) throw damaged(`${bytes.length} bytes of ${what} where ${length} belong`);
  return bytes;
}

/** Bytes taken at once where blocks stand one after another; most writers leave at most some bytes between two. */
const stretch = 262_144;
const mostBetween = 64;

/**
 * A source that reads ahead while it is asked for one stretch after another, as a file of thousands of small tiles costs
 * a call to the system each. Asked for scattered pieces, it reads no more than these.
 */
export function readAhead(source: RasterSource): RasterSource {
  let held: Uint8Array = new Uint8Array(0);
  let heldFrom = 0;
  let asked = -1;
  return {
    size: source.size,
    async read(offset, length) {
      const from = offset - heldFrom;
      const follows = asked >= 0 && offset >= asked && offset - asked <= mostBetween;
      asked = offset + length;
      if (from >= 0 && from + length <= held.length) return held.subarray(from, from + length);
      if (!follows || length >= stretch) return source.read(offset, length);
      held = await source.read(offset, Math.min(stretch, source.size - offset));
      heldFrom = offset;
      return held.subarray(0, length);
    },
  };
}
