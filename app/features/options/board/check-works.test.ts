// @vitest-environment node
import { describe, expect, it } from 'vitest';
import type { Action } from '#sim-core/spec/run-spec.ts';
import { placeProblem, workProblem, worksProblem, type WorksGround } from './check-works.ts';

const grid = { width: 6, height: 4, cellSize: 2, originX: 100, originY: 50, epsg: 32631 };
const drawn = (text: string, values: Record<string, number>) =>
  Uint8Array.from([...text.replace(/\s/g, '')].map((mark) => values[mark]));
/** Water in the north-west, a strip in the east where works may not go. */
const ground: WorksGround = {
  grid,
  capacity: drawn('~..... ~~.... ...... ......', { '~': 0, '.': 255 }),
  allowed: drawn('.....# .....# .....# ......', { '#': 0, '.': 255 }),
};
const mound = (x: number, y: number): Action => ({
  kind: 'mound',
  year: 2028,
  x,
  y,
  radius: 1,
  strength: 1,
  halo: 0,
});
const ring = (west: number, south: number, east: number, north: number): [number, number][] => [
  [west, south],
  [east, south],
  [east, north],
  [west, north],
];
const fence = (...box: Parameters<typeof ring>): Action => ({
  kind: 'fence',
  year: 2028,
  strength: 1,
  area: { shape: 'polygon', ring: ring(...box) },
});

describe('a place', () => {
  it('is refused off the site, where nothing grows and where works may not go', () => {
    expect(placeProblem(ground, 104, 45)).toBeUndefined();
    expect(placeProblem(ground, 101, 49)).toContain('cannot grow there');
    expect(placeProblem(ground, 111, 49)).toContain('not allowed there');
    expect(placeProblem(ground, 111, 43)).toBeUndefined();
    expect(placeProblem(ground, 99, 49)).toContain('eastings run from 100 to 112 m');
    expect(placeProblem(ground, 101, 41.9)).toContain('northings from 42 to 50 m');
  });
  it('is taken while the layers are on their way, and everywhere without an allowed layer', () => {
    expect(placeProblem({ ...ground, capacity: undefined }, 101, 49)).toBeUndefined();
    expect(placeProblem({ ...ground, allowed: undefined }, 111, 49)).toBeUndefined();
  });
});

describe('works', () => {
  it('name the first place that cannot be taken', () => {
    expect(worksProblem(ground, [mound(104, 45), mound(101, 49), mound(111, 49)])).toMatchObject({
      x: 101,
      y: 49,
    });
    const clumps: Action = {
      kind: 'clumps',
      year: 2028,
      each: 1,
      points: [[104, 45] as const, [111, 49]].map((p) => [p[0], p[1]]),
    };
    expect(workProblem(ground, clumps)).toMatchObject({ x: 111, y: 49 });
  });
  it('of an outline are refused where a part of it is not allowed, and say how much', () => {
    const found = workProblem(ground, fence(104, 42.5, 111.9, 47.9));
    expect(found?.problem).toContain('in a part of the outline (8 m²)');
    expect([found?.x, found?.y]).toEqual([111, 47]);
    expect(workProblem(ground, fence(104, 42.5, 109.9, 47.9))).toBeUndefined();
    const loss: Action = {
      kind: 'loss',
      year: 2028,
      share: 0.5,
      area: { shape: 'polygon', ring: ring(104, 42.5, 111.9, 47.9) },
    };
    expect(workProblem(ground, loss)).toBeUndefined();
  });
  it('of an outline may hold some water, but not water alone, and must be an outline on the site', () => {
    expect(workProblem(ground, fence(100.5, 42.5, 105, 49.5))).toBeUndefined();
    expect(workProblem(ground, fence(100.5, 46.5, 101.5, 49.5))?.problem).toContain('can grow nowhere');
    expect(workProblem(ground, fence(100.2, 42.2, 100.4, 42.4))?.problem).toContain('no cell');
    expect(workProblem(ground, fence(100, 42, 110, 50))).toBeUndefined();
    expect(workProblem(ground, fence(90, 42.5, 105, 49.5))?.problem).toContain('off the site');
    const bow = fence(104, 43, 109, 47);
    if (bow.kind === 'fence' && bow.area.shape === 'polygon')
      bow.area.ring = [bow.area.ring[0], bow.area.ring[2], bow.area.ring[1], bow.area.ring[3]];
    expect(workProblem(ground, bow)?.problem).toContain('Two sides of the outline cross');
  });
});
