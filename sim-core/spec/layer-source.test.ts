import { expect, it } from 'vitest';
import { layerSourceSchema, mapRasters, rasterSources, type LayerSource } from './layer-source.ts';
import { fieldProblems } from './problems.ts';

const classes = { 1: 1, 2: 0.5 };
const curve = [
  [0.2, 0],
  [0.6, 1],
] as [number, number][];
const capacity: LayerSource = {
  product: [
    { file: 'habitat.tif', classes },
    { file: 'heights.tif', scale: 0.3048, curve },
  ],
};

const problems = (source: unknown) => {
  const { error } = layerSourceSchema.safeParse(source);
  return error ? fieldProblems(error) : [];
};

it('takes a source made of sources, and fills in what may be left out', () => {
  expect(layerSourceSchema.parse(capacity)).toEqual(capacity);
  const mound = { x: 1, y: 2, radius: 3 };
  expect(layerSourceSchema.parse({ highest: [capacity, { mounds: [mound] }] })).toEqual({
    highest: [capacity, { mounds: [{ ...mound, strength: 1, halo: 0 }] }],
  });
});

it.each<[string, unknown, string, RegExp]>([
  ['a share beyond 1', 1.5, '', /<=1/],
  ['no kind of source', { raster: 'a.tif' }, '', /one of `file`, `layer`, `product`/],
  ['a lone part', { product: [1] }, 'product', />=2/],
  ['a part that is wrong', { highest: [0, { file: 'a.tif', fill: 2 }] }, 'highest.1.fill', /<=1/],
  ['a curve that turns back', { file: 'a.tif', curve: [...curve, [0.6, 0]] }, 'curve.2.0', /0\.6 after 0\.6/],
  ['a curve of one point', { file: 'a.tif', curve: [[0, 1]] }, 'curve', />=2/],
  ['class table and curve', { file: 'a.tif', classes, curve }, 'curve', /one of the two/],
  ['an area without a shape', { areas: [{ area: { x: 1, y: 1 } }] }, 'areas.0.area.shape', /./],
])('says where a source is wrong: %s', (_, source, field, message) => {
  expect(problems(source)).toMatchObject([{ field, message: expect.stringMatching(message) as string }]);
});

it('refuses what stands in itself too deeply', () => {
  const nested = (depth: number): unknown => (depth === 0 ? 1 : { product: [1, nested(depth - 1)] });
  expect(problems(nested(3))).toEqual([]);
  expect(problems(nested(4))).toHaveLength(1);
});

it('lists the rasters of a source at their places, and puts others in their stead', () => {
  const source: LayerSource = { highest: [0.2, capacity, { file: 'c.tif' }, { areas: [] }] };
  expect(rasterSources(source).map(({ at, raster }) => [at, 'file' in raster && raster.file])).toEqual([
    ['.highest.1.product.0', 'habitat.tif'],
    ['.highest.1.product.1', 'heights.tif'],
    ['.highest.2', 'c.tif'],
  ]);
  const other = mapRasters(source, (raster) => ({ ...raster, fill: 0.5 }));
  expect(rasterSources(other).every(({ raster }) => raster.fill === 0.5)).toBe(true);
  expect(mapRasters(other, (raster) => ({ ...raster, fill: undefined }))).toEqual(source);
});
