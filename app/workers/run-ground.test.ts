// @vitest-environment node
import { expect, it } from 'vitest';
import { encodeCellValues } from '#rasters/cells/cell-values.ts';
import { layerSourcesSchema } from '#sim-core/spec/run-spec.ts';
import { groundOf } from './run-ground.ts';
import { groundBuffers, type PackedLayers, type RunInput } from './run-loop.ts';

const hash = 'a'.repeat(64);
const input = (ground: RunInput['ground']) => {
  const layers = layerSourcesSchema.parse({
    capacity: { layer: hash, classes: { 1: 1, 2: 0.2 } },
    cover: { layer: hash, scale: 0.5 },
  });
  return { spec: { layers }, grid: { width: 2, height: 2 }, ground } as unknown as RunInput;
};
const packed = new Uint8Array(encodeCellValues({ width: 2, height: 2, values: Uint8Array.of(1, 2, 0, 9) }));
const layers: PackedLayers = new Map([[hash, { packed: new Blob([packed]), noData: 9 }]]);

it('builds the ground of the layers that it was handed, or takes one that is ready', async () => {
  const ground = await groundOf(input(layers));
  expect([...ground.capacity]).toEqual([255, 51, 0, 0]);
  expect([...ground.cover]).toEqual([0.5, 1, 0, 0]);
  expect(await groundOf(input(ground))).toBe(ground);
  expect(groundBuffers(layers)).toEqual([]);
  expect(groundBuffers({ ...ground, vigour: ground.capacity })).toHaveLength(5);
});

it('says when a layer is missing or damaged', async () => {
  await expect(groundOf(input(new Map()))).rejects.toThrow('not handed over');
  const cut = new Map([[hash, { packed: new Blob([packed.slice(0, 20)]), noData: null }]]);
  await expect(groundOf(input(cut))).rejects.toThrow('damaged');
});
