import { open } from 'node:fs/promises';
import { fromArrayBuffer } from 'geotiff';
import { describe, expect, it } from 'vitest';
import type { CellValues } from '#sim-core/grid/ground.ts';
import {
  expected,
  fixtureNames,
  fixtures,
  loadFixture as load,
  northUp,
  typeNames,
} from '#rasters/testing/fixtures.ts';
import { RasterError, type RasterErrorCode } from './raster-error.ts';
import { readRaster } from './read-raster.ts';

const good = fixtureNames('good-');
const plain = (values: CellValues) => Array.from(values, (v) => (Number.isNaN(v) ? null : v));

it('has expectations for every file that is to be read', () => {
  expect([...good, ...fixtureNames('mend-')].sort()).toEqual(Object.keys(expected).sort());
});

describe.each(good)('%s', (name) => {
  const { size, geoTransform, type, noData, epsg, every } = expected[name];
  const values = northUp(expected[name].values, expected[name]);
  const kept = (all: CellValues) => plain(all).filter((_, i) => i % every === 0);

  it('is read as GDAL reads it', async () => {
    const raster = await readRaster(load(name));
    expect(raster.dataType).toBe(typeNames[type]);
    expect(raster.noData).toBe(noData);
    expect(kept(raster.values)).toEqual(values);
    const { width, height, cellSize, originX, originY } = raster.grid;
    expect([width, height]).toEqual(size);
    const southUp = geoTransform[5] > 0;
    expect([originX, originY - (southUp ? height * cellSize : 0)]).toEqual([
      geoTransform[0],
      geoTransform[3],
    ]);
    expect(cellSize).toBeCloseTo(geoTransform[1], 12);
    expect(cellSize).toBeCloseTo(Math.abs(geoTransform[5]), 12);
    expect(raster.grid.epsg).toBe(epsg);
    expect(raster.crsName).toBe('WGS 84 / UTM zone 31N');
  });

  it('is read alike through a file that gives pieces', async () => {
    const file = await open(new URL(name, fixtures));
    try {
      const { size: length } = await file.stat();
      const read = async (offset: number, count: number) => {
        const { buffer, bytesRead } = await file.read(Buffer.alloc(count), 0, count, offset);
        return buffer.subarray(0, bytesRead);
      };
      const raster = await readRaster({ size: length, read });
      expect(kept(raster.values)).toEqual(values);
    } finally {
      await file.close();
    }
  });

  it('leaves the bytes it was given alone', async () => {
    const bytes = load(name);
    await readRaster(bytes);
    expect(Buffer.compare(bytes, load(name))).toBe(0);
  });
});

/** Files that geotiff.js itself misreads; GDAL is right there. */
const misread = new Set([
  // It leaves the rows as they are, which is no error.
  'good-south-up.tif',
  'good-south-up-strips.tif',
  // It differences 16-bit cells in this machine's order.
  'good-big-endian-predictor2.tif',
  // It leaves out LERC's mask, which holds NaN, and takes the header for cells where 8-bit cells were kept raw.
  'good-lerc-nan.tif',
  'good-lerc-raw.tif',
]);
it.each(good.filter((name) => !misread.has(name)))('%s: geotiff.js agrees', async (name) => {
  const bytes = load(name);
  const image = await (
    await fromArrayBuffer(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.length))
  ).getImage();
  const [band] = (await image.readRasters()) as unknown as CellValues[];
  expect(plain((await readRaster(load(name))).values)).toEqual(plain(band));
});

const refusals: [name: string, code: RasterErrorCode, found: RegExp, remedy: RegExp][] = [
  ['bad-png.tif', 'not-a-geotiff', /a PNG picture/, /gdal_translate -of GTiff/],
  ['expected.json', 'not-a-geotiff', /no TIFF/, /gdal_translate -of GTiff/],
  ['bad-truncated.tif', 'raster-truncated', /strip or tile 1 of 1 .* in a file of 420 bytes/, /again/],
  ['bad-huge.tif', 'raster-too-large', /100000 × 100000 cells/, /Clip|larger cells/],
  ['bad-no-georeference.tif', 'raster-not-georeferenced', /no georeference/, /-a_ullr/],
  ['bad-no-crs.tif', 'raster-not-georeferenced', /no coordinate reference system/, /-a_srs/],
  ['bad-control-points.tif', 'raster-not-georeferenced', /4 ground control points/, /gdalwarp/],
  ['mend-degrees.tif', 'raster-not-projected', /degrees .*WGS 84/, /gdalwarp -t_srs/],
  ['bad-no-degrees.tif', 'raster-not-georeferenced', /412202.25, 5301748.25, .* outside WGS 84/, /-a_srs/],
  ['bad-axes.tif', 'raster-crs', /do not run east and north/, /gdalwarp -t_srs/],
  ['bad-no-epsg.tif', 'raster-not-projected', /without an EPSG code/, /-a_srs EPSG/],
  ['mend-us-feet.tif', 'raster-not-metric', /US survey feet/, /gdalwarp -t_srs/],
  ['mend-web-mercator.tif', 'raster-not-metric', /EPSG:3857, whose metres are 0.73 m/, /gdalwarp -t_srs/],
  ['mend-not-square.tif', 'raster-not-square', /1 × 0.5 m/, /gdalwarp -tr/],
  ['bad-rotated.tif', 'raster-rotated', /rotated/, /gdalwarp/],
  ['mend-five-bands.tif', 'raster-bands', /5 bands/, /gdal_translate -b 1/],
  ['bad-two-pictures.tif', 'raster-bands', /2 pictures/, /GTIFF_DIR/],
  ['bad-mask.tif', 'raster-bands', /mask/, /-dstnodata/],
  ['bad-complex.tif', 'raster-type', /complex/, /-ot Float32/],
  ['bad-four-bits.tif', 'raster-type', /4 bits/, /-ot/],
  ['bad-jpeg.tif', 'raster-type', /JPEG compression/, /COMPRESS=DEFLATE/],
  ['bad-empty.tif', 'raster-empty', /no cell with a value/, /gdalinfo/],
];

describe('refused', () => {
  it.each(refusals)('%s: %s', async (name, code, found, remedy) => {
    const error: unknown = await readRaster(load(name)).catch((e: unknown) => e);
    expect(error).toBeInstanceOf(RasterError);
    expect(error).toMatchObject({ code });
    expect((error as RasterError).found).toMatch(found);
    expect((error as RasterError).remedy).toMatch(remedy);
    expect((error as RasterError).message).toContain('expected');
  });

  it('every bad file', () => {
    const tried = new Set(refusals.map(([name]) => name));
    expect(fixtureNames('bad-').filter((name) => !tried.has(name))).toEqual([]);
  });
});
