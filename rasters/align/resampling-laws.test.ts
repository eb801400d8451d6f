import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { inspectRaster } from '#rasters/describe/inspect-raster.ts';
import { transformer } from '#rasters/geo/transformer.ts';
import { fileOf, gridOf } from '#rasters/testing/rasters.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { alignRaster } from './align-raster.ts';
import type { ResamplingMethod } from './alignment-plan.ts';
import { cellMaps, onLattice } from './cell-map.ts';
import { planAlignment } from './plan-alignment.ts';
import { newGridFor } from './suggest-grid.ts';

const align = async (file: Uint8Array, grid: Grid, method: ResamplingMethod) => {
  const content = method === 'majority' ? 'classes' : 'amounts';
  const plan = planAlignment(await inspectRaster(file), { band: 1, content, grid, method });
  return alignRaster(file, plan);
};
const total = (values: ArrayLike<number>) => Array.from(values).reduce((sum, v) => sum + v, 0);

const valueOf = (seed: number, i: number) => Math.fround(((seed * 31 + i * 7919) % 1009) / 1009);

describe('area-weighted', () => {
  it('keeps the total, whatever the size of cells and wherever they lie', async () => {
    const size = fc.double({ min: 0.3, max: 6, noNaN: true });
    const part = fc.double({ min: 0, max: 1, noNaN: true });
    await fc.assert(
      fc.asyncProperty(size, part, part, fc.nat(), async (cellSize, right, down, seed) => {
        // Data in the middle and nothing around, so that all of it lies on cells whose ground is known.
        const source = gridOf(26, 26);
        const values = Float32Array.from({ length: 676 }, (_, i) =>
          [i % 26, Math.floor(i / 26)].every((v) => v >= 10 && v < 16) ? valueOf(seed, i) : 0,
        );
        const cells = Math.ceil(26 / cellSize) + 1;
        const target = gridOf(cells, cells, {
          cellSize,
          originX: source.originX - right * cellSize,
          originY: source.originY + down * cellSize,
        });
        const coarse = await align(fileOf(source, values), target, 'area-weighted');
        const sum = total(Array.from(coarse.values, (v) => (Number.isNaN(v) ? 0 : v)));
        expect(Math.abs(sum * cellSize ** 2 - total(values)) / total(values)).toBeLessThan(1e-5);
      }),
      { numRuns: 60 },
    );
  });

  it('keeps the total in another zone, where cells are turned and stretched', async () => {
    await fc.assert(
      fc.asyncProperty(fc.integer({ min: 1, max: 1e6 }), async (seed) => {
        // Data in the middle, nothing around, so that all of it lies on the new grid.
        const source = gridOf(60, 60, { cellSize: 5 });
        const values = Float32Array.from({ length: 3600 }, (_, i) =>
          [i % 60, Math.floor(i / 60)].every((v) => v >= 15 && v < 45) ? valueOf(seed, i) : 0,
        );
        const file = fileOf(source, values);
        const target = newGridFor(await inspectRaster(file), 32616, 17.3);
        const plan = planAlignment(await inspectRaster(file), {
          band: 1,
          content: 'amounts',
          grid: target,
          method: 'area-weighted',
        });
        const { values: coarse } = await alignRaster(file, plan);
        const sum = total(Array.from(coarse, (v) => (Number.isNaN(v) ? 0 : v)));
        // In cells of the raster, as the zones' metres differ by their scale.
        expect(Math.abs(sum * plan.cellRatio ** 2 - total(values)) / total(values)).toBeLessThan(2e-5);
      }),
      { numRuns: 10 },
    );
  });

  it('is the mean over many points, in another zone too', async () => {
    const source = gridOf(40, 40, { cellSize: 5 });
    const values = Float32Array.from({ length: 1600 }, (_, i) => valueOf(3, i));
    const file = fileOf(source, values);
    const description = await inspectRaster(file);
    const grid = newGridFor(description, 32616, 23);
    const { values: ours } = await align(file, grid, 'area-weighted');
    const { toRaster } = cellMaps(description, grid);
    const n = 60;
    const point = [0, 0];
    let compared = 0;
    for (let i = 0; i < ours.length; i++) {
      let [sum, held] = [0, 0];
      for (let k = 0; k < n * n; k++) {
        toRaster(
          (i % grid.width) + ((k % n) + 0.5) / n,
          Math.floor(i / grid.width) + (Math.floor(k / n) + 0.5) / n,
          point,
        );
        const [x, y] = point.map(Math.floor);
        if (x < 0 || y < 0 || x >= 40 || y >= 40) continue;
        sum += values[y * 40 + x];
        held++;
      }
      if (Math.abs(held / n ** 2 - 0.5) < 0.02) continue;
      if (held / n ** 2 < 0.5) expect(ours[i]).toBeNaN();
      else expect(Math.abs(ours[i] - sum / held)).toBeLessThan(0.01);
      compared++;
    }
    expect(compared).toBeGreaterThan(50);
  });

  it('on cells of one size is bilinear', async () => {
    const values = Float32Array.from({ length: 100 }, (_, i) => valueOf(5, i));
    const file = fileOf(gridOf(10, 10), values);
    const inner = gridOf(8, 8, { originX: 473_000.3, originY: 3_473_999.4 });
    const [area, bilinear] = await Promise.all([
      align(file, inner, 'area-weighted'),
      align(file, inner, 'bilinear'),
    ]);
    area.values.forEach((v, i) => expect(v).toBeCloseTo(bilinear.values[i], 5));
  });
});

describe('where cells lie', () => {
  /** A plane over the ground: what it should be anywhere is known. */
  const plane = (grid: Grid) =>
    Float32Array.from({ length: grid.width * grid.height }, (_, i) => {
      const x = ((i % grid.width) + 0.5) * grid.cellSize;
      const y = (Math.floor(i / grid.width) + 0.5) * grid.cellSize;
      return 10 + 0.3 * x - 0.4 * y;
    });
  const at = (source: Grid, x: number, y: number) =>
    10 + 0.3 * (x - source.originX) - 0.4 * (source.originY - y);

  it.each([
    ['bilinear', fc.double({ min: 0.3, max: 4, noNaN: true })],
    // Among cells that are level each, only those of whole sizes have their centre in the middle of what they weigh.
    ['area-weighted', fc.integer({ min: 1, max: 4 })],
  ] as const)('%s gives back a plane at cell centres', async (method, size) => {
    await fc.assert(
      fc.asyncProperty(size, fc.double({ min: 0, max: 1, noNaN: true }), async (cellSize, shift) => {
        const source = gridOf(40, 40);
        const target = gridOf(4, 4, {
          cellSize,
          originX: source.originX + 8 + shift,
          originY: source.originY - 9 - shift / 2,
        });
        const { values } = await align(fileOf(source, plane(source)), target, method);
        values.forEach((value, i) => {
          const x = target.originX + ((i % 4) + 0.5) * cellSize;
          const y = target.originY - (Math.floor(i / 4) + 0.5) * cellSize;
          expect(Math.abs(value - at(source, x, y))).toBeLessThan(1e-4);
        });
      }),
      { numRuns: 40 },
    );
  });

  it('bilinear gives back a plane in another zone', async () => {
    const source = gridOf(80, 80, { cellSize: 10 });
    const file = fileOf(source, plane(source));
    const grid = newGridFor(await inspectRaster(file), 32616, 7);
    const { values } = await align(file, grid, 'bilinear');
    const back = transformer(32616, 32617);
    let compared = 0;
    values.forEach((value, i) => {
      const [x, y] = back.forward(
        grid.originX + ((i % grid.width) + 0.5) * grid.cellSize,
        grid.originY - (Math.floor(i / grid.width) + 0.5) * grid.cellSize,
      );
      const [column, row] = [(x - source.originX) / 10, (source.originY - y) / 10];
      if (column < 0.5 || row < 0.5 || column > 79.5 || row > 79.5) return;
      compared++;
      // A tenth of a millimetre in height is a quarter of a millimetre on the ground.
      expect(Math.abs(value - at(source, x, y))).toBeLessThan(5e-4);
    });
    expect(compared).toBeGreaterThan(10_000);
  });

  it('half a cell aside is half a cell: PixelIsPoint and PixelIsArea of one ground give one result', async () => {
    const source = gridOf(12, 12, { cellSize: 10 });
    const target = gridOf(10, 10, { cellSize: 10, originX: 473_005, originY: 3_473_995 });
    const { values } = await align(fileOf(source, plane(source)), target, 'bilinear');
    expect(values[0]).toBeCloseTo(at(source, 473_010, 3_473_990), 5);
    expect(values[11]).toBeCloseTo(at(source, 473_020, 3_473_980), 5);
  });

  it('the lattice is off by less than a ten-thousandth of a cell, and not used where the map bends too much', async () => {
    const source = gridOf(3000, 3000, { cellSize: 0.5 });
    const description = {
      ...(await inspectRaster(fileOf(gridOf(2, 2), new Uint8Array(4).fill(1)))),
      ...source,
      cellWidth: 0.5,
      cellHeight: 0.5,
    };
    const grid = newGridFor(description, 32616, 0.5);
    const { toRaster } = cellMaps(description, grid);
    const quick = onLattice(toRaster, grid.width, grid.height);
    expect(quick).not.toBe(toRaster);
    const [exact, near] = [
      [0, 0],
      [0, 0],
    ];
    for (let i = 0; i < 2000; i++) {
      const [column, row] = [(i * 7919) % (grid.width + 1), (i * 104_729) % (grid.height + 1)];
      toRaster(column, row, exact);
      quick(column, row, near);
      expect(Math.hypot(exact[0] - near[0], exact[1] - near[1])).toBeLessThan(1e-4);
    }
    const bent: typeof toRaster = (column, row, out) => {
      out[0] = column + 0.01 * Math.sin(column);
      out[1] = row;
    };
    expect(onLattice(bent, 100, 100)).toBe(bent);
  });
});
