// @vitest-environment node
import { describe, expect, it } from 'vitest';
import type { Grid } from '#sim-core/grid/grid.ts';
import { footholdAt, symbolSize, type MapFoothold } from './map-symbols.ts';

const grid: Grid = { width: 100, height: 50, cellSize: 1, originX: 0, originY: 50, epsg: 32630 };
const size = { width: 1000, height: 500 };
const view = { x: 50, y: 25, scale: 10 };
const at = (id: string, x: number, y: number, kind: MapFoothold['kind']): MapFoothold => ({ id, x, y, kind });
const find = (footholds: MapFoothold[], left: number, top: number) =>
  footholdAt(footholds, view, grid, size, { left, top })?.id;

describe('footholdAt', () => {
  it('finds a flag by its cloth, which flies above and right of its point', () => {
    const flag = [at('a', 20, 30, 'planned')];
    expect(find(flag, 200, 200)).toBe('a');
    expect(find(flag, 207, 190)).toBe('a');
    expect(find(flag, 200, 215)).toBeUndefined();
  });
  it('has targets of at least 24 px', () => {
    const mound = [at('m', 20, 30, 'surveyed')];
    for (const [dx, dy] of [
      [12, 0],
      [-12, 0],
      [0, 12],
      [0, -12],
    ])
      expect(find(mound, 200 + dx, 200 + dy)).toBe('m');
    expect(find(mound, 215, 200)).toBeUndefined();
  });
  it('takes the nearest, and what people planned before what was there', () => {
    const both = [at('m', 20, 30, 'surveyed'), at('p', 20.4, 30, 'planned'), at('q', 21.4, 30, 'planned')];
    expect(find(both, 200, 200)).toBe('p');
    expect(find([...both].reverse(), 200, 200)).toBe('p');
    expect(find(both, 219, 195)).toBe('q');
  });
});

it('symbols shrink where they would cover the map, and never below two fifths', () => {
  expect(symbolSize(view, grid, 0)).toBe(1);
  expect(symbolSize(view, grid, 10)).toBe(1);
  expect(symbolSize(view, grid, 4000)).toBeLessThan(1);
  expect(symbolSize(view, grid, 1_000_000)).toBe(0.4);
});
