import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readRaster } from '#rasters/read/read-raster.ts';
import { summarise } from '#rasters/read/summary.ts';
import { toSource } from '#rasters/read/raster-source.ts';
import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import { surveyBand } from './survey-band.ts';

const folder = join(import.meta.dirname, '../fixtures');
const good = readdirSync(folder).filter((name) => /^good-.*\.tif$/.test(name));
const survey = (file: Uint8Array, band?: number) => surveyBand(toSource(file), { band });

describe('a band that is looked at piece by piece', () => {
  it.each(good)('%s comes to what all its decoded cells come to', async (name) => {
    const file = readFileSync(join(folder, name));
    const raster = await readRaster(file);
    const { summary, thumbnail } = await survey(file);
    // The fixtures are smaller than a thumbnail, so that its histogram counts every cell, and it is the raster itself.
    expect(summary).toEqual(summarise(raster));
    expect([...thumbnail.values]).toEqual([...raster.values]);
  });

  it('is shown by every nth cell, north up', async () => {
    const [width, height] = [600, 300];
    const values = Int16Array.from(
      { length: width * height },
      (_, i) => (i % width) - 1000 * Math.floor(i / width / 100),
    );
    const grid = { width, height, cellSize: 1, originX: 0, originY: 0, epsg: 32631 };
    const { thumbnail } = await survey(encodeGeoTiff({ grid, values }, { blocks: 'tiles' }));
    expect(thumbnail).toMatchObject({ width: 200, height: 100 });
    for (const [x, y] of [
      [0, 0],
      [199, 0],
      [86, 34],
      [199, 99],
    ])
      expect(thumbnail.values[y * 200 + x]).toBe(values[3 * y * width + 3 * x]);
  });

  it.each([1, 3])('is the one that was asked for: band %d of five', async (band) => {
    const file = readFileSync(join(folder, 'mend-five-bands.tif'));
    const { band: found, description } = await survey(file, band);
    expect(found.index).toBe(band);
    expect(description.bands).toHaveLength(5);
    await expect(survey(file, 9)).rejects.toMatchObject({ code: 'raster-bands' });
  });
});
