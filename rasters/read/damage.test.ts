import { readdirSync, readFileSync } from 'node:fs';
import { zlibSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { hash } from '#rasters/demo/noise.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import { RasterError } from './raster-error.ts';
import { readRaster } from './read-raster.ts';
import { summarise } from './summary.ts';

const folder = new URL('../fixtures/', import.meta.url);
const names = readdirSync(folder).filter((name) => name.endsWith('.tif') && name !== 'bad-png.tif');
const limits = { cells: 250_000, blockBytes: 1_000_000 };

/** Damage number `k` to a file, the same each time: flipped bytes, a cut, or huge and zero numbers in the header. */
function damage(bytes: Uint8Array, seed: number, k: number): Uint8Array {
  const u = (i: number) => hash(seed, k, i);
  const pick = (i: number, below: number) => Math.floor(u(i) * below);
  const kind = pick(0, 5);
  if (kind === 0) return bytes.slice(0, pick(1, bytes.length));
  const copy = bytes.slice();
  const view = new DataView(copy.buffer);
  if (kind === 1) for (let i = 0; i <= pick(1, 6); i++) copy[pick(10 + i, copy.length)] = pick(30 + i, 256);
  else if (kind === 2) copy[pick(2, copy.length)] ^= 1 << pick(3, 8);
  else {
    const numbers = kind === 3 ? [0xffffffff, 0x7fffffff, 0x80000000, 0xfffffff0] : [0, 1, 2, 65_535];
    const at = 4 + pick(2, Math.min(copy.length, 400) - 8);
    view.setUint32(at, numbers[pick(4, 4)], pick(5, 2) === 0);
  }
  return copy;
}

describe('a damaged file', () => {
  it.each(names)('%s: is refused or read, and nothing else', async (name) => {
    const bytes = new Uint8Array(readFileSync(new URL(name, folder)));
    const outcomes = { read: 0, refused: 0 };
    for (let k = 0; k < 60; k++) {
      try {
        const raster = await readRaster(damage(bytes, names.indexOf(name), k), limits);
        expect(raster.values.length).toBe(raster.grid.width * raster.grid.height);
        expect(raster.values.length).toBeLessThanOrEqual(limits.cells);
        expect(raster.grid.cellSize).toBeGreaterThan(0);
        const { histogram, noDataShare } = summarise(raster);
        const counted = histogram.reduce((sum, n) => sum + n, 0);
        expect(counted).toBe(Math.round((1 - noDataShare) * raster.values.length));
        outcomes.read++;
      } catch (error) {
        if (!(error instanceof RasterError))
          throw new Error(`damage ${k} got past the checks`, { cause: error });
        outcomes.refused++;
      }
    }
    expect(outcomes.refused).toBeGreaterThan(5);
    if (name.startsWith('good-')) expect(outcomes.read).toBeGreaterThan(5);
  });

  it('cut at any byte is refused as cut short, or as no GeoTIFF when even the header is gone', async () => {
    const bytes = new Uint8Array(readFileSync(new URL('good-tiles-many.tif', folder)));
    for (let length = 0; length < bytes.length; length++) {
      const error: unknown = await readRaster(bytes.slice(0, length)).catch((e: unknown) => e);
      expect((error as RasterError).code, `${length} bytes`).toBe(
        length < 8 ? 'not-a-geotiff' : 'raster-truncated',
      );
    }
  });
});

describe('what would take too much memory', () => {
  const grid = { width: 400, height: 300, cellSize: 1, originX: 0, originY: 0, epsg: 32631 };
  const file = encodeGeoTiff({ grid, values: new Uint8Array(120_000).fill(3) });
  /** The file with one of its strips replaced by other bytes at its end. */
  const withStrip = (strip: Uint8Array) => {
    const view = new DataView(file.buffer);
    const grown = new Uint8Array(file.length + strip.length);
    grown.set(file);
    grown.set(strip, file.length);
    const out = new DataView(grown.buffer);
    for (let i = 0; i < view.getUint16(8, true); i++) {
      const entry = 10 + 12 * i;
      const [tag, count] = [view.getUint16(entry, true), view.getUint32(entry + 4, true)];
      if (tag !== 273 && tag !== 279) continue;
      const at = count === 1 ? entry + 8 : view.getUint32(entry + 8, true);
      out.setUint32(at, tag === 273 ? file.length : strip.length, true);
    }
    return grown;
  };

  it('a strip that inflates beyond its size is stopped', async () => {
    expect((await readRaster(withStrip(zlibSync(new Uint8Array(400 * 163).fill(9))))).values[0]).toBe(9);
    await expect(readRaster(withStrip(zlibSync(new Uint8Array(50_000_000))))).rejects.toMatchObject({
      code: 'raster-truncated',
      found: expect.stringContaining('more than the 65200 bytes') as string,
    });
  });

  it('more cells than the limit are refused', async () => {
    await expect(readRaster(file, { cells: 119_999 })).rejects.toMatchObject({ code: 'raster-too-large' });
    expect((await readRaster(file, { cells: 120_000 })).values).toHaveLength(120_000);
  });

  it('a strip larger than the limit is refused', async () => {
    await expect(readRaster(file, { blockBytes: 65_199 })).rejects.toMatchObject({
      code: 'raster-too-large',
    });
    expect((await readRaster(file, { blockBytes: 65_200 })).values).toHaveLength(120_000);
  });

  it('nothing is read of a file that claims 100,000 × 100,000 cells but its header', async () => {
    const bytes = readFileSync(new URL('bad-huge.tif', folder));
    let asked = 0;
    const read = (offset: number, length: number) => {
      asked += length;
      return Promise.resolve(new Uint8Array(bytes.subarray(offset, offset + length)));
    };
    await expect(readRaster({ size: bytes.length, read })).rejects.toMatchObject({
      code: 'raster-too-large',
    });
    expect(asked).toBeLessThan(500);
  });
});
