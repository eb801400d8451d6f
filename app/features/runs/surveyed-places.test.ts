// @vitest-environment node
import { expect, it } from 'vitest';
import { layerSourcesSchema } from '#sim-core/spec/run-spec.ts';
import { surveyedInWords, surveyedOnMap } from './surveyed-places.ts';

const ring = [
  [0, 0],
  [9, 0],
  [9, 9],
];
const layers = layerSourcesSchema.parse({
  cover: { layer: 'c'.repeat(64) },
  refuge: {
    highest: [
      { layer: 'd'.repeat(64) },
      { mounds: [{ x: 1, y: 2, radius: 3, halo: 1 }] },
      { mounds: [{ x: 4, y: 2, radius: 3 }], edges: 'shared' },
      { areas: [{ area: { shape: 'polygon', ring, holes: [ring] } }], edges: 'shared' },
    ],
  },
  fence: { areas: [{ area: { shape: 'disc', x: 5, y: 5, radius: 2 } }] },
});

it('finds what was surveyed inside the sources, for words and for the map', () => {
  expect(surveyedInWords(layers)).toEqual([
    '2 surveyed refuges around points',
    '1 surveyed refuge as areas',
    '1 surveyed fence',
  ]);
  const { footholds, areas } = surveyedOnMap(layers);
  expect(footholds.map(({ x, radius, kind }) => [x, radius, kind])).toEqual([
    [1, 4, 'surveyed'],
    [4, 3, 'surveyed'],
  ]);
  expect(areas.map(({ kind, holes }) => [kind, holes?.length])).toEqual([
    ['refuge', 1],
    ['fence', undefined],
  ]);
  expect(new Set([...footholds, ...areas].map(({ id }) => id)).size).toBe(4);
});

it('says nothing where there is nothing', () => {
  expect(surveyedInWords(layerSourcesSchema.parse({ cover: 1 }))).toEqual([]);
});
