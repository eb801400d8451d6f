import { readdirSync, readFileSync } from 'node:fs';
import { open } from 'node:fs/promises';
import { fromArrayBuffer } from 'geotiff';
import { describe, expect, it } from 'vitest';
import type { CellValues } from '#sim-core/grid/ground.ts';
import { RasterError, type RasterErrorCode } from './raster-error.ts';
import { readRaster } from './read-raster.ts';

const folder = new URL('../fixtures/', import.meta.url);
const load = (name: string) => readFileSync(new URL(name, folder));
interface Expected {
  size: [number, number];
  geoTransform: [number, number, number, number, number, number];
  type: string;
  noData: number | null;
  values: (number | null)[];
}
const expected = JSON.parse(load('expected.json').toString()) as Record<string, Expected>;
const good = Object.keys(expected);
const typeNames: Record<string, string> = {
  Byte: 'uint8',
  Int16: 'int16',
  UInt16: 'uint16',
  Int32: 'int32',
  UInt32: 'uint32',
  Float32: 'float32',
  Float64: 'float64',
};
const plain = (values: CellValues) => Array.from(values, (v) => (Number.isNaN(v) ? null : v));

it('has expectations for every good file', () => {
  expect(readdirSync(folder).filter((name) => name.startsWith('good-'))).toEqual([...good].sort());
});

describe.each(good)('%s', (name) => {
  const { size, geoTransform, type, noData, values } = expected[name];

  it('is read as GDAL reads it', async () => {
    const raster = await readRaster(load(name));
    expect(raster.dataType).toBe(typeNames[type]);
    expect(raster.noData).toBe(noData);
    expect(plain(raster.values)).toEqual(values);
    const { width, height, cellSize, originX, originY, epsg } = raster.grid;
    expect([width, height]).toEqual(size);
    expect([originX, cellSize, 0, originY, 0, -cellSize]).toEqual(geoTransform);
    expect(epsg).toBe(32631);
    expect(raster.crsName).toBe('WGS 84 / UTM zone 31N');
  });

  it('is read alike through a file that gives pieces', async () => {
    const file = await open(new URL(name, folder));
    try {
      const { size: length } = await file.stat();
      const read = async (offset: number, count: number) => {
        const { buffer, bytesRead } = await file.read(Buffer.alloc(count), 0, count, offset);
        return buffer.subarray(0, bytesRead);
      };
      const raster = await readRaster({ size: length, read });
      expect(plain(raster.values)).toEqual(values);
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
  ['bad-degrees.tif', 'raster-not-projected', /degrees .*WGS 84/, /gdalwarp -t_srs/],
  ['bad-no-epsg.tif', 'raster-not-projected', /without an EPSG code/, /-a_srs EPSG/],
  ['bad-us-feet.tif', 'raster-not-metric', /US survey feet/, /gdalwarp -t_srs/],
  ['bad-web-mercator.tif', 'raster-not-metric', /EPSG:3857, whose metres are 0.73 m/, /gdalwarp -t_srs/],
  ['bad-not-square.tif', 'raster-not-square', /1 × 0.5 m/, /gdalwarp -tr/],
  ['bad-rotated.tif', 'raster-rotated', /rotated/, /gdalwarp/],
  ['bad-five-bands.tif', 'raster-bands', /5 bands/, /gdal_translate -b 1/],
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
    expect(readdirSync(folder).filter((name) => name.startsWith('bad-') && !tried.has(name))).toEqual([]);
  });
});
