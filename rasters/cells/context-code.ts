import { damagedCells } from './cell-header.ts';
import { adler32 } from './inflate-exactly.ts';

/**
 * Lossless coding of maps of few distinct bytes, such as the cover of a run in counts mode, in half the room of a zlib
 * stream: each cell by binary decisions, whose chances are learned for the values of its neighbours to the west and
 * north, fed to an arithmetic coder without carry (Rissanen & Langdon 1979, IBM J. Res. Dev. 23:149; contexts after
 * Langdon & Rissanen 1981, IEEE Trans. Commun. 29:858; both from memory).
 *
 * Body: number of cells (4 bytes, big-endian), number of levels − 1, the levels ascending, the coder's bytes, Adler-32 of
 * all these (big-endian).
 */

/** Most distinct values: the chances take 8 (levels)³ bytes. */
const mostLevels = 64;
/** Before the levels: number of cells, number of levels. */
const startLength = 5;
const checksumLength = 4;

/** Packs a map, or says by undefined that it has too many distinct values. */
export function contextCode(values: Uint8Array, width: number): Uint8Array | undefined {
  const levels = levelsOf(values);
  if (levels.length > mostLevels) return undefined;
  const place = new Uint8Array(256);
  levels.forEach((level, i) => (place[level] = i));
  const encoder = createEncoder(values.length);
  walk(
    values.map((value) => place[value]),
    width,
    levels.length,
    encoder.put,
  );
  const coded = encoder.finish();
  const body = new Uint8Array(startLength + levels.length + coded.length + checksumLength);
  const view = new DataView(body.buffer);
  view.setUint32(0, values.length);
  body[4] = levels.length - 1;
  body.set(levels, startLength);
  body.set(coded, startLength + levels.length);
  const end = body.length - checksumLength;
  view.setUint32(end, adler32(body.subarray(0, end)));
  return body;
}

/**
 * Checks a body without decoding its cells.
 *
 * @param size cells that belong there
 * @throws CellValuesError where it is not what was packed
 */
export function checkContextCode(body: Uint8Array, size: number): void {
  const end = body.length - checksumLength;
  if (end <= startLength || body[4] >= mostLevels || end < startLength + body[4] + 1)
    throw damagedCells(`a coded map of ${body.length} bytes, which is none`);
  const view = new DataView(body.buffer, body.byteOffset);
  if (view.getUint32(end) !== adler32(body.subarray(0, end)))
    throw damagedCells('a coded map that fails its checksum');
  if (view.getUint32(0) !== size) throw damagedCells(`${view.getUint32(0)} bytes where ${size} belong`);
}

/**
 * Unpacks a body into exactly `size` cells, whatever it holds.
 * @throws CellValuesError where it is not what was packed
 */
export function contextDecode(body: Uint8Array, width: number, size: number): Uint8Array<ArrayBuffer> {
  checkContextCode(body, size);
  const end = startLength + body[4] + 1;
  const levels = new Uint8Array(mostLevels);
  levels.set(body.subarray(startLength, end));
  const cells = new Uint8Array(size);
  walk(cells, width, end - startLength, createDecoder(body.subarray(end, body.length - checksumLength)));
  for (let i = 0; i < size; i++) cells[i] = levels[cells[i]];
  return cells;
}

function levelsOf(values: Uint8Array): number[] {
  const found = new Uint8Array(256);
  for (let i = 0; i < values.length; i++) found[values[i]] = 1;
  return Array.from(found.keys()).filter((value) => found[value] === 1);
}

/** Codes a bit under the chance of 1, out of 4096; a decoder returns the bit that it reads, whatever it is given. */
type CodeBit = (chance: number, bit: number) => number;

/** A chance moves by 1/(n + 1.6) of what it was off at its nth use, and by 1/128 in the long run; out of 2^15. */
const pace = Int32Array.from({ length: 128 }, (_, n) => Math.max(256, Math.round(32_768 / (n + 1.6))));

/**
 * Goes through a map of levels 0 … count − 1 from the north-west. A cell's first decision is whether it is like its
 * western neighbour; the others are the bits of its level. Decoding, `cells` is filled.
 */
function walk(cells: Uint8Array, width: number, count: number, codeBit: CodeBit): void {
  const bits = Math.max(1, Math.ceil(Math.log2(count)));
  const tree = 1 << bits;
  const slots = tree * tree * 2 * tree;
  /** chance of 1, out of 2^16, above 7 bits of how often it was used */
  const learned = new Int32Array(slots).fill(32_768 << 7);
  const code = (slot: number, bit: number): number => {
    const chance = learned[slot] >> 7;
    const uses = learned[slot] & 127;
    const coded = codeBit(chance >> 4, bit);
    const next = chance + ((((coded === 1 ? 65_535 : 0) - chance) * pace[uses]) >> 15);
    learned[slot] = (Math.min(65_519, Math.max(16, next)) << 7) | Math.min(127, uses + 1);
    return coded;
  };
  for (let i = 0, x = 0; i < cells.length; i++) {
    const hasNorth = i >= width;
    const n0 = hasNorth ? cells[i - width] : 0;
    const w = x > 0 ? cells[i - 1] : n0;
    const n = hasNorth ? n0 : w;
    const alike =
      w === n &&
      hasNorth &&
      (x === 0 || cells[i - width - 1] === n) &&
      (x === width - 1 || cells[i - width + 1] === n) &&
      (x < 2 || cells[i - 2] === w) &&
      (i < 2 * width || cells[i - 2 * width] === n);
    const context = ((w * tree + n) * 2 + (alike ? 1 : 0)) * tree;
    const cell = cells[i];
    if (code(context, cell === w ? 1 : 0) === 1) cells[i] = w;
    else {
      let node = 1;
      for (let b = bits - 1; b >= 0; b--) node = 2 * node + code(context + node, (cell >>> b) & 1);
      cells[i] = node - tree;
    }
    if (++x === width) x = 0;
  }
}

/**
 * The interval low … high of 32 bits narrows by each bit; leading bytes that both ends share are settled. The numbers are
 * held as signed ones and in an array, since beyond 31 bits a closure's own would be boxed anew whenever they change.
 */
function createEncoder(cells: number) {
  let bytes = new Uint8Array((cells >> 3) + 1024);
  let length = 0;
  const ends = Int32Array.of(0, -1);
  const settle = (byte: number) => {
    if (length === bytes.length) {
      const longer = new Uint8Array(2 * length);
      longer.set(bytes);
      bytes = longer;
    }
    bytes[length++] = byte;
  };
  return {
    put: (chance: number, bit: number): number => {
      let low = ends[0];
      let high = ends[1];
      const middle = split(low, high, chance);
      if (bit === 1) high = middle;
      else low = (middle + 1) | 0;
      for (; ((low ^ high) & leading) === 0; low <<= 8, high = (high << 8) | 255) settle(high >>> 24);
      ends[0] = low;
      ends[1] = high;
      return bit;
    },
    /** Any number of the interval settles the last cells; what follows it is read as zeros. */
    finish: (): Uint8Array => {
      for (let shift = 24; shift >= 0; shift -= 8) settle((ends[1] >>> shift) & 255);
      return bytes.subarray(0, length);
    },
  };
}

function createDecoder(bytes: Uint8Array): CodeBit {
  let at = 0;
  const next = () => (at < bytes.length ? bytes[at++] : 0);
  const ends = Int32Array.of(0, -1);
  const read = Int32Array.of((next() << 24) | (next() << 16) | (next() << 8) | next());
  return (chance) => {
    let low = ends[0];
    let high = ends[1];
    const middle = split(low, high, chance);
    const bit = (read[0] ^ sign) <= (middle ^ sign) ? 1 : 0;
    if (bit === 1) high = middle;
    else low = (middle + 1) | 0;
    for (; ((low ^ high) & leading) === 0; low <<= 8, high = (high << 8) | 255)
      read[0] = (read[0] << 8) | next();
    ends[0] = low;
    ends[1] = high;
    return bit;
  };
}

const leading = 0xff000000 | 0;
/** Flipped in both, it makes signed numbers compare like unsigned ones. */
const sign = 0x80000000 | 0;

/** Where an interval is cut: its lower part stands for 1. */
const split = (low: number, high: number, chance: number): number =>
  (low + Math.imul((high - low) >>> 12, chance)) | 0;
