// @vitest-environment node
import { expect, it } from 'vitest';
import { layerSourcesSchema, type RasterSource } from '#sim-core/spec/run-spec.ts';
import { buildGround } from '#sim-core/grid/build-ground.ts';
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

it('is the ground of a run, with what its maps say in numbers', async () => {
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
  const ground = await engineGround(sources, grid, rasterOf);
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

it('knows of no missing elevation where capacity does not hang on it', async () => {
  const sources = layerSourcesSchema.parse({
    capacity: { layer: habitat, classes: { 0: 0, 1: 0.8 } },
    exposure: { layer: heights, curve },
    cover: { layer: cover },
  });
  expect((await engineGround(sources, grid, rasterOf)).facts).toMatchObject({
    withoutElevation: 0,
    plantable: 4,
  });
});

/** More cells than one stretch, with values of every kind. */
const large = { ...grid, width: 700, height: 900 };
const largeRasters: typeof rasters = {
  [habitat]: { values: Uint8Array.from({ length: 630_000 }, (_, i) => (i >> 5) % 3), noData: 2 },
  [heights]: {
    values: Float32Array.from({ length: 630_000 }, (_, i) => (i % 1000 === 0 ? NaN : (i % 613) / 613)),
    noData: null,
  },
  [cover]: { values: Float32Array.from({ length: 630_000 }, (_, i) => ((i * 7) % 101) / 100), noData: null },
};
const largeRaster = (source: RasterSource) => largeRasters['layer' in source ? source.layer : ''];
const largeSources = layerSourcesSchema.parse({
  capacity: {
    product: [
      { layer: habitat, classes: { 0: 0.3, 1: 0.83 } },
      { layer: heights, curve },
    ],
  },
  vigour: { layer: heights, curve },
  refuge: { highest: [0.1, { mounds: [{ x: 500, y: -900, radius: 9 }] }] },
  cover: { layer: cover },
});

it('is byte for byte what a run starts from, over many stretches, and says how far it is', async () => {
  const told: number[] = [];
  const seen = await engineGround(largeSources, large, largeRaster, (done) => void told.push(done));
  const ground = buildGround(largeSources, large, largeRaster);
  for (const part of ['capacity', 'vigour', 'exposure', 'refuge', 'fence'] as const)
    expect(Buffer.from(seen[part]).equals(Buffer.from(ground[part])), part).toBe(true);
  expect(told).toEqual([262_144, 524_288, 630_000]);
});

it('is left where it is told to', async () => {
  const left = new Error('left');
  const work = engineGround(largeSources, large, largeRaster, () => {
    throw left;
  });
  await expect(work).rejects.toBe(left);
});

it('refuses every layer whose numbers are no shares, by the layer and the cell', async () => {
  const bad = layerSourcesSchema.parse({
    capacity: 1,
    vigour: { layer: heights, scale: 3 },
    cover: { layer: cover, scale: 50 },
  });
  await expect(engineGround(bad, large, largeRaster)).rejects.toMatchObject({
    problems: [
      { field: 'layers.vigour', message: expect.stringMatching(/^Cell 205 holds/) as string },
      { field: 'layers.cover', message: expect.stringMatching(/^Cell 1 holds/) as string },
    ],
  });
});
