import { describe, expect, it } from 'vitest';
import { decodeLzw } from './lzw.ts';
import { decodePackBits } from './pack-bits.ts';

/** Codes as a bit stream, most significant bit first, 9 bits each. */
function pack(codes: readonly number[]): Uint8Array {
  const bits = codes.map((code) => code.toString(2).padStart(9, '0')).join('');
  return Uint8Array.from({ length: Math.ceil(bits.length / 8) }, (_, i) =>
    parseInt(bits.slice(8 * i, 8 * i + 8).padEnd(8, '0'), 2),
  );
}

/** A plain encoder after TIFF 6.0, section 13, to try long streams with widening codes and full tables. */
function encodeLzw(bytes: Uint8Array): Uint8Array {
  const out: number[] = [];
  let bits = 0;
  let held = 0;
  const write = (code: number, width: number) => {
    bits = ((bits << width) | code) & 0x7ffffff;
    held += width;
    while (held >= 8) out.push((bits >> (held -= 8)) & 255);
  };
  let table = new Map<string, number>();
  let [width, free] = [9, 258];
  const codeOf = (text: string) => (text.length === 1 ? text.charCodeAt(0) : (table.get(text) ?? -1));
  write(256, 9);
  let text = '';
  for (const byte of bytes) {
    const longer = text + String.fromCharCode(byte);
    if (codeOf(longer) >= 0) {
      text = longer;
      continue;
    }
    write(codeOf(text), width);
    table.set(longer, free++);
    text = String.fromCharCode(byte);
    if (free === 512 || free === 1024 || free === 2048) width++;
    if (free === 4095) {
      write(256, width);
      table = new Map();
      [width, free] = [9, 258];
    }
  }
  write(codeOf(text), width);
  write(257, width);
  if (held > 0) out.push((bits << (8 - held)) & 255);
  return Uint8Array.from(out);
}

describe('LZW', () => {
  it('decodes the example of TIFF 6.0, section 13', () => {
    // 7 7 7 8 8 7 7 6 6 becomes these codes (from memory of the specification's worked table).
    const codes = [256, 7, 258, 8, 8, 258, 6, 6, 257];
    expect([...decodeLzw(pack(codes), 9)]).toEqual([7, 7, 7, 8, 8, 7, 7, 6, 6]);
  });

  it.each([
    ['steps', (i: number) => i >> 6],
    ['a repeating pattern', (i: number) => (i % 7) * (i % 5)],
    ['hardly compressible', (i: number) => (Math.imul(i, 2_654_435_761) >>> 13) & 255],
    ['all alike', () => 42],
  ])('gives back 100,000 bytes: %s', (_, value) => {
    const bytes = Uint8Array.from({ length: 100_000 }, (_, i) => value(i));
    expect(Buffer.compare(decodeLzw(encodeLzw(bytes), bytes.length), bytes)).toBe(0);
  });

  it('never writes more than its size', () => {
    const bomb = encodeLzw(new Uint8Array(100_000));
    expect(decodeLzw(bomb, 10)).toEqual(new Uint8Array(10));
  });

  it.each([
    ['too few bytes', [256, 7, 8], 9],
    ['an end too early', [256, 7, 257, 8], 2],
    ['a code that is not in the table', [256, 7, 300], 9],
    ['a first code that is not in the table', [256, 258], 9],
  ])('refuses %s', (_, codes, size) => {
    expect(() => decodeLzw(pack(codes), size)).toThrow(/LZW/);
  });
});

describe('PackBits', () => {
  // The example of the Macintosh technical note TN1023, from memory.
  const packed = [0xfe, 0xaa, 2, 0x80, 0, 0x2a, 0xfd, 0xaa, 3, 0x80, 0, 0x2a, 0x22, 0xf7, 0xaa];
  const plain = [0xaa, 0xaa, 0xaa, 0x80, 0, 0x2a, 0xaa, 0xaa, 0xaa, 0xaa, 0x80, 0, 0x2a, 0x22].concat(
    new Array<number>(10).fill(0xaa),
  );

  it('decodes runs and literals', () => {
    expect([...decodePackBits(Uint8Array.from(packed), 24)]).toEqual(plain);
    expect([...decodePackBits(Uint8Array.from([128, ...packed]), 24)]).toEqual(plain);
  });

  it('never writes more than its size, and refuses to end early', () => {
    expect([...decodePackBits(Uint8Array.from(packed), 5)]).toEqual(plain.slice(0, 5));
    expect(() => decodePackBits(Uint8Array.from(packed), 25)).toThrow(/PackBits/);
  });
});
