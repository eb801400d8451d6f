import { deflateSync, zlibSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { adler32, inflateAtMost, inflateExactly, InflateError } from './inflate-exactly.ts';

const noise = (length: number) => Uint8Array.from({ length }, (_, i) => (i * i * 31 + (i >> 3)) & 255);

describe('inflateExactly', () => {
  it.each([0, 1, 5, 65_536, 300_001])('gives back %i bytes', (length) => {
    const bytes = noise(length);
    expect(Buffer.compare(inflateExactly(zlibSync(bytes), length), bytes)).toBe(0);
  });

  it('gives back a stream whose checksum straddles two pieces', () => {
    // Incompressible bytes are stored as they are, so the stream's length can be steered around a piece's end.
    for (let length = 16_380 - 11; length < 16_392; length++) {
      const bytes = crypto.getRandomValues(new Uint8Array(length));
      expect(Buffer.compare(inflateExactly(zlibSync(bytes, { level: 0 }), length), bytes)).toBe(0);
    }
  });

  it('stops a stream that grows past its size at once: it never gets to the broken part behind', () => {
    const bomb = zlibSync(new Uint8Array(100_000_000));
    bomb.fill(255, 40_000);
    expect(() => inflateExactly(bomb, 1000)).toThrow(/more than the 1000 bytes/);
    expect(() => inflateExactly(bomb, 100_000_000)).toThrow(/broken/);
  });

  it('refuses a short stream that grows past its size', () => {
    const bomb = zlibSync(new Uint8Array(10_000_000));
    expect(bomb.length).toBeLessThan(16_384);
    for (const size of [0, 1000, 9_999_999])
      expect(() => inflateExactly(bomb, size)).toThrow(`more than the ${size} bytes`);
    expect(inflateExactly(bomb, 10_000_000)).toHaveLength(10_000_000);
  });

  it.each([
    ['too short', zlibSync(noise(100)), 101],
    ['one byte too long', zlibSync(noise(100)), 99],
    ['cut', zlibSync(noise(100)).subarray(0, 60), 100],
    ['no zlib', deflateSync(noise(100)), 100],
    ['empty', new Uint8Array(), 0],
  ])('refuses a stream that is %s', (_, stream, size) => {
    expect(() => inflateExactly(stream, size)).toThrow(InflateError);
  });

  it('refuses a changed byte by the checksum', () => {
    const stream = zlibSync(noise(500), { level: 0 });
    stream[200] ^= 1;
    expect(() => inflateExactly(stream, 500)).toThrow(/checksum/);
  });
});

it.each([100, 300_001])('inflateAtMost gives back %i bytes or fewer, and no more', (length) => {
  const stream = zlibSync(noise(length));
  expect(inflateAtMost(stream, length + 50)).toEqual(noise(length));
  expect(() => inflateAtMost(stream, length - 1)).toThrow(/more than/);
});

it('adler32 agrees with the example of its description ("Wikipedia" gives 0x11E60398, from memory) and the writer', () => {
  expect(adler32(new TextEncoder().encode('Wikipedia'))).toBe(0x11e60398);
  const bytes = new Uint8Array(100_000).fill(255);
  expect(adler32(bytes)).toBe(new DataView(zlibSync(bytes).slice(-4).buffer).getUint32(0));
});
