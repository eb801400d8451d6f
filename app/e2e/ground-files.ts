import { encodeGeoTiff } from '#rasters/write/geotiff.ts';
import type { Grid } from '#sim-core/grid/grid.ts';

/** An invented site of 800 × 880 m that holds the ground of the fixture in degrees. */
const grid: Grid = {
  width: 160,
  height: 176,
  cellSize: 5,
  originX: 412_200,
  originY: 5_302_600,
  epsg: 32631,
};

function file(name: string, valueAt: (column: number, row: number) => number, whole = false) {
  const { width, height } = grid;
  const at = (_: unknown, i: number) => valueAt(i % width, Math.floor(i / width));
  const values = whole
    ? Uint8Array.from({ length: width * height }, at)
    : Float32Array.from({ length: width * height }, at);
  return { name, mimeType: 'image/tiff', buffer: Buffer.from(encodeGeoTiff({ grid, values })) };
}

/** Rasters of the journey's site, as they are dropped: a creek of class 1 runs through class 2; heights rise eastward. */
export const groundFiles = {
  habitat: file('habitat.tif', (column) => (column >= 70 && column < 80 ? 1 : 2), true),
  cover: file('cover.tif', (column, row) => (row < 40 && column < 60 ? 0.6 : 0)),
  resurvey: file('cover-resurvey.tif', (column, row) => (row < 20 && column < 60 ? 0.4 : 0)),
  elevation: file('elevation.tif', (column) => column / 100),
};
