import { describe, expect, it } from 'vitest';
import { inspectRaster } from '#rasters/describe/inspect-raster.ts';
import type { RasterDescription } from '#rasters/describe/raster-description.ts';
import { loadFixture } from '#rasters/testing/fixtures.ts';
import { gridOf } from '#rasters/testing/rasters.ts';
import { cellMaps } from './cell-map.ts';
import { coarsenGrid, newGridFor, suggestGrid } from './suggest-grid.ts';

const describeFixture = (name: string) => inspectRaster(loadFixture(name));

describe('the grid for a site’s first raster', () => {
  it('is the raster’s own where its cells are square and in metres', async () => {
    const { grid, asInFile, reasons } = suggestGrid(await describeFixture('good-south-up.tif'));
    expect(grid).toEqual({
      width: 9,
      height: 7,
      cellSize: 0.5,
      originX: 412_200,
      originY: 5_301_750,
      epsg: 32631,
    });
    expect([asInFile, reasons]).toEqual([true, []]);
  });

  it('has square cells at the finer side', async () => {
    const { grid, asInFile, reasons } = suggestGrid(await describeFixture('mend-not-square.tif'));
    expect(grid).toMatchObject({ width: 18, height: 7, cellSize: 0.5, originX: 412_200, epsg: 32631 });
    expect(asInFile).toBe(false);
    expect(reasons).toEqual(['Its cells are 1 × 0.5 m, and the site’s must be square.']);
  });

  it.each([
    ['mend-degrees.tif', 32631, 37.4, ['It is in degrees (WGS 84)', 'Its cells are 37.41 × 55.59 m']],
    ['mend-us-feet.tif', 26918, 0.61, ['It is in US survey feet (NAD83 / New York Long Island (ftUS))']],
    ['mend-feet.tif', 26912, 0.914, ['It is in feet (NAD83 / Arizona East (ft))']],
    ['mend-web-mercator.tif', 32631, 0.366, ['Its metres are not those on the ground here']],
  ])('%s: cells of its size in the fitting UTM zone', async (name, epsg, cellSize, reasons) => {
    const description = await describeFixture(name);
    const suggested = suggestGrid(description);
    expect(suggested).toMatchObject({
      grid: { epsg, cellSize },
      crs: { epsg, unit: 'metre' },
      asInFile: false,
    });
    expect(suggested.reasons).toHaveLength(reasons.length);
    reasons.forEach((start, i) => expect(suggested.reasons[i].startsWith(start)).toBe(true));
    holds(description, suggested.grid);
    // Snapped to multiples of the cell size, in both directions.
    for (const corner of [suggested.grid.originX, suggested.grid.originY])
      expect(Math.abs(corner / cellSize - Math.round(corner / cellSize))).toBeLessThan(1e-6);
  });

  it('stays in a national grid in metres', async () => {
    const { grid, asInFile } = suggestGrid(await describeFixture('mend-british-grid.tif'));
    expect(grid).toMatchObject({ epsg: 27700, cellSize: 1, originX: 530_000, originY: 180_000 });
    expect(asInFile).toBe(true);
  });

  it('is refused where nothing can be transformed', async () => {
    const description = { ...(await describeFixture('mend-degrees.tif')), lonLat: null };
    expect(() => suggestGrid(description)).toThrow(/from which nothing can be transformed/);
  });
});

/** All corners of the raster lie on the grid, and no row or column of it lies wholly beside. */
function holds(description: RasterDescription, grid: ReturnType<typeof gridOf>): void {
  const { toGrid } = cellMaps(description, grid);
  const { width, height } = description;
  const xs: number[] = [];
  const ys: number[] = [];
  const point = [0, 0];
  for (let i = 0; i <= 40; i++)
    for (const [x, y] of [
      [(i / 40) * width, 0],
      [(i / 40) * width, height],
      [0, (i / 40) * height],
      [width, (i / 40) * height],
    ]) {
      toGrid(x, y, point);
      xs.push(point[0]);
      ys.push(point[1]);
    }
  const slack = 1e-3;
  expect(Math.min(...xs, ...ys)).toBeGreaterThan(-slack);
  expect(Math.max(...xs)).toBeLessThan(grid.width + slack);
  expect(Math.max(...ys)).toBeLessThan(grid.height + slack);
  expect([Math.min(...xs) < 1, Math.min(...ys) < 1]).toEqual([true, true]);
  expect([Math.max(...xs) > grid.width - 1, Math.max(...ys) > grid.height - 1]).toEqual([true, true]);
}

describe('a grid in a CRS of one’s choice', () => {
  it('holds the raster', async () => {
    const description = await describeFixture('mend-other-zone.tif');
    for (const [epsg, cellSize] of [
      [32630, 2],
      [32630, 3.3],
      [32631, 2],
      [32631, 7],
      [3035, 5],
    ]) {
      const grid = newGridFor(description, epsg, cellSize);
      expect(grid).toMatchObject({ epsg, cellSize });
      holds(description, grid);
    }
    expect(newGridFor(description, 32630, 2)).toMatchObject({ width: 60, height: 50, originX: 711_000 });
  });

  it('is refused where it is not in metres', async () => {
    const description = await describeFixture('mend-other-zone.tif');
    for (const epsg of [4326, 2263, 99_999])
      expect(() => newGridFor(description, epsg, 1)).toThrow(/expected a projected CRS in metres/);
  });
});

describe('larger cells', () => {
  const grid = gridOf(10, 7, { cellSize: 0.1 });
  it.each([
    [0.1, 10, 7],
    [0.2, 5, 4],
    [0.3, 4, 3],
    [0.7, 2, 1],
    [5, 1, 1],
  ])('of %s m: %s × %s', (cellSize, width, height) => {
    expect(coarsenGrid(grid, cellSize)).toEqual({ ...grid, cellSize, width, height });
  });

  it('are never smaller', () => {
    expect(() => coarsenGrid(grid, 0.05)).toThrow(RangeError);
    expect(() => coarsenGrid(grid, NaN)).toThrow(RangeError);
  });
});
