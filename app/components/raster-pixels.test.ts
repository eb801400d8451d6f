import { describe, expect, it } from 'vitest';
import { toPixels } from './raster-pixels.ts';

describe('toPixels', () => {
  it('paints each cell in its colour, hatched ones full, bare ones clear', () => {
    const palette = new Uint8Array(256 * 4);
    palette.set([10, 20, 30, 255], 0);
    palette.set([40, 50, 60, 128], 4);
    palette.set([70, 80, 90, 0], 8);
    const pixels = toPixels({ kind: 'cover', values: Uint8Array.of(1, 0, 2) }, palette);
    expect([...pixels]).toEqual([40, 50, 60, 255, 10, 20, 30, 255, 70, 80, 90, 0]);
    expect(palette[7]).toBe(128);
  });
});
