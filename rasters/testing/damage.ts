import { hash } from '#rasters/demo/noise.ts';

/** Numbers that break arithmetic: as 32 bits, and as 64-bit floats. */
const whole = [0, 1, 2, 65_535, 0x7fffffff, 0x80000000, 0xfffffff0, 0xffffffff];
const floats = [0, -0, -1, 1e-300, 1e300, NaN, Infinity, -Infinity, 1e9, 0.1];
/** Tags that say where cells lie, how they are kept and what they mean. */
const telling = [
  256, 257, 258, 259, 262, 273, 277, 278, 279, 284, 317, 322, 323, 324, 325, 338, 339, 33550, 33922, 34264,
  34735, 34736, 34737, 42112, 42113, 50674,
];

/**
 * Damage number `k` to a file, the same each time: cut off, bytes changed, a bit flipped, numbers of its header replaced,
 * a directory entry of a telling tag or what it points at changed, or its end swapped for that of another file.
 */
export function damage(bytes: Uint8Array, other: Uint8Array, seed: number, k: number): Uint8Array {
  const pick = (i: number, below: number) => Math.floor(hash(seed, k, i) * below);
  const copy = bytes.slice();
  if (copy.length < 16) return copy;
  const view = new DataView(copy.buffer);
  const inHead = () => 4 + pick(2, Math.min(copy.length, 600) - 12);
  switch (pick(0, 8)) {
    case 0:
      return bytes.slice(0, pick(1, bytes.length));
    case 1:
      for (let i = 0; i <= pick(1, 6); i++) copy[pick(10 + i, copy.length)] = pick(30 + i, 256);
      return copy;
    case 2:
      copy[pick(2, copy.length)] ^= 1 << pick(3, 8);
      return copy;
    case 3:
      view.setUint32(inHead(), whole[pick(4, whole.length)], pick(5, 2) === 0);
      return copy;
    case 4:
      view.setFloat64(inHead(), floats[pick(4, floats.length)], pick(5, 4) > 0);
      return copy;
    case 5:
    case 6:
      return changeEntry(copy, pick);
    default: {
      const at = pick(6, Math.min(copy.length, other.length));
      copy.set(other.subarray(at, copy.length), at);
      return copy;
    }
  }
}

/** Changes the type, count, value or values of an entry of a telling tag, wherever its two bytes are found. */
function changeEntry(copy: Uint8Array, pick: (i: number, below: number) => number): Uint8Array {
  const view = new DataView(copy.buffer, copy.byteOffset);
  const littleEndian = copy[0] === 0x49;
  const start = pick(1, telling.length);
  for (let t = 0; t < telling.length; t++) {
    const tag = telling[(start + t) % telling.length];
    for (let at = 8; at + 20 <= copy.length; at++) {
      if (view.getUint16(at, littleEndian) !== tag) continue;
      const number = whole[pick(3, whole.length)];
      switch (pick(2, 4)) {
        case 0:
          view.setUint16(at + 2, pick(4, 19), littleEndian);
          break;
        case 1:
          view.setUint32(at + 4, number, littleEndian);
          break;
        case 2:
          view.setUint32(at + 8, number, littleEndian);
          break;
        default: {
          const target = view.getUint32(at + 8, littleEndian);
          if (target + 8 > copy.length) view.setUint16(at + 8, number & 0xffff, littleEndian);
          else if (pick(5, 2)) view.setFloat64(target, floats[pick(6, floats.length)], littleEndian);
          else view.setUint16(target + 2 * pick(7, 4), pick(8, 65_536), littleEndian);
        }
      }
      return copy;
    }
  }
  return copy;
}
