import { zlibSync } from 'fflate';
import { describe, expect, it } from 'vitest';
import { damage } from '#rasters/testing/damage.ts';
import { fixtureNames, loadFixture } from '#rasters/testing/fixtures.ts';
import { tryFile } from '#rasters/testing/try-file.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import type { RasterError } from './raster-error.ts';
import { readRaster } from './read-raster.ts';

const names = ['good-', 'mend-', 'bad-'].flatMap(fixtureNames);
const files = names.map(loadFixture);
/** Of the ten thousand that `npm run fuzz:rasters` goes through, in a process that is watched. */
const sample = 8;

describe('a damaged file', () => {
  it.each(names)('%s: is refused with its reasons or read, described, planned and aligned', async (name) => {
    const which = names.indexOf(name);
    for (let k = 0; k < sample; k++) {
      const other = files[(which + 1 + k) % files.length];
      await tryFile(damage(files[which], other, which, k), k).catch((error: unknown) => {
        throw new Error(`damage ${k} got past the checks`, { cause: error });
      });
    }
  });

  it('does not always come to the same', async () => {
    const outcomes = new Map<string, number>();
    for (const [which, file] of files.entries()) {
      const outcome = await tryFile(damage(file, files[0], 77, which), which);
      outcomes.set(outcome, (outcomes.get(outcome) ?? 0) + 1);
    }
    expect(outcomes.get('read')).toBeGreaterThan(files.length / 10);
    expect(outcomes.get('raster-truncated')).toBeGreaterThan(files.length / 10);
    expect(outcomes.size).toBeGreaterThan(4);
  });

  it('cut at any byte is refused as cut short, or as no GeoTIFF when even the header is gone', async () => {
    const bytes = loadFixture('good-tiles-many.tif');
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
    await expect(readRaster(withStrip(zlibSync(new Uint8Array(5_000_000))))).rejects.toMatchObject({
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
    const bytes = loadFixture('bad-huge.tif');
    let asked = 0;
    const read = (offset: number, length: number) => {
      asked += length;
      return Promise.resolve(bytes.slice(offset, offset + length));
    };
    await expect(readRaster({ size: bytes.length, read })).rejects.toMatchObject({
      code: 'raster-too-large',
    });
    expect(asked).toBeLessThan(500);
  });
});
