import { damaged } from './raster-error.ts';

/**
 * Decodes a PackBits block (TIFF 6.0, section 9) into exactly `size` bytes; what follows them is not looked at.
 * @throws RasterError `raster-truncated` when the bytes end too early
 */
export function decodePackBits(bytes: Uint8Array, size: number): Uint8Array<ArrayBuffer> {
  const out = new Uint8Array(size);
  let filled = 0;
  for (let at = 0; filled < size;) {
    if (at + 1 >= bytes.length) throw damaged(`a PackBits block of ${filled} bytes where ${size} belong`);
    const head = bytes[at++];
    if (head === 128) continue;
    if (head > 128) {
      const end = filled + 257 - head;
      out.fill(bytes[at++], filled, end);
      filled = end;
    } else {
      const run = bytes.subarray(at, at + Math.min(head + 1, size - filled));
      out.set(run, filled);
      filled += run.length;
      at += head + 1;
    }
  }
  return out;
}
