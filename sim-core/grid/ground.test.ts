import { describe, expect, it } from 'vitest';
import {
  constantBytes,
  toBytes,
  toShareBytes,
  toShares,
  type CellValues,
  type ShareMapping,
} from './ground.ts';

/** The mapping cell by cell, as its words say it, to compare the tables with. */
function plainly(values: CellValues, mapping: ShareMapping): number[] {
  const { scale = 1, offset = 0, classes, noData, fill = 0 } = mapping;
  return Array.from(values, (value) => {
    if (Number.isNaN(value) || value === noData) return Math.fround(fill);
    const share = classes ? (classes[String(value)] ?? fill) : value * scale + offset;
    return Math.fround(Math.min(1, Math.max(0, share)));
  });
}

const cells = 70_000;
/** Every value from `from` on, over and over: more cells than a table of 16 bits has values. */
const cycle = (from: number, values: number) =>
  Array.from({ length: cells }, (_, i) => from + ((i * 7) % values));
const byThird = { scale: 1 / 3 / 255, offset: 0.2, noData: 7, fill: 0.7 };

/** Tens of thousands of cells are compared byte by byte: far faster than by element. */
const same = (a: Uint8Array | Float32Array, b: Uint8Array | Float32Array) =>
  a.constructor === b.constructor &&
  Buffer.compare(
    Buffer.from(a.buffer, a.byteOffset, a.byteLength),
    Buffer.from(b.buffer, b.byteOffset, b.byteLength),
  ) === 0;

describe.each<[string, CellValues, ShareMapping]>([
  ['bytes', Uint8Array.from(cycle(0, 256)), byThird],
  ['signed bytes', Int8Array.from(cycle(-128, 256)), { scale: 1 / 255, offset: 128 / 255, noData: -128 }],
  ['words', Uint16Array.from(cycle(0, 65_536)), { scale: 1 / 65_535, noData: 65_535, fill: 0.1 }],
  ['signed words', Int16Array.from(cycle(-9999, 10_100)), { scale: 1 / 10_099, offset: 9999 / 10_099 }],
  ['few words', Int16Array.of(0, 50, 100), { scale: 0.01 }],
  ['long words', Uint32Array.from(cycle(0, 101)), { scale: 0.01 }],
  ['floats', Float32Array.from(cycle(0, 1001), (v) => (v === 500 ? NaN : v / 1000)), { fill: 0.3 }],
  ['classes', Uint8Array.from(cycle(0, 9)), { classes: { 1: 1, 2: 0.7, 3: 0.3 }, noData: 2, fill: 0.1 }],
  ['classes in floats', Float32Array.from(cycle(0, 5)), { classes: { 1: 0.7 } }],
])('shares of %s', (_, values, mapping) => {
  const expected = plainly(values, mapping);

  it('are what the mapping says of each cell', () => {
    expect(same(toShares(values, mapping), Float32Array.from(expected))).toBe(true);
  });

  it('are held in 8 bits alike with and without the array of shares', () => {
    const bytes = Uint8Array.from(expected, (share) => Math.round(share * 255));
    expect(same(toBytes(toShares(values, mapping)), bytes)).toBe(true);
    expect(same(toShareBytes(values, mapping), bytes)).toBe(true);
  });
});

it('a constant is held as a raster of it is', () => {
  // 0.7 × 255 is 178.5, but the nearest Float32 to 0.7 is a little smaller.
  for (const share of [0, 0.1, 0.3, 0.5, 0.7, 1])
    expect([...constantBytes(2, share)]).toEqual([...toBytes(new Float32Array(2).fill(share))]);
});

describe.each([toShares, toShareBytes])('%o', (convert) => {
  it.each<[string, CellValues, ShareMapping, RegExp]>([
    ['bytes', new Uint8Array(1000).fill(80, 300).fill(2, 900), {}, /^Cell 300 holds 80; a share/],
    [
      'words',
      new Int16Array(cells).fill(-3, 69_999),
      { scale: 0.5, noData: 0 },
      /^Cell 69999 holds -3 \(-1.5 after scale and offset\)/,
    ],
    ['floats', Float32Array.of(0, 1.5, 7), {}, /^Cell 1 holds 1\.5;/],
    ['infinite', Float32Array.of(0, -Infinity), {}, /^Cell 1 holds -Infinity;/],
    ['classes', Uint8Array.of(0, 1, 2), { classes: { 2: 1.5 } }, /^Cell 2 holds 2;/],
  ])('names the first cell of %s that is no share', (_, values, mapping, message) => {
    expect(() => convert(values, mapping)).toThrow(message);
  });

  it('lets pass what rounding did, and values that no cell holds', () => {
    expect(() => convert(Float32Array.of(1.000_000_5, -0.000_000_5))).not.toThrow();
    expect(() => convert(new Uint8Array(1000).fill(100), { scale: 0.01 })).not.toThrow();
  });
});
