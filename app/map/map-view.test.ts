// @vitest-environment node
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Grid } from '#sim-core/grid/grid.ts';
import {
  bringIn,
  clampView,
  fitScale,
  largestScale,
  panBy,
  toGround,
  toScreen,
  wholeView,
  zoomAt,
} from './map-view.ts';

const grid: Grid = {
  width: 640,
  height: 372,
  cellSize: 2,
  originX: 412_200,
  originY: 5_302_000,
  epsg: 32630,
};
const size = { width: 1080, height: 608 };

describe('a map’s view', () => {
  it('puts the corners of the whole grid where they belong', () => {
    const view = wholeView(grid, size);
    const nw = toScreen(view, grid, size, grid.originX, grid.originY);
    const se = toScreen(view, grid, size, grid.originX + 1280, grid.originY - 744);
    expect(view.scale).toBeCloseTo(608 / 372);
    expect(nw.top).toBeCloseTo(0);
    expect(se.top).toBeCloseTo(608);
    expect(nw.left + se.left).toBeCloseTo(1080);
    expect(se.left - nw.left).toBeCloseTo(640 * view.scale);
  });

  it('keeps the whole grid clear of the furniture, in the middle of what is left, on any screen', () => {
    const edge = fc.integer({ min: 0, max: 90 });
    fc.assert(
      fc.property(
        fc.integer({ min: 400, max: 2000 }),
        fc.integer({ min: 400, max: 2000 }),
        fc.record({ left: edge, top: edge, right: edge, bottom: edge }),
        (width, height, clear) => {
          const room = { width, height, clear };
          const view = wholeView(grid, room);
          const nw = toScreen(view, grid, room, grid.originX, grid.originY);
          const se = toScreen(view, grid, room, grid.originX + 1280, grid.originY - 744);
          expect(nw.left).toBeGreaterThanOrEqual(clear.left - 1e-6);
          expect(nw.top).toBeGreaterThanOrEqual(clear.top - 1e-6);
          expect(se.left).toBeLessThanOrEqual(width - clear.right + 1e-6);
          expect(se.top).toBeLessThanOrEqual(height - clear.bottom + 1e-6);
          expect(nw.left - clear.left).toBeCloseTo(width - clear.right - se.left, 6);
          expect(nw.top - clear.top).toBeCloseTo(height - clear.bottom - se.top, 6);
          const kept = clampView(view, grid, room);
          expect(kept.x).toBeCloseTo(view.x, 6);
          expect(kept.y).toBeCloseTo(view.y, 6);
        },
      ),
    );
  });

  it('lets every corner of the ground come clear of the furniture, and no further than a hand’s breadth', () => {
    const room = { ...size, clear: { left: 24, top: 20, right: 44, bottom: 70 } };
    const view = { x: 412_840, y: 5_301_628, scale: 4 };
    const far = panBy(view, grid, room, 1e6, -1e6);
    const sw = toScreen(far, grid, room, grid.originX, grid.originY - 744);
    expect(sw.left).toBeCloseTo(24 + 40);
    expect(sw.top).toBeCloseTo(608 - 70 - 40);
  });

  it('still shows ground where the furniture would take the whole map', () => {
    const clear = { left: 200, top: 200, right: 200, bottom: 200 };
    expect(fitScale(grid, { width: 240, height: 240, clear })).toBeCloseTo(120 / 640);
  });

  it('finds the point of the ground that a place on the screen shows', () => {
    const places = fc.record({
      x: fc.double({ min: 412_200, max: 413_480, noNaN: true }),
      y: fc.double({ min: 5_301_256, max: 5_302_000, noNaN: true }),
      scale: fc.double({ min: 0.1, max: 64, noNaN: true }),
    });
    fc.assert(
      fc.property(
        places,
        fc.integer({ min: 0, max: 1080 }),
        fc.integer({ min: 0, max: 608 }),
        (view, left, top) => {
          const { x, y } = toGround(view, grid, size, { left, top });
          const back = toScreen(view, grid, size, x, y);
          expect(back.left).toBeCloseTo(left, 3);
          expect(back.top).toBeCloseTo(top, 3);
        },
      ),
    );
  });

  it('zooms about the pointer: what is below it stays there', () => {
    const view = { x: 412_800, y: 5_301_600, scale: 4 };
    const at = { left: 300, top: 420 };
    const held = toGround(view, grid, size, at);
    const now = toGround(zoomAt(view, grid, size, at, 2.5), grid, size, at);
    expect(now.x).toBeCloseTo(held.x, 6);
    expect(now.y).toBeCloseTo(held.y, 6);
  });

  it('never leaves the limits of zoom', () => {
    const far = zoomAt(wholeView(grid, size), grid, size, { left: 0, top: 0 }, 1e-6);
    expect(far.scale).toBeCloseTo(fitScale(grid, size));
    expect(zoomAt(far, grid, size, { left: 0, top: 0 }, 1e9).scale).toBe(largestScale);
  });

  it('moves by pixels and stops at the edge of the ground', () => {
    const view = { x: 412_840, y: 5_301_628, scale: 4 };
    expect(panBy(view, grid, size, 100, -40)).toEqual({ x: 412_790, y: 5_301_608, scale: 4 });
    const end = panBy(view, grid, size, 1e6, 1e6);
    const nw = toScreen(end, grid, size, grid.originX, grid.originY);
    expect(nw.left).toBeCloseTo(40);
    expect(nw.top).toBeCloseTo(40);
  });

  it('keeps a grid that is smaller than the map in the middle', () => {
    const view = clampView({ x: 0, y: 0, scale: 1e-9 }, grid, size);
    expect(view.x).toBe(412_840);
    expect(view.y).toBe(5_301_628);
  });

  it('brings a point in by the shortest way', () => {
    const view = { x: 412_840, y: 5_301_628, scale: 8 };
    const shown = bringIn(view, grid, size, 413_000, 5_301_628, 60);
    expect(toScreen(shown, grid, size, 413_000, 5_301_628).left).toBeCloseTo(1080 - 60);
    expect(shown.y).toBe(view.y);
    expect(bringIn(view, grid, size, 412_840, 5_301_628, 60)).toEqual(view);
  });
});
