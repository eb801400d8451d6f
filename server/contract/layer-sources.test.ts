import { describe, expect, it } from 'vitest';
import { layerSourcesSchema } from '#sim-core/spec/run-spec.ts';
import type { Feature } from './features.ts';
import { allowedSource, layerSources } from './layer-sources.ts';
import type { Layer } from './layers.ts';

const layer = (part: Layer['part'], hash: string, more: Partial<Layer> = {}) =>
  ({ part, hash: hash.repeat(64), unit: 'share', vertical: null, classes: null, ...more }) as Layer;
const habitat = layer('habitat', 'a', {
  classes: [
    { value: 1, name: 'creek', colour: '#8496a2', capacity: 0, vigour: 0.1 },
    { value: 2, name: 'marsh', colour: '#5b825a', capacity: 0.9, vigour: 1 },
  ],
});
const elevation = layer('elevation', 'e', { vertical: { datum: 'invented', unit: 'foot' } });
const cover = layer('cover', 'c', { unit: 'percent' });
const curve: [number, number][] = [
  [0, 0],
  [1, 1],
];
const none = { capacity: null, vigour: null, exposure: null };
const ring: [number, number][] = [
  [0, 0],
  [2, 0],
  [2, 2],
];
const feature = (kind: Feature['kind'], shape: Feature['shape'], strength = 1) =>
  ({ kind, shape, strength, halo: 3, edges: 'centre' }) as Feature;

const a = 'a'.repeat(64);
const e = 'e'.repeat(64);

describe('layerSources', () => {
  it('takes classes and covers as they are where nothing else is said', () => {
    const sources = layerSources({
      layers: [habitat, cover, elevation],
      features: [],
      elevationCurves: none,
    });
    expect(sources).toEqual({
      capacity: { layer: a, classes: { 1: 0, 2: 0.9 } },
      vigour: { layer: a, classes: { 1: 0.1, 2: 1 } },
      exposure: 0,
      refuge: 0,
      fence: 0,
      cover: { layer: 'c'.repeat(64), scale: 0.01 },
    });
  });

  it('multiplies classes by curves of elevation in metres, and takes the higher exposure', () => {
    const layers = [habitat, cover, elevation, layer('exposure', 'd', { unit: 'byte' })];
    const elevationCurves = { capacity: curve, vigour: null, exposure: curve };
    const sources = layerSources({ layers, features: [], elevationCurves });
    const byHeight = { layer: e, scale: 0.3048, curve };
    expect(sources.capacity).toEqual({ product: [{ layer: a, classes: { 1: 0, 2: 0.9 } }, byHeight] });
    expect(sources.vigour).toEqual({ layer: a, classes: { 1: 0.1, 2: 1 } });
    expect(sources.exposure).toEqual({ highest: [{ layer: 'd'.repeat(64), scale: 1 / 255 }, byHeight] });
    expect(layerSourcesSchema.parse(sources)).toEqual(sources);
    expect(layerSources({ layers: [habitat, cover], features: [], elevationCurves }).exposure).toBe(0);
  });

  it('keeps places of either rule for their edges apart', () => {
    const disc = { shape: 'disc' as const, x: 1, y: 2, radius: 4 };
    const polygon = { shape: 'polygon' as const, ring };
    const shared = (one: Feature): Feature => ({ ...one, edges: 'shared' });
    const features = [
      feature('refuge', disc, 0.5),
      shared(feature('refuge', disc, 0.9)),
      shared(feature('refuge', polygon, 0.7)),
    ];
    const sources = layerSources({ layers: [], features, elevationCurves: none });
    expect(sources.refuge).toEqual({
      highest: [
        { mounds: [{ x: 1, y: 2, radius: 4, strength: 0.5, halo: 3 }] },
        { mounds: [{ x: 1, y: 2, radius: 4, strength: 0.9, halo: 3 }], edges: 'shared' },
        { areas: [{ area: polygon, strength: 0.7 }], edges: 'shared' },
      ],
    });
    expect(layerSourcesSchema.parse(sources)).toEqual(sources);
  });

  it('lets works go where the layer or an area allows, or anywhere', () => {
    const polygon = { shape: 'polygon' as const, ring };
    const areas = { areas: [{ area: polygon, strength: 1 }] };
    const layers = [layer('allowed', 'f', { unit: 'presence' })];
    const features = [feature('allowed', polygon, 0.3), feature('fence', polygon)];
    expect(allowedSource({ layers: [], features: [feature('fence', polygon)] })).toBeUndefined();
    expect(allowedSource({ layers: [], features })).toEqual(areas);
    expect(allowedSource({ layers, features })).toEqual({
      highest: [{ layer: 'f'.repeat(64), scale: 1 }, areas],
    });
  });

  it('shelters by raster, surveyed mounds and areas, and fences; allowed ground is none of the engine’s business', () => {
    const disc = { shape: 'disc', x: 1, y: 2, radius: 4 } as const;
    const polygon = { shape: 'polygon' as const, ring };
    const features = [
      feature('refuge', disc, 0.5),
      feature('refuge', polygon, 0.7),
      feature('fence', disc),
      feature('fence', polygon, 0.2),
      feature('allowed', polygon),
    ];
    const sources = layerSources({ layers: [layer('refuge', 'b')], features, elevationCurves: none });
    expect(sources.refuge).toEqual({
      highest: [
        { layer: 'b'.repeat(64), scale: 1 },
        { mounds: [{ x: 1, y: 2, radius: 4, strength: 0.5, halo: 3 }] },
        { areas: [{ area: polygon, strength: 0.7 }] },
      ],
    });
    expect(sources.fence).toEqual({
      areas: [
        { area: disc, strength: 1 },
        { area: polygon, strength: 0.2 },
      ],
    });
    expect(sources).toMatchObject({ capacity: 1, vigour: 1, cover: 0 });
    expect(layerSourcesSchema.parse(sources)).toEqual(sources);
  });
});
