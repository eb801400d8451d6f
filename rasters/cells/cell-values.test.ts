import { unzlibSync, zlibSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { CellValuesError, decodeCellValues, encodeCellValues, type CellArray } from './cell-values.ts';
import { unpackCellValues } from './unpack-cell-values.ts';

const unpack = (packed: Uint8Array, limits?: { cells: number }) =>
  unpackCellValues(new Uint8Array(packed), limits);

const arrays: CellArray[] = [
  { width: 3, height: 2, values: Uint8Array.of(0, 1, 127, 128, 254, 255) },
  { width: 2, height: 1, values: Int8Array.of(-128, 127) },
  { width: 1, height: 2, values: Uint16Array.of(1, 65_535) },
  { width: 2, height: 2, values: Int16Array.of(-32_768, 0, 2026, 32_767) },
  { width: 1, height: 1, values: Uint32Array.of(4_000_000_000) },
  { width: 1, height: 1, values: Int32Array.of(-2_000_000_000) },
  { width: 2, height: 2, values: Float32Array.of(0.1, NaN, -0, Infinity) },
  { width: 1, height: 2, values: Float64Array.of(Math.PI, -1e300) },
];

describe('cell values', () => {
  it.each(arrays)('come back as they were: $values', (array) => {
    const back = decodeCellValues(encodeCellValues(array));
    expect(back).toEqual(array);
    expect(back.values.constructor).toBe(array.values.constructor);
  });

  it.each(arrays)('come back by the host’s inflater alike: $values', async (array) => {
    const back = await unpack(encodeCellValues(array));
    expect(back).toEqual(array);
    expect(back.values.constructor).toBe(array.values.constructor);
  });

  it('are laid out as described, little-endian', () => {
    const packed = encodeCellValues({ width: 2, height: 1, values: Int16Array.of(1, -2) });
    expect([...packed.subarray(0, 16)]).toEqual([0x46, 0x48, 0x43, 0x56, 1, 3, 0, 0, 2, 0, 0, 0, 1, 0, 0, 0]);
    expect([...unzlibSync(packed.subarray(16))]).toEqual([1, 0, 0xfe, 0xff]);
  });

  it('may stand anywhere in a larger buffer, on both sides', () => {
    const values = new Float32Array(10).subarray(3, 7).map((_, i) => i / 3);
    const packed = encodeCellValues({ width: 2, height: 2, values });
    const shifted = new Uint8Array(packed.length + 5);
    shifted.set(packed, 5);
    expect(decodeCellValues(shifted.subarray(5)).values).toEqual(values);
  });

  it('of a whole site come back', async () => {
    const values = Uint8Array.from({ length: 640 * 372 }, (_, i) => (i * 7919) >> 5);
    const packed = encodeCellValues({ width: 640, height: 372, values });
    expect(Buffer.compare(decodeCellValues(packed).values as Uint8Array, values)).toBe(0);
    expect(Buffer.compare((await unpack(packed)).values as Uint8Array, values)).toBe(0);
  });

  it('refuse an array that does not fit its size', () => {
    expect(() => encodeCellValues({ width: 2, height: 2, values: new Uint8Array(3) })).toThrow(
      /3 values for 2 × 2/,
    );
    expect(() => encodeCellValues({ width: 0, height: 2, values: new Uint8Array(0) })).toThrow(
      CellValuesError,
    );
  });
});

describe('refused before inflating', () => {
  // So many levels on so few cells are a zlib stream.
  const good = encodeCellValues({ width: 4, height: 4, values: new Uint8Array(16).map((_, i) => i) });
  const changed = (at: number, byte: number) => {
    const copy = good.slice();
    copy[at] = byte;
    return copy;
  };
  it.each([
    ['another file', new TextEncoder().encode('<!doctype html><title>'), /no cell values/],
    ['nothing', new Uint8Array(), /no cell values/],
    ['another version', changed(4, 3), /version 3; this program reads versions 1 to 2/],
    ['no version', changed(4, 0), /version 0/],
    ['an unknown type', changed(5, 8), /type code 8/],
    ['no cells', changed(8, 0), /0 × 4 cells/],
    ['too many cells', changed(11, 255), /at most 67108864/],
    ['more cells than values', changed(8, 5), /damaged: found 16 bytes where 20 belong/],
    ['fewer cells than values', changed(8, 3), /damaged: found more than the 12 bytes/],
    ['a cut', good.subarray(0, good.length - 3), /damaged/],
  ])('%s', async (_, packed, message) => {
    expect(() => decodeCellValues(packed)).toThrow(CellValuesError);
    expect(() => decodeCellValues(packed)).toThrow(message);
    await expect(unpack(packed)).rejects.toThrow(CellValuesError);
    await expect(unpack(packed)).rejects.toThrow(message);
  });

  it('a changed byte, by the checksum', async () => {
    const packed = good.slice();
    packed[packed.length - 1] ^= 1;
    expect(() => decodeCellValues(packed)).toThrow(/damaged/);
    await expect(unpack(packed)).rejects.toThrow(/damaged/);
  });

  it('what passes the limit given', async () => {
    expect(() => decodeCellValues(good, { cells: 15 })).toThrow(/at most 15/);
    await expect(unpack(good, { cells: 15 })).rejects.toThrow(/at most 15/);
    expect(decodeCellValues(good, { cells: 16 }).values).toHaveLength(16);
  });

  it('a body that inflates past its size', async () => {
    const bomb = zlibSync(new Uint8Array(50_000_000));
    const packed = new Uint8Array(16 + bomb.length);
    packed.set(good.subarray(0, 16));
    packed.set(bomb, 16);
    expect(() => decodeCellValues(packed)).toThrow(/more than the 16 bytes/);
    await expect(unpack(packed)).rejects.toThrow(/more than the 16 bytes/);
  });
});
