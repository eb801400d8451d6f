// @vitest-environment node
import { expect, it } from 'vitest';
import { layerSourcesSchema } from '#sim-core/spec/run-spec.ts';
import { groundOf } from './run-ground.ts';
import type { LayerRasters, RunInput } from './run-loop.ts';

const hash = 'a'.repeat(64);
const input = (ground: RunInput['ground']) => {
  const layers = layerSourcesSchema.parse({
    capacity: { layer: hash, classes: { 1: 1, 2: 0.2 } },
    cover: { layer: hash, scale: 0.5 },
  });
  return { spec: { layers }, grid: { width: 2, height: 2 }, ground } as unknown as RunInput;
};
const rasters: LayerRasters = new Map([[hash, { values: Uint8Array.of(1, 2, 0, 9), noData: 9 }]]);

it('builds the ground of the layers that it was handed, or takes one that is ready', () => {
  const ground = groundOf(input(rasters));
  expect([...ground.capacity]).toEqual([255, 51, 0, 0]);
  expect([...ground.cover]).toEqual([0.5, 1, 0, 0]);
  expect(groundOf(input(ground))).toBe(ground);
});

it('says when a layer is missing', () => {
  expect(() => groundOf(input(new Map()))).toThrow('not handed over');
});
