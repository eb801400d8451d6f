import { expect, test } from 'vitest';
import { layerSourcesSchema } from '#sim-core/spec/run-spec.ts';
import { buildGround } from './build-ground.ts';

const row = (width: number) => ({ width, height: 1, cellSize: 1, originX: 0, originY: 0, epsg: 32631 });

test('constants, classes and scales become the ground of a run', () => {
  const layers = layerSourcesSchema.parse({
    capacity: { file: 'habitat.tif', classes: { 1: 1, 2: 0.5 }, fill: 0 },
    refuge: 0.2,
    cover: { file: 'cover.tif', scale: 0.01 },
  });
  const ground = buildGround(layers, row(3), (source) =>
    'file' in source && source.file === 'habitat.tif'
      ? { values: Uint8Array.of(1, 2, 9), noData: null }
      : { values: Float32Array.of(50, -1, 100), noData: -1 },
  );
  expect([...ground.capacity]).toEqual([255, 128, 0]);
  expect([...ground.vigour]).toEqual([255, 255, 255]);
  expect([...ground.exposure]).toEqual([0, 0, 0]);
  expect([...ground.refuge]).toEqual([51, 51, 51]);
  expect([...ground.cover]).toEqual([0.5, 0, 1]);
});

test('every layer whose numbers are no shares is named', () => {
  const layers = layerSourcesSchema.parse({ vigour: { file: 'a.tif' }, cover: { file: 'b.tif' } });
  expect(() => buildGround(layers, row(1), () => ({ values: Uint8Array.of(80) }))).toThrow(
    /layers\.vigour: Cell 0 holds 80.*\nlayers\.cover: Cell 0 holds 80/,
  );
});
