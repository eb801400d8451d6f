import { damaged } from './raster-error.ts';

const clearCode = 256;
const endCode = 257;
const firstFree = 258;
const tableSize = 4096;

/**
 * Decodes an LZW block (TIFF 6.0, section 13: most significant bit first, codes widen one early) into exactly `size`
 * bytes; what follows them is not looked at, so the block cannot grow.
 * @throws RasterError `raster-truncated` when a code makes no sense or the bytes end too early
 */
export function decodeLzw(bytes: Uint8Array, size: number): Uint8Array<ArrayBuffer> {
  const out = new Uint8Array(size);
  // Each string of the table is a stretch of what came out already: where it starts and how long it is.
  const starts = new Uint32Array(tableSize);
  const lengths = new Uint32Array(tableSize);
  let free = firstFree;
  let width = 9;
  let previous = -1;
  let previousStart = 0;
  let previousLength = 0;
  let filled = 0;
  let bits = 0;
  let held = 0;
  let at = 0;
  while (filled < size) {
    while (held < width) {
      if (at >= bytes.length) throw damaged(`an LZW block of ${filled} bytes where ${size} belong`);
      bits = ((bits << 8) | bytes[at++]) & 0xffffff;
      held += 8;
    }
    held -= width;
    const code = (bits >> held) & ((1 << width) - 1);
    if (code === endCode) throw damaged(`an LZW block of ${filled} bytes where ${size} belong`);
    if (code === clearCode) {
      free = firstFree;
      width = 9;
      previous = -1;
      continue;
    }
    const start = filled;
    if (code < clearCode) out[filled++] = code;
    else if (code < free && previous >= 0) filled = copy(out, starts[code], lengths[code], filled);
    else if (code === free && previous >= 0) {
      filled = copy(out, previousStart, previousLength, filled);
      if (filled < size) out[filled++] = out[previousStart];
    } else throw damaged('an LZW block with a code that is not in its table');
    // A new string is the one before and the first byte of this one: they stand side by side in what came out.
    if (previous >= 0 && free < tableSize) {
      starts[free] = previousStart;
      lengths[free] = previousLength + 1;
      free++;
    }
    previous = code;
    previousStart = start;
    previousLength = filled - start;
    if (free + 1 >= 1 << width && width < 12) width++;
  }
  return out;
}

/** Copies forward byte by byte, as the stretches may overlap; stops at the end of `out`. */
function copy(out: Uint8Array, from: number, length: number, to: number): number {
  const end = Math.min(to + length, out.length);
  for (let i = from; to < end; i++, to++) out[to] = out[i];
  return end;
}
