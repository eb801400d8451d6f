// @vitest-environment node
import { expect, it } from 'vitest';
import { sourceBytes } from '#sim-core/grid/build-ground.ts';
import { layerSourcesSchema, type RasterSource } from '#sim-core/spec/run-spec.ts';
import { coarseGrid, coarseGround, coarseStride, spread, thin } from './coarse-ground.ts';

const gridOf = (width: number, height: number) => ({
  width,
  height,
  cellSize: 2,
  originX: 0,
  originY: 0,
  epsg: 32631,
});

it('leaves a small site as it is, and thins a large one to a screenful', () => {
  expect(coarseStride(gridOf(640, 372))).toBe(1);
  expect(coarseStride(gridOf(6000, 6000))).toBe(8);
  expect(coarseGrid(gridOf(6001, 6000), 8)).toMatchObject({ width: 751, height: 750, cellSize: 16 });
});

it('takes the middle of each square, and spreads it over the square again', () => {
  const grid = gridOf(7, 5);
  const values = Uint8Array.from({ length: 35 }, (_, i) => i);
  const thinned = thin(values, grid, 3);
  // Rows 1 and 4, columns 1, 4 and, as the last square is cut, 6.
  expect([...thinned]).toEqual([8, 11, 13, 29, 32, 34]);
  const wide = spread(thinned, grid, 3);
  expect([...wide.subarray(14, 21)]).toEqual([8, 8, 8, 11, 11, 11, 13]);
  expect([...wide.subarray(28)]).toEqual([29, 29, 29, 32, 32, 32, 34]);
});

it('is in the middle of each square what the exact ground is there, small mounds among it', () => {
  const grid = gridOf(1600, 1000);
  const stride = coarseStride(grid);
  expect(stride).toBe(2);
  const hash = 'a'.repeat(64);
  const values = Float32Array.from({ length: 1_600_000 }, (_, i) => ((i * 31) % 1009) / 1009);
  const curve = [
    [0, 0.1],
    [0.5, 0.9],
    [1, 0.4],
  ];
  const sources = layerSourcesSchema.parse({
    capacity: { product: [0.8, { layer: hash, curve }] },
    refuge: { highest: [0.1, { mounds: [{ x: 1603, y: -1003, radius: 1.5 }] }] },
    cover: 0,
  });
  const whole = (source: RasterSource) => {
    expect(source).toHaveProperty('layer', hash);
    return { values, noData: null };
  };
  const afar = coarseGround(sources, grid, () => ({ values: thin(values, grid, stride), noData: null }), [
    'capacity',
    'refuge',
  ]);
  for (const part of ['capacity', 'refuge'] as const) {
    const exact = sourceBytes(sources[part], grid, whole);
    let differing = 0;
    for (let row = 1; row < grid.height; row += stride)
      for (let column = 1; column < grid.width; column += stride)
        if (afar[part][row * grid.width + column] !== exact[row * grid.width + column]) differing++;
    expect(differing, part).toBe(0);
  }
  expect(Math.max(...afar.refuge.subarray(500 * 1600, 503 * 1600))).toBe(255);
});
