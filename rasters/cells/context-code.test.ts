import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { zlibSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { decodeCellValues, encodeCellValues } from './cell-values.ts';
import { checkContextCode, contextCode, contextDecode } from './context-code.ts';
import { unpackCellValues } from './unpack-cell-values.ts';

const roundTrip = (values: Uint8Array, width: number) => {
  const body = contextCode(values, width)!;
  expect(Buffer.compare(contextDecode(body, width, values.length), values)).toBe(0);
  return body;
};

/** Clumps of five levels on ground of two capacities, thinning out to the east: the look of a frame in counts mode. */
const frame = (width: number, height: number) => {
  let state = 1;
  const random = () => (state = (state * 48_271) % 2_147_483_647) / 2_147_483_647;
  return Uint8Array.from({ length: width * height }, (_, i) => {
    const x = i % width;
    const capacity = (i / width) % 40 < 25 ? 255 : 178;
    const share = Math.min(1, Math.max(0, (1.6 * (width - x)) / width - 0.4));
    const standing = [0, 1, 2, 3].filter(() => random() < share).length;
    return Math.round((capacity * standing) / 4);
  });
};

describe('coding by context', () => {
  it('gives back any map of few levels', () => {
    const maps = fc
      .tuple(fc.integer({ min: 1, max: 9 }), fc.integer({ min: 1, max: 9 }), fc.integer({ min: 1, max: 64 }))
      .chain(([width, height, levels]) =>
        fc.record({
          width: fc.constant(width),
          // 199 has no divisor in common with 256, so every level is a byte of its own.
          cells: fc.array(
            fc.integer({ min: 0, max: levels - 1 }).map((n) => (n * 199) & 255),
            {
              minLength: width * height,
              maxLength: width * height,
            },
          ),
        }),
      );
    fc.assert(
      fc.property(maps, ({ width, cells }) => void roundTrip(Uint8Array.from(cells), width)),
      { numRuns: 60 },
    );
  });

  it.each([
    [1, 500],
    [500, 1],
    [301, 97],
  ])('gives back a frame of %d × %d', (width, height) => {
    roundTrip(frame(width, height), width);
  });

  it('gives back noise of 64 levels, a bare map and a full one; of 65 levels it takes none', () => {
    const noise = Uint8Array.from({ length: 40_000 }, (_, i) => ((i * i * 7919) >> 7) & 63);
    roundTrip(noise, 200);
    for (const value of [0, 255])
      expect(roundTrip(new Uint8Array(90_000).fill(value), 300).length).toBeLessThan(60);
    expect(
      contextCode(
        Uint8Array.from({ length: 65 }, (_, i) => i),
        65,
      ),
    ).toBeUndefined();
  });

  it('takes well under the room of a zlib stream', () => {
    const values = frame(320, 200);
    expect(roundTrip(values, 320).length).toBeLessThan(0.75 * zlibSync(values, { level: 9 }).length);
  });

  it('still packs to the same bytes: another way would not read what is stored', () => {
    const body = contextCode(frame(60, 40), 60)!;
    expect(createHash('sha256').update(body).digest('hex')).toBe(
      '4a7cbd896925fa67919757f35b16519bd19d4d6f4f3db063015f05d0ffea6409',
    );
  });

  it('still reads what was stored by this version', () => {
    const stored = '00000018030055aaff5973c73d92a6fa3b26fb0657';
    expect([...contextDecode(Buffer.from(stored, 'hex'), 6, 24)]).toEqual([
      0, 0, 0, 85, 170, 255, 0, 0, 85, 85, 255, 255, 0, 85, 170, 255, 255, 255, 0, 0, 0, 170, 255, 255,
    ]);
  });
});

describe('as a binary of cell values', () => {
  const values = frame(60, 40);
  const packed = new Uint8Array(encodeCellValues({ width: 60, height: 40, values }));

  it('it is version 2, and both readers give it back', async () => {
    expect(packed[4]).toBe(2);
    for (const back of [decodeCellValues(packed), await unpackCellValues(packed)])
      expect(back).toEqual({ width: 60, height: 40, values });
  });

  it('bytes that were stored as a zlib stream, in version 1, are still read', async () => {
    const body = zlibSync(values);
    const old = new Uint8Array(16 + body.length);
    old.set(packed.subarray(0, 16));
    old[4] = 1;
    old.set(body, 16);
    expect(decodeCellValues(old).values).toEqual(values);
    expect((await unpackCellValues(old)).values).toEqual(values);
  });

  it('bytes of many levels, and maps too small to gain by it, remain zlib streams', () => {
    const many = Uint8Array.from({ length: 2000 }, (_, i) => i);
    expect(encodeCellValues({ width: 50, height: 40, values: many })[4]).toBe(1);
    expect(encodeCellValues({ width: 2, height: 1, values: Uint8Array.of(1, 2) })[4]).toBe(1);
  });

  it.each([
    ['a changed byte', (p: Uint8Array) => void (p[100] ^= 4), /fails its checksum/],
    ['other numbers than bytes', (p: Uint8Array) => void (p[5] = 3), /type code 3 .* bytes \(0\) alone/],
    ['more cells', (p: Uint8Array) => void (p[12] += 1), /found 2400 bytes where 2460 belong/],
    ['fewer cells', (p: Uint8Array) => void (p[12] -= 1), /found 2400 bytes where 2340 belong/],
    ['too many levels', (p: Uint8Array) => void (p[20] = 64), /which is none/],
  ])('%s is refused', async (_, damage, message) => {
    const damaged = packed.slice();
    damage(damaged);
    expect(() => decodeCellValues(damaged)).toThrow(message);
    await expect(unpackCellValues(damaged)).rejects.toThrow(message);
  });

  it.each([0, 1, 5, 200])('a body cut to %d bytes is refused', (length) => {
    expect(() => checkContextCode(packed.subarray(16, 16 + length), 2400)).toThrow(/damaged/);
  });
});
