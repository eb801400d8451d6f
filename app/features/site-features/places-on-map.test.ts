import { expect, it } from 'vitest';
import type { Feature } from '#contract/features.ts';
import { featureInWords } from './feature-words.ts';
import { placesOnMap } from './places-on-map.ts';

const disc = { shape: 'disc', x: 10, y: 20, radius: 3 } as const;
const polygon = {
  shape: 'polygon' as const,
  ring: [
    [0, 0],
    [1, 0],
    [1, 1],
  ] as [number, number][],
};
const feature = (kind: Feature['kind'], shape: Feature['shape'], more: Partial<Feature> = {}) =>
  ({ id: kind, kind, shape, name: '', strength: 0.5, halo: 2, source: { row: 4 }, ...more }) as Feature;

it('draws refuges that are points as diamonds, and all else as outlines', () => {
  const { footholds, areas } = placesOnMap([
    feature('refuge', disc),
    feature('refuge', polygon),
    feature('fence', disc),
  ]);
  expect(footholds).toEqual([{ id: 'refuge', x: 10, y: 20, kind: 'surveyed', radius: 5 }]);
  expect(areas.map(({ kind }) => kind)).toEqual(['refuge', 'fence']);
  expect(areas[0].ring).toEqual(polygon.ring);
  for (const [x, y] of areas[1].ring) expect(Math.hypot(x - 10, y - 20)).toBeCloseTo(3, 6);
});

it('says what they are', () => {
  expect(featureInWords(feature('refuge', disc))).toBe('disc of 3 m radius, strength 50 %, fading over 2 m');
  expect(featureInWords(feature('fence', polygon))).toBe('area of 3 corners, strength 50 %');
  expect(featureInWords(feature('allowed', polygon))).toBe('area of 3 corners');
  const holed = { ...polygon, holes: [polygon.ring] };
  expect(featureInWords(feature('allowed', holed))).toBe('area of 3 corners with 1 hole');
  expect(placesOnMap([feature('allowed', holed)]).areas[0].holes).toEqual([polygon.ring]);
});
