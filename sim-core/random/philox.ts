/**
 * Philox4x32: counter-based random words (Salmon, Moraes, Dror & Shaw 2011, SC'11, doi:10.1145/2063384.2063405).
 * The words follow from counter and key alone, so every cell can be drawn in any order, or not at all.
 */

const multiplier0 = 0xd2511f53;
const multiplier1 = 0xcd9e8d57;
const weyl0 = 0x9e3779b9;
const weyl1 = 0xbb67ae85;

/** Upper 32 bits of a × b, both unsigned: 16-bit halves, as a double cannot hold 64 bits. */
function multiplyHigh(a: number, b: number): number {
  const a0 = a & 0xffff;
  const a1 = a >>> 16;
  const b0 = b & 0xffff;
  const b1 = b >>> 16;
  const middle = a1 * b0 + ((a0 * b0) >>> 16);
  const carry = a0 * b1 + (middle & 0xffff);
  return (a1 * b1 + (middle >>> 16) + (carry >>> 16)) | 0;
}

/**
 * Four random words of counter (c0, c1, c2, c3) and key (k0, k1), written to `out[0..3]` as unsigned 32-bit numbers.
 *
 * @param out Uint32Array of at least 4, the caller's scratch
 * @param rounds 10 for every draw of a run; others only to check against published vectors
 */
export function philox4x32(
  out: Uint32Array,
  c0: number,
  c1: number,
  c2: number,
  c3: number,
  k0: number,
  k1: number,
  rounds = 10,
): void {
  for (let round = 0; round < rounds; round++) {
    const high0 = multiplyHigh(multiplier0, c0);
    const high1 = multiplyHigh(multiplier1, c2);
    const low0 = Math.imul(multiplier0, c0);
    const low1 = Math.imul(multiplier1, c2);
    c0 = high1 ^ c1 ^ k0;
    c1 = low1;
    c2 = high0 ^ c3 ^ k1;
    c3 = low0;
    k0 = (k0 + weyl0) | 0;
    k1 = (k1 + weyl1) | 0;
  }
  out[0] = c0;
  out[1] = c1;
  out[2] = c2;
  out[3] = c3;
}

/** A word as a number strictly between 0 and 1: (word + ½) / 2³². */
export const uniform = (word: number): number => (word + 0.5) * 2.3283064365386963e-10;
