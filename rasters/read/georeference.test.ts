import { describe, expect, it } from 'vitest';
import { layOutTiff, type TiffField } from '#rasters/write/tiff-file.ts';
import { RasterError } from './raster-error.ts';
import { readRaster } from './read-raster.ts';

/** A 2 × 2 file of bytes, uncompressed, with the georeference fields given. */
const tiff = (...fields: TiffField[]): Uint8Array =>
  layOutTiff(
    [
      ...[
        [256, 2],
        [257, 2],
        [258, 8],
        [259, 1],
        [277, 1],
        [278, 2],
      ].map(([tag, value]): TiffField => ({ tag, type: 'short', values: [value] })),
      ...fields,
    ],
    [Uint8Array.of(1, 2, 3, 4)],
    { offsets: 273, byteCounts: 279 },
  );
const scale = (...values: number[]): TiffField => ({ tag: 33550, type: 'double', values });
const tie = (...values: number[]): TiffField => ({ tag: 33922, type: 'double', values });
const matrix = (...values: number[]): TiffField => ({ tag: 34264, type: 'double', values });
const text = (value: string): TiffField => ({ tag: 34737, type: 'ascii', text: value });
const doubles = (...values: number[]): TiffField => ({ tag: 34736, type: 'double', values });
const keys = (...rows: number[][]): TiffField => ({
  tag: 34735,
  type: 'short',
  values: [1, 1, 1, rows.length, ...rows.flat()],
});
const projected = (epsg: number, ...more: number[][]) =>
  keys([1024, 0, 1, 1], [1025, 0, 1, 1], [3072, 0, 1, epsg], ...more);
const place = [scale(1, 1, 0), tie(0, 0, 0, 412_200, 5_301_750, 0)];
const codeOf = (file: Uint8Array) =>
  readRaster(file).then(
    (raster) => raster.crsName,
    (error: unknown) => (error instanceof RasterError ? error.code : error),
  );

describe('where cells lie', () => {
  it('the example of GeoTIFF 1.1 (OGC 19-008r4), annex F', async () => {
    const { grid, crsName } = await readRaster(
      tiff(
        tie(0, 0, 0, 350_807.4, 5_316_081.3, 0),
        scale(100, 100, 0),
        keys([1024, 0, 1, 1], [1025, 0, 1, 1], [3072, 0, 1, 32660], [3073, 34737, 25, 0]),
        text('UTM Zone 60 N with WGS 84|'),
      ),
    );
    expect(grid).toEqual({
      width: 2,
      height: 2,
      cellSize: 100,
      originX: 350_807.4,
      originY: 5_316_081.3,
      epsg: 32660,
    });
    expect(crsName).toBe('WGS 84 / UTM zone 60N');
  });

  it('an area file and a point file of the same ground have the same corner', async () => {
    const more = [3076, 0, 1, 9001];
    const area = tiff(scale(10, 10, 0), tie(0, 0, 0, 473_000, 3_474_000, 0), projected(32617, more));
    const point = tiff(
      scale(10, 10, 0),
      tie(0, 0, 0, 473_005, 3_473_995, 0),
      keys([1024, 0, 1, 1], [1025, 0, 1, 2], [3072, 0, 1, 32617], more),
    );
    const corner = { cellSize: 10, originX: 473_000, originY: 3_474_000 };
    expect((await readRaster(area)).grid).toMatchObject(corner);
    expect((await readRaster(point)).grid).toMatchObject(corner);
  });

  it('a tie point inside the raster counts from its cell', async () => {
    const file = tiff(scale(2, 2, 0), tie(1, 2, 0, 500_002, 5_000_000, 0), projected(32631));
    expect((await readRaster(file)).grid).toMatchObject({
      originX: 500_000,
      originY: 5_000_004,
      cellSize: 2,
    });
  });

  it('a transformation without rotation is taken, with one refused', async () => {
    const straight = [0.5, 0, 0, 412_200, 0, -0.5, 0, 5_301_750, 0, 0, 0, 0, 0, 0, 0, 1];
    expect((await readRaster(tiff(matrix(...straight), projected(32631)))).grid).toMatchObject({
      cellSize: 0.5,
      originX: 412_200,
      originY: 5_301_750,
    });
    expect(await codeOf(tiff(matrix(...straight.with(1, 0.1)), projected(32631)))).toBe('raster-rotated');
    expect(await codeOf(tiff(matrix(...straight.with(0, -0.5)), projected(32631)))).toBe('raster-rotated');
    expect((await readRaster(tiff(matrix(...straight.with(5, 0.5)), projected(32631)))).grid.originY).toBe(
      5_301_751,
    );
    expect(await codeOf(tiff(matrix(...straight.with(5, -0.6)), projected(32631)))).toBe('raster-not-square');
    expect(await codeOf(tiff(matrix(...straight.with(3, NaN)), projected(32631)))).toBe('raster-truncated');
    expect(await codeOf(tiff(scale(1, -1, 0), place[1], projected(32631)))).toBe('raster-rotated');
  });
});

describe('which CRS', () => {
  it.each([
    ['UTM without its unit, as the code is known', projected(32631), 'WGS 84 / UTM zone 31N'],
    ['a code that the register lacks, in metres', projected(32600, [3076, 0, 1, 9001]), 'EPSG:32600'],
    ['a code that the register lacks, without its unit', projected(32600), 'raster-crs'],
    ['a code that the register lacks, in feet', projected(32600, [3076, 0, 1, 9002]), 'raster-crs'],
    ['US survey feet with a code of metres', projected(32631, [3076, 0, 1, 9003]), 'raster-crs'],
    ['the other feet than the code’s', projected(2263, [3076, 0, 1, 9002]), 'raster-crs'],
    ['a geographic code in place of a projected one', projected(4326), 'raster-crs'],
    ['a vertical code', keys([1024, 0, 1, 2], [2048, 0, 1, 5703]), 'raster-crs'],
    ['Mercator of the whole world', projected(3857, [3076, 0, 1, 9001]), 'raster-not-metric'],
    ['a user-defined CRS', projected(32767, [3076, 0, 1, 9001]), 'raster-not-projected'],
    [
      'coordinates that are no degrees',
      keys([1024, 0, 1, 2], [2048, 0, 1, 4326]),
      'raster-not-georeferenced',
    ],
    ['gons', keys([1024, 0, 1, 2], [2048, 0, 1, 4326], [2054, 0, 1, 9105]), 'raster-crs'],
    ['a projected code without a model type', keys([3072, 0, 1, 32631]), 'WGS 84 / UTM zone 31N'],
    ['geocentric', keys([1024, 0, 1, 3]), 'raster-not-projected'],
    ['empty keys', keys(), 'raster-not-georeferenced'],
  ])('%s', async (_, crs, outcome) => {
    expect(await codeOf(tiff(...place, crs))).toBe(outcome);
  });

  it('a unit of its own is taken when it is as long as the code’s', async () => {
    const own = (size: number) => [doubles(size), projected(3765, [3076, 0, 1, 32767], [3077, 34736, 1, 0])];
    expect(await codeOf(tiff(...place, ...own(1)))).toBe('HTRS96 / Croatia TM');
    expect(await codeOf(tiff(...place, ...own(0.3048)))).toBe('raster-crs');
  });

  it('the citation names a code that the register lacks, as one clean line', async () => {
    const file = tiff(
      ...place,
      projected(32600, [3076, 0, 1, 9001], [1026, 34737, 30, 0]),
      text('PCS Name = UTM\n31  N|and more'),
    );
    expect(await codeOf(file)).toBe('UTM 31 N');
  });

  it.each([
    ['WGS_1984_UTM_Zone_31N|', [], 'WGS 84 / UTM zone 31N'],
    ['WGS 84 / UTM zone 31N|', [3], 'WGS 84 / UTM zone 31N'],
    ['PCS Name = NAD_1983_UTM_Zone_17N|', [-81], 'NAD83 / UTM zone 17N'],
    ['WGS 84 / UTM zone 33S|', [15], 'WGS 84 / UTM zone 33S'],
    ['ETRS89 / UTM zone 32N|', [], 'ETRS89 / UTM zone 32N'],
    ['WGS 84 / UTM zone 31N|', [9], 'raster-not-projected'],
    ['NAD83 / UTM zone 17S|', [], 'raster-not-projected'],
    ['WGS 84 / UTM zone 61N|', [], 'raster-not-projected'],
    ['Site grid 31N|', [], 'raster-not-projected'],
  ])('a CRS spelled out as %s with central meridian %s is %s', async (name, meridian, outcome) => {
    const file = tiff(
      ...place,
      projected(32767, [3073, 34737, name.length, 0], ...meridian.map(() => [3080, 34736, 1, 0])),
      text(name),
      ...(meridian.length > 0 ? [doubles(...meridian)] : []),
    );
    expect(await codeOf(file)).toBe(outcome);
  });

  it('no keys at all', async () => {
    expect(await codeOf(tiff(...place))).toBe('raster-not-georeferenced');
  });
});

describe('values', () => {
  const noData = (value: string): TiffField => ({ tag: 42113, type: 'ascii', text: value });
  it.each([
    ['3', 3],
    [' 3 ', 3],
    ['-9999', null],
    ['1.5', null],
    ['nan', null],
    ['', null],
    ['none of these', null],
  ])('no-data tag "%s" on bytes means %s', async (tag, value) => {
    expect((await readRaster(tiff(...place, projected(32631), noData(tag)))).noData).toBe(value);
  });

  it('an infinite value is refused with its place', async () => {
    const values = Float32Array.of(0, 1, -Infinity, 1);
    const file = layOutTiff(
      [
        ...[
          [256, 2],
          [257, 2],
          [258, 32],
          [339, 3],
        ].map(([tag, value]): TiffField => ({ tag, type: 'short', values: [value] })),
        ...place,
        projected(32631),
      ],
      [new Uint8Array(values.buffer)],
      { offsets: 273, byteCounts: 279 },
    );
    await expect(readRaster(file)).rejects.toMatchObject({
      code: 'raster-values',
      found: 'an infinite value in column 1 of row 2',
    });
  });
});
