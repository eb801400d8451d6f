import { describe, expect, it } from 'vitest';
import { inspectRaster } from '#rasters/describe/inspect-raster.ts';
import { expected, loadFixture, northUp } from '#rasters/testing/fixtures.ts';
import { fileOf, gridOf } from '#rasters/testing/rasters.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import type { CellValues } from '#sim-core/grid/ground.ts';
import { alignRaster } from './align-raster.ts';
import type { RasterContent, ResamplingMethod } from './alignment-plan.ts';
import { planAlignment } from './plan-alignment.ts';
import { coarsenGrid, ownGrid } from './suggest-grid.ts';

interface Wish {
  content?: RasterContent;
  method?: ResamplingMethod;
  band?: number;
}
async function align(file: Uint8Array, grid: Grid, { content = 'amounts', method, band = 1 }: Wish = {}) {
  const plan = planAlignment(await inspectRaster(file), { band, content, grid, method });
  return { plan, ...(await alignRaster(file, plan)) };
}
const lists = ({ values, grid }: { values: ArrayLike<number>; grid: Grid }) =>
  Array.from({ length: grid.height }, (_, row) =>
    Array.from({ length: grid.width }, (_, column) => {
      const value = values[row * grid.width + column];
      return Number.isNaN(value) ? null : value;
    }),
  );
const floats = (...values: (number | null)[]) => Float32Array.from(values, (v) => v ?? NaN);

// Worked by hand from the definitions; gdalwarp 3.6.2 gives the same.
describe('by hand', () => {
  const oneToSixteen = fileOf(gridOf(4, 4), floats(...Array.from({ length: 16 }, (_, i) => i + 1)));
  const four = fileOf(gridOf(2, 2, { cellSize: 2 }), floats(0, 10, 20, 30));
  const fine = gridOf(4, 4);

  it('area-weighted to cells twice as wide', async () => {
    const raster = await align(oneToSixteen, coarsenGrid(fine, 2));
    expect(raster.plan).toMatchObject({ method: 'area-weighted', cellRatio: 2, cropped: { cells: 0 } });
    expect(lists(raster)).toEqual([
      [3.5, 5.5],
      [11.5, 13.5],
    ]);
  });

  it('bilinear to cells half as wide: on centres, with the outermost values kept to the edge', async () => {
    const raster = await align(four, fine);
    expect(raster.plan).toMatchObject({ method: 'bilinear', cellRatio: 0.5 });
    expect(lists(raster)).toEqual([
      [0, 2.5, 7.5, 10],
      [5, 7.5, 12.5, 15],
      [15, 17.5, 22.5, 25],
      [20, 22.5, 27.5, 30],
    ]);
  });

  it('nearest repeats', async () => {
    const raster = await align(four, fine, { method: 'nearest' });
    expect(lists(raster)).toEqual([
      [0, 0, 10, 10],
      [0, 0, 10, 10],
      [20, 20, 30, 30],
      [20, 20, 30, 30],
    ]);
  });

  it('bilinear on cells a quarter aside', async () => {
    const aside = gridOf(3, 3, { originX: 473_000.25, originY: 3_474_000 - 0.75 });
    const raster = await align(oneToSixteen, aside);
    expect(lists(raster)).toEqual([
      [4.25, 5.25, 6.25],
      [8.25, 9.25, 10.25],
      [12.25, 13.25, 14.25],
    ]);
  });

  it('nearest takes the eastern and southern of two that are as near, whatever the decimals', async () => {
    const tenths = gridOf(60, 3, { cellSize: 0.1 });
    const columns = Uint8Array.from({ length: 180 }, (_, i) => i % 60);
    const aside = { ...tenths, width: 59, originX: 473_000.05 };
    const raster = await align(fileOf(tenths, columns), aside, { method: 'nearest' });
    expect(lists(raster)[1]).toEqual(Array.from({ length: 59 }, (_, i) => i + 1));
  });

  it('majority', async () => {
    const classes = Uint8Array.of(1, 1, 2, 2, 1, 3, 2, 2, 0, 0, 5, 5, 0, 4, 5, 6);
    const raster = await align(fileOf(fine, classes), coarsenGrid(fine, 2), { content: 'classes' });
    expect(raster.plan.method).toBe('majority');
    expect(lists(raster)).toEqual([
      [1, 2],
      [0, 5],
    ]);
    expect(raster).toMatchObject({ dataType: 'uint8', noData: null });
  });

  it('a mean leaves out what is missing, and is missing where half of the ground is not known', async () => {
    const half = fileOf(fine, floats(1, null, 1, null, 3, 5, null, null, 1, 2, null, 7, 3, 4, null, 9));
    expect(lists(await align(half, coarsenGrid(fine, 2)))).toEqual([
      [3, null],
      [2.5, 8],
    ]);
  });

  it('of classes with as much ground the one at the centre wins', async () => {
    const classes = Uint8Array.of(2, 2, 7, 7);
    const raster = await align(fileOf(gridOf(2, 2), classes), coarsenGrid(gridOf(2, 2), 2), {
      content: 'classes',
    });
    expect(lists(raster)).toEqual([[7]]);
  });
});

describe('cells that lie on the grid’s lattice are copied', () => {
  const grid = gridOf(9, 7);
  const values = Int16Array.from({ length: 63 }, (_, i) => (i % 5 === 0 ? -32_768 : i));
  const file = fileOf(grid, values, -32_768);

  it('untouched when they are the very same', async () => {
    const raster = await align(file, grid);
    expect(raster.plan).toMatchObject({
      sameCells: true,
      method: 'copy',
      usualMethod: 'copy',
      scaling: null,
    });
    expect(raster).toMatchObject({ dataType: 'int16', noData: -32_768, crsName: 'WGS 84 / UTM zone 17N' });
    expect(raster.values).toEqual(values);
  });

  it('untouched down to the bits of NaN and of zero', async () => {
    const bits = Uint32Array.of(0x7fc00001, 0x80000000, 0x3f800000, 0xff800001);
    const odd = gridOf(2, 2);
    const raster = await align(fileOf(odd, new Float32Array(bits.buffer.slice(0))), odd);
    expect([...new Uint32Array(raster.values.buffer)]).toEqual([...bits]);
  });

  it('cropped and padded when they lie aside by whole cells', async () => {
    const aside = gridOf(6, 9, { originX: 473_000 - 2, originY: 3_474_000 + 3 });
    const raster = await align(file, aside);
    expect(raster.plan).toMatchObject({
      sameCells: false,
      method: 'copy',
      cropped: { cells: 63 - 4 * 6 },
      padded: { cells: 54 - 4 * 6, share: 30 / 54 },
    });
    const wanted = Array.from({ length: 9 }, (_, row) =>
      Array.from({ length: 6 }, (_, column) =>
        row < 3 || column < 2 ? -32_768 : values[(row - 3) * 9 + column - 2],
      ),
    );
    expect(lists(raster)).toEqual(wanted);
  });

  it('in all the ways a window can lie on a raster', async () => {
    const bytes = Uint8Array.from({ length: 63 }, (_, i) => i + 1);
    const whole = fileOf(grid, bytes);
    for (const [width, height] of [
      [3, 2],
      [20, 16],
    ])
      for (let dx = -4; dx <= 10; dx += 2)
        for (let dy = -4; dy <= 8; dy += 3) {
          const window = gridOf(width, height, { originX: 473_000 + dx, originY: 3_474_000 - dy });
          const outside = dx >= 9 || dy >= 7 || dx + width <= 0 || dy + height <= 0;
          if (outside) {
            await expect(align(whole, window)).rejects.toMatchObject({ code: 'raster-elsewhere' });
            continue;
          }
          const raster = await align(whole, window);
          const wanted = Array.from({ length: height }, (_, row) =>
            Array.from({ length: width }, (_, column) => {
              const [x, y] = [column + dx, row + dy];
              return x < 0 || y < 0 || x >= 9 || y >= 7 ? raster.noData : bytes[y * 9 + x];
            }),
          );
          expect(lists(raster)).toEqual(wanted);
          expect(raster.plan.padded.cells).toBe(wanted.flat().filter((v) => v === raster.noData).length);
          expect(raster.dataType).toBe(raster.plan.padded.cells > 0 ? 'int16' : 'uint8');
        }
  });
});

it.each(['good-south-up.tif', 'good-south-up-strips.tif'])(
  '%s: windows are copied from where they lie',
  async (name) => {
    const file = loadFixture(name);
    const values = northUp(expected[name].values, expected[name]);
    for (const [dx, dy, width, height] of [
      [0, 0, 4, 3],
      [3, 2, 4, 3],
      [5, 4, 4, 3],
      [2, 3, 9, 7],
      [-2, -3, 9, 7],
    ]) {
      const { originX, originY, epsg } = ownGrid(await inspectRaster(file));
      const grid = {
        width,
        height,
        cellSize: 0.5,
        originX: originX + dx / 2,
        originY: originY - dy / 2,
        epsg,
      };
      const raster = await align(file, grid);
      expect(lists(raster)).toEqual(
        Array.from({ length: height }, (_, row) =>
          Array.from({ length: width }, (_, column) => {
            const [x, y] = [column + dx, row + dy];
            return x < 0 || y < 0 || x >= 9 || y >= 7 ? raster.noData : values[y * 9 + x];
          }),
        ),
      );
    }
  },
);

describe('what the values become', () => {
  const grid = gridOf(4, 4);
  const far = { ...grid, width: 6 };
  const ones = (type: { new (n: number): CellValues }) => fileOf(grid, new type(16).fill(1));

  it.each([
    ['classes', 'majority', 'uint8'],
    ['classes', 'nearest', 'uint8'],
    ['amounts', 'area-weighted', 'float32'],
    ['amounts', 'bilinear', 'float32'],
    ['amounts', 'nearest', 'uint8'],
  ] as const)('%s by %s become %s', async (content, method, dataType) => {
    const raster = await align(ones(Uint8Array), coarsenGrid(grid, 2), { content, method });
    expect(raster).toMatchObject({ dataType, noData: null });
    expect([...raster.values]).toEqual([1, 1, 1, 1]);
  });

  it.each([
    [Uint8Array, 'int16', -32_768],
    [Uint16Array, 'int32', -2_147_483_648],
    [Int16Array, 'int32', -2_147_483_648],
    [Float32Array, 'float32', null],
  ] as const)('a missing cell among %O that name no such value', async (type, dataType, noData) => {
    const raster = await align(ones(type), far, { content: 'classes' });
    expect(raster).toMatchObject({ dataType, noData });
    expect([...raster.values.subarray(0, 6)]).toEqual([1, 1, 1, 1, noData ?? NaN, noData ?? NaN]);
  });

  it('scale and offset are applied, also where cells are the same', async () => {
    const file = loadFixture('mend-scale.tif');
    const { values } = expected['mend-scale.tif'];
    const raster = await align(file, ownGrid(await inspectRaster(file)));
    expect(raster).toMatchObject({ dataType: 'float32', noData: null });
    expect(raster.plan).toMatchObject({ sameCells: true, scaling: { scale: 0.01, offset: -5 } });
    expect([...raster.values]).toEqual(values.map((v) => Math.fround((v ?? 0) * 0.01 - 5)));
  });

  it.each(['mend-alpha.tif', 'mend-alpha-apart.tif'])(
    '%s: cells are missing where alpha is 0',
    async (name) => {
      const file = loadFixture(name);
      const [alpha] = expected[name].others ?? [];
      const raster = await align(file, ownGrid(await inspectRaster(file)), { content: 'classes' });
      expect(alpha.filter((a) => a === 0)).toHaveLength(2);
      expect([...raster.values].map((v) => v === raster.noData)).toEqual(alpha.map((a) => a === 0));
      await expect(align(file, raster.grid, { band: 2 })).rejects.toMatchObject({
        code: 'raster-bands',
        expected: 'one of band 1',
      });
    },
  );

  it('each band has its own', async () => {
    const file = loadFixture('mend-bands-pixel.tif');
    const grid = ownGrid(await inspectRaster(file));
    const third = await align(file, grid, { band: 3 });
    expect([...third.values]).toEqual(
      (expected['mend-bands-pixel.tif'].others?.[1] ?? []).map((v) => 2 * (v ?? 0)),
    );
    await expect(align(file, grid, { band: 4 })).rejects.toMatchObject({ code: 'raster-bands' });
  });
});

describe('long work', () => {
  const grid = gridOf(420, 330);
  const file = fileOf(grid, new Float32Array(138_600).fill(0.25));
  const planFor = async (target: Grid) =>
    planAlignment(await inspectRaster(file), { band: 1, content: 'amounts', grid: target });

  it.each([
    ['copied', grid],
    ['coarser', coarsenGrid(grid, 3)],
    ['another zone', gridOf(300, 300, { epsg: 32616, originX: 1_044_200, originY: 3_488_200 })],
  ])('says how far it is: %s', async (_, target) => {
    const told: number[] = [];
    await alignRaster(file, await planFor(target), { onProgress: (share) => told.push(share) });
    expect(told.length).toBeGreaterThan(1);
    expect(told).toEqual([...told].sort((a, b) => a - b));
    expect(told.at(-1)).toBe(1);
  });

  it.each([
    ['copied', grid],
    ['coarser', coarsenGrid(grid, 3)],
  ])('stops when it is told to: %s', async (_, target) => {
    const stop = new AbortController();
    let told = 0;
    const onProgress = () => {
      told++;
      stop.abort(new Error('enough'));
    };
    const work = alignRaster(file, await planFor(target), { onProgress, signal: stop.signal });
    await expect(work).rejects.toThrow('enough');
    expect(told).toBe(1);
    await expect(alignRaster(file, await planFor(target), { signal: stop.signal })).rejects.toThrow('enough');
  });

  it('gives the same whatever may be kept of the source', async () => {
    const rough = fileOf(
      grid,
      Float32Array.from({ length: 138_600 }, (_, i) => (i * 7919) % 1013),
    );
    const plan = await planFor(gridOf(110, 85, { cellSize: 3.7, originX: 473_011.3 }));
    const all = await alignRaster(rough, plan);
    const little = await alignRaster(rough, plan, { keptBytes: 1 });
    expect(little.values).toEqual(all.values);
  });
});

describe('refusals', () => {
  const grid = gridOf(4, 4);
  const file = fileOf(grid, floats(...Array.from({ length: 16 }, () => NaN)).fill(2, 0, 8), NaN);

  it('no cell of the grid gets a value', async () => {
    const south = gridOf(4, 2, { originY: 3_473_998 });
    await expect(align(file, south)).rejects.toMatchObject({ code: 'raster-empty' });
  });

  it('an infinite value that is looked at, with its place', async () => {
    const values = new Float32Array(16).fill(1);
    values[6] = -Infinity;
    const bad = fileOf(grid, values);
    const shifted = gridOf(3, 3, { originX: 473_000.4 });
    await expect(align(bad, shifted)).rejects.toMatchObject({
      code: 'raster-values',
      found: 'an infinite value in column 3 of row 2',
    });
  });

  it('more cells than the limit', async () => {
    const plan = planAlignment(await inspectRaster(file), { band: 1, content: 'amounts', grid });
    await expect(alignRaster(file, plan, { limits: { cells: 15 } })).rejects.toMatchObject({
      code: 'raster-too-large',
      found: 'a grid of 4 × 4 cells',
    });
  });
});
