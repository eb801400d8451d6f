// @vitest-environment node
import { expect, it } from 'vitest';
import { layerSourcesSchema, type RasterSource } from '#sim-core/spec/run-spec.ts';
import { engineGround } from './engine-ground.ts';

const grid = { width: 6, height: 1, cellSize: 2, originX: 0, originY: 0, epsg: 32631 };
const [habitat, heights, cover] = ['a', 'b', 'c'].map((letter) => letter.repeat(64));
const rasters: Record<string, { values: Uint8Array | Float32Array; noData: number | null }> = {
  [habitat]: { values: Uint8Array.of(0, 1, 1, 1, 1, 0), noData: null },
  [heights]: { values: Float32Array.of(1, 1, 0.5, -9999, NaN, NaN), noData: -9999 },
  [cover]: { values: Float32Array.of(0.5, 0.3, 0.9, 0.2, 0, 0), noData: null },
};
const rasterOf = (source: RasterSource) => rasters['layer' in source ? source.layer : ''];
const curve = [
  [0, 0],
  [1, 1],
] as [number, number][];

it('is the ground of a run, with what its maps say in numbers', () => {
  const sources = layerSourcesSchema.parse({
    capacity: {
      product: [
        { layer: habitat, classes: { 0: 0, 1: 0.8 } },
        { layer: heights, curve },
      ],
    },
    exposure: { layer: heights, curve },
    refuge: {
      mounds: [
        { x: 3, y: -1, radius: 1 },
        { x: 9, y: -1, radius: 1, strength: 0.4 },
      ],
    },
    cover: { layer: cover },
  });
  const ground = engineGround(sources, grid, rasterOf);
  expect([...ground.capacity]).toEqual([0, 204, 102, 0, 0, 0]);
  expect([...ground.cover]).toEqual([0, 77, 102, 0, 0, 0]);
  expect([...ground.refuge]).toEqual([0, 255, 0, 0, 102, 0]);
  expect(ground.facts).toMatchObject({
    plantable: 2,
    meanVigour: 1,
    sheltered: 1,
    shelter: 1,
    barren: 1,
    barrenShelter: 0.4,
    fenced: 0,
    stranded: 2,
    overfull: 1,
    withoutElevation: 2,
  });
  expect(ground.facts.meanCapacity).toBeCloseTo(0.6, 12);
  expect(ground.facts.meanExposure).toBeCloseTo((1 + 128 / 255) / 2, 12);
  expect(ground.facts.covered).toBeCloseTo(0.3 + 0.4, 6);
});

it('knows of no missing elevation where capacity does not hang on it', () => {
  const sources = layerSourcesSchema.parse({
    capacity: { layer: habitat, classes: { 0: 0, 1: 0.8 } },
    exposure: { layer: heights, curve },
    cover: { layer: cover },
  });
  expect(engineGround(sources, grid, rasterOf).facts).toMatchObject({ withoutElevation: 0, plantable: 4 });
});
