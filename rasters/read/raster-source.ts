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
