import { describe, expect, it } from 'vitest';
import { sourceWindow } from '#rasters/align/source-window.ts';
import { openBand } from '#rasters/read/band-blocks.ts';
import { toSource } from '#rasters/read/raster-source.ts';
import { expected, loadFixture, northUp, typeNames } from '#rasters/testing/fixtures.ts';
import { inspectRaster, openRaster } from './inspect-raster.ts';

describe.each(Object.keys(expected))('%s', (name) => {
  const { size, geoTransform, epsg, type, noData, facts, every } = expected[name];

  it('is described as GDAL describes it', async () => {
    const description = await inspectRaster(loadFixture(name));
    const [x, width, , y, , height] = geoTransform;
    expect([description.width, description.height]).toEqual(size);
    expect(description.crs.epsg).toBe(epsg);
    expect(description.southUp).toBe(height > 0);
    const scale = 1e-9 * Math.max(Math.abs(x), Math.abs(y));
    expect(Math.abs(description.originX - x)).toBeLessThan(scale);
    expect(Math.abs(description.originY - (y + (height > 0 ? size[1] * height : 0)))).toBeLessThan(scale);
    expect(description.cellWidth).toBeCloseTo(width, 12);
    expect(description.cellHeight).toBeCloseTo(Math.abs(height), 12);
    for (const [i, said] of (facts ?? []).entries())
      expect(description.bands[i]).toEqual({
        index: i + 1,
        role: said.alpha ? 'alpha' : 'data',
        dataType: typeNames[type],
        noData,
        scale: said.scale,
        offset: said.offset,
        unit: said.unit,
        name: said.name,
      });
  });

  it('is plain data', async () => {
    const description = await inspectRaster(loadFixture(name));
    expect(JSON.parse(JSON.stringify(description))).toEqual(description);
  });

  it('holds in each band what GDAL reads, in pieces of any size', async () => {
    const source = toSource(loadFixture(name));
    const { description, layout } = await openRaster(source);
    const bands = [expected[name].values, ...(expected[name].others ?? [])];
    for (const [i, values] of bands.entries()) {
      const hidden = facts?.some(({ alpha }, j) => alpha && j !== i) ? bands[bands.length - 1] : undefined;
      const wanted = northUp(
        values.map((v, cell) => (v === noData || hidden?.[cell] === 0 ? null : v)),
        expected[name],
      );
      // Memory for one block: each piece decodes what it needs anew.
      const window = sourceWindow(openBand(source, layout, description.bands[i]), {
        noData,
        southUp: description.southUp,
        most: 1,
      });
      const found: (number | null)[] = new Array<null>(description.width * description.height).fill(null);
      for (let top = 0; top < description.height; top += 4)
        for (let left = 0; left < description.width; left += 40) {
          const piece = {
            left,
            top,
            width: Math.min(40, description.width - left),
            height: Math.min(4, description.height - top),
          };
          const cells = await window.load(piece);
          for (let row = 0; row < piece.height; row++)
            for (let column = 0; column < piece.width; column++) {
              const value = cells[row * piece.width + column];
              found[(top + row) * description.width + left + column] = Number.isNaN(value) ? null : value;
            }
        }
      expect(found.filter((_, cell) => cell % every === 0)).toEqual(wanted);
    }
  });
});

it('tells formats and sizes apart', async () => {
  const facts = async (name: string) => {
    const { compression, tiled, bigTiff, overviews, pixelIsPoint } = await inspectRaster(loadFixture(name));
    return { compression, tiled, bigTiff, overviews, pixelIsPoint };
  };
  const plain = { compression: 'none', tiled: false, bigTiff: false, overviews: 0, pixelIsPoint: false };
  expect(await facts('good-uint8.tif')).toEqual(plain);
  expect(await facts('good-cog.tif')).toEqual({
    ...plain,
    compression: 'deflate',
    tiled: true,
    overviews: 1,
  });
  expect(await facts('good-bigtiff.tif')).toEqual({ ...plain, bigTiff: true });
  expect(await facts('good-pixel-is-point.tif')).toEqual({ ...plain, pixelIsPoint: true });
  expect(await facts('good-lerc-zstd-tiles.tif')).toEqual({ ...plain, compression: 'lerc', tiled: true });
});

it('measures cells on the ground where the CRS does not', async () => {
  const size = async (name: string) => {
    const { cellMetres, metresTrue } = await inspectRaster(loadFixture(name));
    return { ...cellMetres, metresTrue };
  };
  expect(await size('good-uint8.tif')).toEqual({ width: 0.5, height: 0.5, metresTrue: true });
  // Half a thousandth of a degree at 47.868° N, by the radii of curvature (Snyder 1987, eqs. 4-18 and 4-20), computed in
  // double precision with the ellipsoid of WGS 84.
  const degrees = await size('mend-degrees.tif');
  expect(degrees.width).toBeCloseTo(37.4076, 3);
  expect(degrees.height).toBeCloseTo(55.5939, 3);
  expect(degrees.metresTrue).toBe(false);
  const feet = await size('mend-us-feet.tif');
  expect(feet.width).toBeCloseTo((2 * 1200) / 3937, 9);
  expect(feet.metresTrue).toBe(true);
  // On web Mercator lengths are stretched by about 1/cos 42.9° (Snyder 1987, eq. 7-3).
  const mercator = await size('mend-web-mercator.tif');
  expect(mercator.width).toBeCloseTo(0.5 * Math.cos((42.9328 * Math.PI) / 180), 2);
  expect(mercator.metresTrue).toBe(false);
});

it('reads no more of a file than its header', async () => {
  const bytes = loadFixture('good-cog.tif');
  let asked = 0;
  const read = (offset: number, length: number) => {
    asked += length;
    return Promise.resolve(bytes.subarray(offset, offset + length));
  };
  await inspectRaster({ size: bytes.length, read });
  expect(asked).toBeLessThan(bytes.length / 10);
});
