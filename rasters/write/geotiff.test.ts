import { execFileSync } from 'node:child_process';
import { mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { fromArrayBuffer } from 'geotiff';
import { afterAll, describe, expect, it } from 'vitest';
import type { Grid } from '#sim-core/grid/grid.ts';
import { readRaster } from '#rasters/read/read-raster.ts';
import type { CellValues } from '#sim-core/grid/ground.ts';
import { encodeGeoTiff } from './geotiff.ts';

const grid: Grid = {
  width: 301,
  height: 263,
  cellSize: 0.5,
  originX: 412_200,
  originY: 5_301_750,
  epsg: 32631,
};
const cells = grid.width * grid.height;
const content = {
  uint8: Uint8Array.from({ length: cells }, (_, i) => (i * 7) % 251),
  int16: Int16Array.from({ length: cells }, (_, i) => (i % 7 === 0 ? -32_768 : 2027 + (i % 33))),
  uint16: Uint16Array.from({ length: cells }, (_, i) => (i * 31) & 0xffff),
  float32: Float32Array.from({ length: cells }, (_, i) => (i % 11 === 0 ? NaN : Math.sin(i) / 2 + 0.5)),
  int8: Int8Array.from({ length: cells }, (_, i) => (i % 251) - 125),
  int32: Int32Array.from({ length: cells }, (_, i) => (i % 7 === 0 ? -2_147_483_648 : i * 25_000 - 9)),
  uint32: Uint32Array.from({ length: cells }, (_, i) => i * 50_000),
  float64: Float64Array.from({ length: cells }, (_, i) => (i % 11 === 0 ? NaN : Math.sin(i) * 1e7)),
} satisfies Record<string, CellValues>;
const noData = {
  uint8: 255,
  int16: -32_768,
  uint16: undefined,
  float32: NaN,
  int8: -125,
  int32: -2_147_483_648,
  uint32: undefined,
  float64: NaN,
};
/** GDAL before 3.7 knows signed bytes by a note beside the type alone. */
const gdalTypes: Record<keyof typeof content, string[]> = {
  uint8: ['Byte'],
  int8: ['Int8', 'Byte'],
  uint16: ['UInt16'],
  int16: ['Int16'],
  uint32: ['UInt32'],
  int32: ['Int32'],
  float32: ['Float32'],
  float64: ['Float64'],
};
const cases = (['strips', 'tiles'] as const).flatMap((blocks) =>
  (Object.keys(content) as (keyof typeof content)[]).map((type) => ({ blocks, type })),
);
const same = (a: ArrayBufferView, b: ArrayBufferView): boolean =>
  Buffer.compare(
    Buffer.from(a.buffer, a.byteOffset, a.byteLength),
    Buffer.from(b.buffer, b.byteOffset, b.byteLength),
  ) === 0;

describe.each(cases)('$type in $blocks', ({ blocks, type }) => {
  const file = encodeGeoTiff(
    {
      grid,
      values: content[type],
      noData: noData[type],
      crsName: 'WGS 84 / UTM zone 31N',
      bandName: 'cover <1>',
    },
    { blocks },
  );

  it('is read back as it was', async () => {
    const raster = await readRaster(file);
    expect(raster).toMatchObject({ grid, crsName: 'WGS 84 / UTM zone 31N', dataType: type });
    expect(raster.noData).toBe(Number.isNaN(noData[type]) ? null : (noData[type] ?? null));
    expect(same(raster.values, content[type])).toBe(true);
  });

  it('is read alike by geotiff.js', async () => {
    const image = await (await fromArrayBuffer(file.buffer as ArrayBuffer)).getImage();
    const [band] = (await image.readRasters()) as unknown as CellValues[];
    expect(band.constructor).toBe(content[type].constructor);
    expect(same(band, content[type])).toBe(true);
    expect(image.getOrigin().slice(0, 2)).toEqual([412_200, 5_301_750]);
    expect(image.getResolution().slice(0, 2)).toEqual([0.5, -0.5]);
    expect(image.getGeoKeys()).toMatchObject({
      GTModelTypeGeoKey: 1,
      GTRasterTypeGeoKey: 1,
      ProjectedCSTypeGeoKey: 32631,
      ProjLinearUnitsGeoKey: 9001,
    });
  });
});

it('refuses values that are not one a cell', () => {
  expect(() => encodeGeoTiff({ grid, values: new Uint8Array(3) })).toThrow(/3 values for 301 × 263/);
});

const gdal = (() => {
  try {
    return execFileSync('gdalinfo', ['--version'], { encoding: 'utf8' });
  } catch {
    return undefined;
  }
})();

describe.skipIf(!gdal)('GDAL (skipped where gdalinfo is not installed)', () => {
  const folder = mkdtempSync(join(tmpdir(), 'foothold-write-'));
  afterAll(() => rmSync(folder, { recursive: true }));

  it.each(cases)(
    'reads $type in $blocks with the right place, CRS, no-data and values',
    ({ blocks, type }) => {
      const path = join(folder, `${type}-${blocks}.tif`);
      const facts = { origin: 'invented & "marked" so' };
      writeFileSync(
        path,
        encodeGeoTiff(
          { grid, values: content[type], noData: noData[type], bandName: 'cover <1>', unit: 'share', facts },
          { blocks },
        ),
      );
      const info = JSON.parse(
        // gdalinfo writes a bare NaN, which is no JSON.
        execFileSync('gdalinfo', ['-json', path], { encoding: 'utf8' }).replace(/:\s*NaN/g, ':"NaN"'),
      );
      expect(info.size).toEqual([301, 263]);
      expect(info.geoTransform).toEqual([412_200, 0.5, 0, 5_301_750, 0, -0.5]);
      expect(info.coordinateSystem.wkt).toContain('WGS 84 / UTM zone 31N');
      expect(info.metadata[''].origin).toBe('invented & "marked" so');
      expect(info.metadata[''].AREA_OR_POINT).toBe('Area');
      expect(info.metadata.IMAGE_STRUCTURE.COMPRESSION).toBe('DEFLATE');
      const [band] = info.bands;
      expect(band.block).toEqual(
        blocks === 'tiles'
          ? [256, 256]
          : [301, Math.floor(65_536 / 301 / content[type].BYTES_PER_ELEMENT)].map((n, i) =>
              i ? Math.min(n, 263) : n,
            ),
      );
      expect(gdalTypes[type]).toContain(band.type);
      expect(band.description).toBe('cover <1>');
      expect(band.unit).toBe('share');
      expect(band.noDataValue).toEqual(Number.isNaN(noData[type]) ? 'NaN' : noData[type]);
      // ENVI is a flat file of the values in this machine's order.
      const flat = join(folder, `${type}-${blocks}.img`);
      execFileSync('gdal_translate', ['-q', '-of', 'ENVI', path, flat]);
      expect(same(readFileSync(flat), content[type])).toBe(true);
    },
  );
});
