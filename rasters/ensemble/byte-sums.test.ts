import { describe, expect, it } from 'vitest';
import { byteSums } from './byte-sums.ts';

/** Seven cells: one word of four, and three that fill none. */
const map = (n: number) => Uint8Array.from({ length: 7 }, (_, cell) => (cell * 37 + n * 101) % 256);
const plain = (count: number) =>
  Array.from({ length: 7 }, (_, cell) =>
    Array.from({ length: count }, (__, n) => map(n)[cell]).reduce((sum, byte) => sum + byte, 0),
  );

describe('sums of maps of bytes', () => {
  it.each([1, 2, 257, 258, 600])('are those cell by cell, of %i maps', (count) => {
    const sums = byteSums(7);
    for (let n = 0; n < count; n++) sums.add(map(n));
    expect([...sums.values()]).toEqual(plain(count));
    expect([...sums.values()]).toEqual(plain(count));
  });
  it('hold 257 maps of the largest byte in 16 bits', () => {
    const sums = byteSums(5);
    for (let n = 0; n < 257; n++) sums.add(new Uint8Array(5).fill(255));
    expect(sums.values()).toEqual(new Uint16Array(5).fill(65_535));
    sums.add(new Uint8Array(5).fill(255));
    expect(sums.values()).toEqual(new Uint32Array(5).fill(65_790));
  });
  it('go on from sums of either width, which may stand anywhere in a buffer', () => {
    for (const width of [Uint16Array, Uint32Array]) {
      const sums = byteSums(7, width.from([1, 2, 3, 4, 5, 6, 7]));
      sums.add(new Uint8Array(12).fill(9).subarray(3, 10));
      expect([...sums.values()]).toEqual([10, 11, 12, 13, 14, 15, 16]);
    }
  });
  it('refuse a map of another size', () => {
    expect(() => byteSums(7).add(new Uint8Array(6))).toThrow('Found 6 bytes; expected 7');
  });
});
