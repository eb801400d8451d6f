import { readdirSync, readFileSync } from 'node:fs';
import type { Grid } from '#sim-core/grid/grid.ts';

export const fixtures = new URL('../fixtures/', import.meta.url);

/** The bytes of a fixture, in a buffer of its own. */
export const loadFixture = (name: string): Uint8Array<ArrayBuffer> =>
  new Uint8Array(readFileSync(new URL(name, fixtures)));

/** Names of the fixtures whose name begins so: `good-`, `mend-` or `bad-`. */
export const fixtureNames = (start: string): string[] =>
  readdirSync(fixtures).filter((name) => name.startsWith(start) && name.endsWith('.tif'));

/** What GDAL reads from a fixture. */
export interface Expected {
  size: [number, number];
  geoTransform: [number, number, number, number, number, number];
  epsg: number;
  type: string;
  noData: number | null;
  /** of a large raster, which cells are kept: every one, or every so many */
  every: number;
  /** as stored, rows in the order of the file; null for NaN */
  values: (number | null)[];
  /** mend-* alone: what is said of each band */
  facts?: { scale: number; offset: number; unit: string | null; name: string | null; alpha: boolean }[];
  /** mend-* alone: values of the second band and those after it */
  others?: (number | null)[][];
}
export const expected = JSON.parse(readFileSync(new URL('expected.json', fixtures), 'utf8')) as Record<
  string,
  Expected
>;

/** What gdalwarp makes of a fixture on a grid; null for no data. */
export interface Warped {
  source: string;
  method: 'near' | 'bilinear' | 'average' | 'mode';
  grid: Grid;
  values: (number | null)[];
}
export const warped = JSON.parse(readFileSync(new URL('warped.json', fixtures), 'utf8')) as Record<
  string,
  Warped
>;

/** GDAL's names of number types, as ours. */
export const typeNames: Readonly<Record<string, string>> = {
  Byte: 'uint8',
  Int8: 'int8',
  Int16: 'int16',
  UInt16: 'uint16',
  Int32: 'int32',
  UInt32: 'uint32',
  Float32: 'float32',
  Float64: 'float64',
};

/** Rows from the north, for values in the order of a file whose first row may lie in the south. */
export function northUp<T>(values: readonly T[], { size: [width, height], geoTransform }: Expected): T[] {
  if (geoTransform[5] < 0) return [...values];
  return Array.from({ length: height }, (_, row) =>
    values.slice((height - 1 - row) * width, (height - row) * width),
  ).flat();
}
