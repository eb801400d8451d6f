import { expect, it } from 'vitest';
import { runSpecSchema, type LayerSource } from '#sim-core/spec/run-spec.ts';
import { rasterPaths, specForFiles } from './spec-for-files.ts';

const habitat = {
  hash: 'a'.repeat(64),
  sourceHash: 'a'.repeat(64),
  part: 'habitat' as const,
  fileName: 'habitat.tif',
};
const cover = {
  hash: 'b'.repeat(64),
  sourceHash: 'f'.repeat(64),
  part: 'cover' as const,
  fileName: 'cover 2026.TIF',
};
const layers = [habitat, cover];
const spec = runSpecSchema.parse({
  version: 1,
  seed: 's',
  surveyYear: 2026,
  years: 2,
  rates: {},
  layers: {
    capacity: { layer: habitat.hash, classes: { 1: 0, 2: 0.9 } },
    cover: { layer: cover.hash, scale: 0.01 },
  },
});

it('names each raster by path and SHA-256, keeps how its numbers are read, and is a RunSpec still', () => {
  const written = specForFiles(spec, layers);
  expect(runSpecSchema.parse(JSON.parse(JSON.stringify(written)))).toEqual(written);
  expect(written.layers).toMatchObject({
    capacity: { file: 'rasters/habitat.tif', sha256: habitat.hash, classes: { 1: 0, 2: 0.9 } },
    cover: { file: 'rasters/cover 2026-on-grid.TIF', sha256: cover.hash, scale: 0.01 },
    vigour: 1,
  });
  expect(JSON.stringify(written)).not.toContain('"layer":');
  expect({ ...written, layers: spec.layers }).toEqual(spec);
});

it('names the rasters inside a layer that is put together, and leaves the rest', () => {
  const mounds = [{ x: 1, y: 2, radius: 1, strength: 1, halo: 0 }];
  const curve: [number, number][] = [
    [0, 0],
    [1, 1],
  ];
  const made: LayerSource = { highest: [{ mounds }, { product: [{ layer: cover.hash, curve }, 0.5] }] };
  const written = specForFiles({ ...spec, layers: { ...spec.layers, refuge: made } }, layers);
  expect(written.layers.refuge).toEqual({
    highest: [
      { mounds },
      { product: [{ file: 'rasters/cover 2026-on-grid.TIF', sha256: cover.hash, curve }, 0.5] },
    ],
  });
});

it('gives every raster a name of its own that any file system takes', () => {
  const named = (fileName: string, more: Partial<typeof cover> = {}) => ({ ...habitat, fileName, ...more });
  const paths = rasterPaths([
    named('Marsh.tif'),
    { ...cover, fileName: 'marsh.tif', sourceHash: cover.hash },
    named('marsh.tif', { hash: 'c'.repeat(64), sourceHash: 'c'.repeat(64), part: 'cover' }),
    named('../..\\x:y?.dat', { hash: 'd'.repeat(64), sourceHash: 'd'.repeat(64) }),
    named('…', { hash: 'e'.repeat(64) }),
  ]);
  expect([...paths.values()]).toEqual([
    'rasters/Marsh.tif',
    'rasters/cover-marsh.tif',
    'rasters/cccccccccccc-marsh.tif',
    'rasters/x-y-.dat.tif',
    'rasters/raster-on-grid.tif',
  ]);
});

it('refuses a raster that the run does not have', () => {
  expect(() => specForFiles(spec, [habitat])).toThrow(/expected one of the run's layers/);
});
