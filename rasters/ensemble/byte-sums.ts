import { littleEndianHost } from '../cells/cell-header.ts';

/** Sums of maps of bytes, cell by cell. */
export interface ByteSums {
  add(bytes: Uint8Array): void;
  /** what came together so far; 16 bits a cell where that holds them */
  values(): Uint16Array | Uint32Array;
}

/** As many bytes as 16 bits can sum up, whatever they are. */
const mostInHalf = Math.floor(0xffff / 0xff);
const low = 0x00ff00ff;

/**
 * Four cells are added at once: their bytes go to the halves of two words, which hold 257 maps before they are emptied
 * into sums of 32 bits. That is four times as fast as cell by cell, and up to 257 maps take half the memory.
 *
 * @param from sums to go on from, taken over
 */
export function byteSums(cells: number, from?: Uint16Array | Uint32Array): ByteSums {
  const words = cells >> 2;
  const even = new Uint32Array(words);
  const odd = new Uint32Array(words);
  /** what stands beside the halves; the last cells of an odd map stand here alone */
  let whole = from && Uint32Array.from(from);
  let inHalves = 0;
  const rest = new Uint32Array(cells - 4 * words);

  function emptyInto(sums: Uint16Array | Uint32Array): void {
    for (let word = 0; word < words; word++) {
      const [e, o] = [even[word], odd[word]];
      const cell = 4 * word;
      // Bytes of a word from the lowest up: even, odd, even, odd.
      const parts = [e & 0xffff, o & 0xffff, e >>> 16, o >>> 16];
      for (let b = 0; b < 4; b++) sums[cell + (littleEndianHost ? b : 3 - b)] += parts[b];
    }
    rest.forEach((sum, i) => (sums[4 * words + i] += sum));
  }

  return {
    add(bytes) {
      if (bytes.length !== cells)
        throw new RangeError(`Found ${bytes.length} bytes; expected ${cells}, one for each cell`);
      if (inHalves === mostInHalf) {
        emptyInto((whole ??= new Uint32Array(cells)));
        for (const sums of [even, odd, rest]) sums.fill(0);
        inHalves = 0;
      }
      inHalves++;
      // A view of words begins at a multiple of four.
      const aligned = bytes.byteOffset % 4 === 0 ? bytes : bytes.slice();
      const four = new Uint32Array(aligned.buffer, aligned.byteOffset, words);
      for (let word = 0; word < words; word++) {
        const cells4 = four[word];
        even[word] += cells4 & low;
        odd[word] += (cells4 >>> 8) & low;
      }
      for (let i = 0; i < rest.length; i++) rest[i] += bytes[4 * words + i];
    },
    values() {
      const sums = whole ? whole.slice() : new Uint16Array(cells);
      emptyInto(sums);
      return sums;
    },
  };
}
