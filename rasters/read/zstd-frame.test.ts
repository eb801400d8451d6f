import { describe, expect, it } from 'vitest';
import { sizedZstdFrame } from './zstd-frame.ts';

/** A frame of one raw block "abc", by RFC 8878: magic, descriptor, what follows it, block header, bytes. */
const frame = (descriptor: number, header: number[], { head = [0x19, 0, 0], tail = [97, 98, 99] } = {}) =>
  Uint8Array.of(0x28, 0xb5, 0x2f, 0xfd, descriptor, ...header, ...head, ...tail);
const wanted = { accepts: (size: number) => size === 3, otherwise: 3 };

describe('a ZSTD frame', () => {
  it.each([
    ['1 byte', 0x20, [3]],
    ['4 bytes', 0x80, [0, 3, 0, 0, 0]],
    ['8 bytes', 0xe0, [3, 0, 0, 0, 0, 0, 0, 0]],
  ])('that says its size in %s stays as it is, up to its end', (_, descriptor, header) => {
    const bytes = frame(descriptor, header);
    expect(sizedZstdFrame(Uint8Array.of(...bytes, 7, 7), wanted)).toEqual(bytes);
  });

  it('that says no size is given one', () => {
    expect(sizedZstdFrame(frame(0, [0x58]), wanted)).toEqual(frame(0x80, [0x58, 3, 0, 0, 0]));
    expect(() => sizedZstdFrame(frame(0, [0x58]), { ...wanted, otherwise: undefined })).toThrow('unknown');
  });

  it('keeps its checksum', () => {
    const tail = [97, 98, 99, 1, 2, 3, 4];
    expect(sizedZstdFrame(frame(0x24, [3], { tail }), wanted)).toHaveLength(16);
    expect(() => sizedZstdFrame(frame(0x24, [3]), wanted)).toThrow('too early');
  });

  it('that is not whole, of another size or kind is refused', () => {
    expect(() => sizedZstdFrame(frame(0x20, [4]), wanted)).toThrow('4 bytes');
    // 2 bytes of size count from 256 on.
    expect(() => sizedZstdFrame(frame(0x40, [0, 3, 0]), wanted)).toThrow('259 bytes');
    expect(() => sizedZstdFrame(frame(0x21, [3, 1]), wanted)).toThrow('dictionary');
    expect(() => sizedZstdFrame(frame(0x20, [3], { head: [0x18, 0, 0] }), wanted)).toThrow('too early');
    expect(() => sizedZstdFrame(frame(0x20, [3], { head: [0x1f, 0, 0] }), wanted)).toThrow('kind');
    for (let length = 0; length < 12; length++)
      expect(() => sizedZstdFrame(frame(0x20, [3]).subarray(0, length), wanted)).toThrow('ZSTD block');
  });
});
