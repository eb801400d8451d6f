// @vitest-environment node
import { expect, it } from 'vitest';
import { runSpecSchema, type LayerSource } from '#sim-core/spec/run-spec.ts';
import { composeRunSpec } from './compose-run-spec.ts';
import { fileNames, specForFiles } from './spec-for-files.ts';
import { siteFixture } from './testing/site-fixture.ts';

const site = siteFixture();
const layers = site.layers.map((layer) => ({ ...layer, fileName: layer.source.fileName }));
const spec = composeRunSpec(site, { works: [] }, { mode: 'counts', seed: 's' }).spec!;

it('names each raster by its file, keeps how its numbers are read, and is a RunSpec still', () => {
  const written = specForFiles(spec, layers);
  expect(runSpecSchema.parse(JSON.parse(JSON.stringify(written)))).toEqual(written);
  expect(JSON.stringify(written)).not.toContain('"layer":');
  expect(written.layers).toEqual({
    capacity: { file: 'habitat.tif', classes: { 1: 0, 2: 0.9 } },
    vigour: { file: 'habitat.tif', classes: { 1: 0, 2: 1 } },
    cover: { file: 'cover.tif', scale: 0.01 },
    refuge: { file: 'refuge.tif', scale: 1 / 255 },
    exposure: 0,
    fence: 0,
  });
  expect({ ...written, layers: spec.layers }).toEqual(spec);
});

it('names the rasters inside a layer that is put together, and leaves the rest', () => {
  const mounds = [{ x: 1, y: 2, radius: 1, strength: 1, halo: 0 }];
  const [, cover] = site.layers;
  const made: LayerSource = {
    highest: [
      { mounds },
      {
        product: [
          {
            layer: cover.hash,
            curve: [
              [0, 0],
              [1, 1],
            ],
          },
          0.5,
        ],
      },
    ],
  };
  const written = specForFiles({ ...spec, layers: { ...spec.layers, refuge: made } }, layers);
  expect(written.layers.refuge).toEqual({
    highest: [
      { mounds },
      {
        product: [
          {
            file: 'cover.tif',
            curve: [
              [0, 0],
              [1, 1],
            ],
          },
          0.5,
        ],
      },
    ],
  });
});

it('tells rasters of one file name apart by their part, also where only capitals differ', () => {
  const [habitat, cover, refuge] = layers;
  const names = fileNames([
    { ...habitat, fileName: 'Marsh.tif' },
    { ...cover, fileName: 'marsh.tif' },
    refuge,
  ]);
  expect([...names.values()]).toEqual(['habitat-Marsh.tif', 'cover-marsh.tif', 'refuge.tif']);
});

it('refuses a raster that the run does not have', () => {
  expect(() => specForFiles(spec, layers.slice(1))).toThrow(/expected one of the run's layers/);
});
