import { describe, expect, it } from 'vitest';
import { inspectRaster } from '#rasters/describe/inspect-raster.ts';
import { loadFixture } from '#rasters/testing/fixtures.ts';
import { fileOf, gridOf } from '#rasters/testing/rasters.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { alignRaster } from './align-raster.ts';
import { methodsFor } from './methods.ts';
import { planAlignment } from './plan-alignment.ts';
import { coarsenGrid, newGridFor, suggestGrid } from './suggest-grid.ts';

const describeFixture = (name: string) => inspectRaster(loadFixture(name));
const amounts = (grid: Grid) => ({ band: 1, content: 'amounts', grid }) as const;

it('is plain data, and does after a way through JSON what it did before', async () => {
  const bytes = loadFixture('mend-us-feet.tif');
  const description = await inspectRaster(bytes);
  const plan = planAlignment(description, amounts(suggestGrid(description).grid));
  const kept = JSON.parse(JSON.stringify(plan)) as typeof plan;
  expect(kept).toEqual(plan);
  expect((await alignRaster(bytes, kept)).values).toEqual((await alignRaster(bytes, plan)).values);
});

describe('the method', () => {
  const raster = gridOf(12, 12);
  const at = async (grid: Grid, content: 'classes' | 'amounts') =>
    planAlignment(await inspectRaster(fileOf(raster, new Uint8Array(144).fill(1))), {
      band: 1,
      content,
      grid,
    });
  it.each([
    ['the same cells', raster, 'copy', 'copy'],
    ['cells aside by whole ones', { ...raster, originX: raster.originX - 3 }, 'copy', 'copy'],
    ['cells aside by half of one', { ...raster, originX: raster.originX - 0.5 }, 'nearest', 'bilinear'],
    ['finer cells', gridOf(24, 24, { cellSize: 0.5 }), 'nearest', 'bilinear'],
    ['coarser cells', coarsenGrid(raster, 3), 'majority', 'area-weighted'],
    [
      'another zone',
      gridOf(12, 12, { epsg: 32616, originX: 1_043_804, originY: 3_488_128 }),
      'nearest',
      'bilinear',
    ],
  ])('on %s', async (_, grid, classes, other) => {
    expect((await at(grid, 'classes')).method).toBe(classes);
    expect((await at(grid, 'amounts')).method).toBe(other);
  });

  it('can be another, with what is lost by it', async () => {
    const description = await inspectRaster(fileOf(raster, new Uint8Array(144).fill(1)));
    const coarse = coarsenGrid(raster, 3);
    const plan = planAlignment(description, { ...amounts(coarse), method: 'nearest' });
    expect(plan).toMatchObject({ method: 'nearest', usualMethod: 'area-weighted' });
    expect(plan.cautions).toEqual([
      {
        code: 'method',
        text: expect.stringContaining('over about 9 of the raster’s, of which this method looks at one'),
      },
    ]);
    expect(planAlignment(description, amounts(coarse)).cautions).toEqual([]);
  });

  it('must fit what the values are', async () => {
    const description = await inspectRaster(fileOf(raster, new Uint8Array(144).fill(1)));
    expect(methodsFor('classes')).toEqual(['nearest', 'majority']);
    for (const method of ['bilinear', 'area-weighted', 'copy'] as const)
      expect(() => planAlignment(description, { band: 1, content: 'classes', grid: raster, method })).toThrow(
        RangeError,
      );
    expect(() => planAlignment(description, { ...amounts(raster), method: 'majority' })).toThrow(RangeError);
  });
});

describe('what is lost', () => {
  it('is as many cells as the result misses', async () => {
    for (const name of ['mend-degrees.tif', 'mend-other-zone.tif', 'mend-web-mercator.tif']) {
      const bytes = loadFixture(name);
      const description = await inspectRaster(bytes);
      const whole = newGridFor(description, 32631, description.cellMetres.width / 3);
      for (const grid of [
        whole,
        { ...whole, width: Math.ceil(whole.width / 2), originY: whole.originY + 4 * whole.cellSize },
      ]) {
        const plan = planAlignment(description, { ...amounts(grid), method: 'nearest' });
        const { values, noData } = await alignRaster(bytes, plan);
        const missing = [...values].filter((v) => v === noData || Number.isNaN(v)).length;
        const holes = name === 'mend-other-zone.tif' ? 42 * 9 : 2 * 9;
        // Cells on the outline count by their part here and wholly or not at all there.
        const outline = 2 * (grid.width + grid.height);
        expect(Math.abs(plan.padded.cells - missing)).toBeLessThan(0.2 * outline + holes);
        expect(plan.padded.share).toBeCloseTo(plan.padded.cells / (grid.width * grid.height), 12);
        const area = description.width * description.height;
        // What is not cropped lies on the grid.
        const onGrid = (area - plan.cropped.cells) / plan.cellRatio ** 2;
        expect(Math.abs(onGrid - (grid.width * grid.height - plan.padded.cells))).toBeLessThan(
          0.01 * grid.width * grid.height,
        );
      }
    }
  });

  it('is refused when it is everything, with both places', async () => {
    const description = await describeFixture('mend-degrees.tif');
    expect(() => planAlignment(description, amounts(gridOf(10, 10)))).toThrow(
      /around 47.868° N, 1.832° E.*expected one that reaches into the site, around 31.400° N, 81.284° W/,
    );
  });

  it('is said when most of the site stays empty', async () => {
    const description = await describeFixture('mend-other-zone.tif');
    const { cautions, padded } = planAlignment(
      description,
      amounts(gridOf(400, 400, { epsg: 32630, originX: 710_900, originY: 5_691_100 })),
    );
    expect(padded.cells).toBe(160_000 - 120 * 100);
    expect(cautions.map(({ code }) => code)).toEqual(['mostly-outside']);
    expect(cautions[0].text).toContain('only 7.5 % of the site');
  });
});

describe('cautions', () => {
  it('a shift between datums, with what it is worth', async () => {
    const description = await describeFixture('mend-british-grid.tif');
    const plan = planAlignment(description, amounts(newGridFor(description, 32630, 1)));
    expect(plan.reprojection).toMatchObject({
      from: { epsg: 27700 },
      to: { epsg: 32630 },
      datumShift: { accuracy: 2 },
    });
    expect(plan.cautions.map(({ code }) => code)).toEqual(['datum-shift']);
    expect(plan.cautions[0].text).toMatch(
      /Ordnance Survey of Great Britain 1936 to WGS 1984 is good to about 2 m/,
    );
  });

  it('a place where the CRS is not meant to be used', async () => {
    const description = await describeFixture('mend-other-zone.tif');
    expect(planAlignment(description, amounts(suggestGrid(description).grid)).cautions).toEqual([]);
    // 500 km further east lies another zone.
    const far = {
      ...description,
      originX: description.originX + 500_000,
      lonLat: { west: 7, east: 7, south: 51, north: 51 },
    };
    expect(planAlignment(far, amounts(suggestGrid(far).grid)).cautions.map(({ code }) => code)).toEqual([
      'outside-use',
    ]);
  });

  it('cells much finer than the raster’s', async () => {
    const description = await describeFixture('mend-degrees.tif');
    const { cautions } = planAlignment(description, amounts(newGridFor(description, 32631, 5)));
    expect(cautions).toEqual([
      { code: 'finer-than-source', text: expect.stringContaining('9 times narrower') },
    ]);
  });
});

it('a grid that is over a thousand times coarser is refused', async () => {
  const description = await describeFixture('good-uint8.tif');
  expect(() =>
    planAlignment(
      description,
      amounts(gridOf(1, 1, { epsg: 32631, originX: 412_000, originY: 5_302_000, cellSize: 600 })),
    ),
  ).toThrow(/1200 times as wide/);
});

it('a longitude of more than 180° is the same place', async () => {
  const description = await describeFixture('mend-degrees.tif');
  const turned = { ...description, originX: description.originX + 360 };
  const { grid } = suggestGrid(description);
  expect(suggestGrid(turned).grid).toEqual(grid);
  expect(planAlignment(turned, amounts(grid))).toEqual(planAlignment(description, amounts(grid)));
});
