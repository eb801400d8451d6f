// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { edgeTicks, formatCoordinate, niceStep, scaleBar } from './map-ticks.ts';

it.each([
  [1, 1],
  [1.01, 2],
  [3, 5],
  [50, 50],
  [51, 100],
  [0.3, 0.5],
  [700, 1000],
])('the nice step of at least %d is %d', (least, step) => {
  expect(niceStep(least)).toBe(step);
});

describe('edgeTicks', () => {
  it('ticks eastings at round metres with halves between', () => {
    const ticks = edgeTicks(412_187, 412_907, 1080, 110);
    expect(ticks.filter((t) => t.labelled).map((t) => t.value)).toEqual(
      Array.from({ length: 8 }, (_, i) => 412_200 + i * 100),
    );
    expect(ticks.map((t) => t.value).slice(0, 3)).toEqual([412_200, 412_250, 412_300]);
    expect(ticks[0].at).toBeCloseTo(13 * 1.5);
  });
  it('runs northings from the top down', () => {
    const ticks = edgeTicks(1000, 400, 600, 90).filter((t) => t.labelled);
    expect(ticks.find((t) => t.value === 900)?.at).toBeCloseTo(100);
    expect(ticks.find((t) => t.value === 400)?.at).toBeCloseTo(600);
  });
  it('never labels closer than the room asked for', () => {
    for (const span of [0.7, 13, 990, 54_321]) {
      const at = edgeTicks(5_301_000.3, 5_301_000.3 + span, 800, 88).filter((t) => t.labelled);
      for (let i = 1; i < at.length; i++) expect(at[i].at - at[i - 1].at).toBeGreaterThanOrEqual(88 - 1e-6);
      expect(at.length).toBeGreaterThan(1);
    }
  });
});

describe('scaleBar', () => {
  it.each([
    [0.59, 150, 50, 'm', ['0', '25', '50']],
    [1, 100, 100, 'm', ['0', '50', '100']],
    [20, 150, 2000, 'km', ['0', '1', '2']],
    [0.01, 150, 1, 'm', ['0', '0.5', '1']],
  ])('at %d m a px in %d px is %d m long', (perPixel, room, metres, unit, labels) => {
    const bar = scaleBar(perPixel, room);
    expect(bar).toMatchObject({ metres, unit, labels });
    expect(bar.pixels).toBeCloseTo(metres / perPixel);
    expect(bar.pixels).toBeLessThanOrEqual(room * (1 + 1e-9));
    expect(bar.pixels).toBeGreaterThan(room / 2.6);
  });
});

it('writes coordinates by thousands', () => {
  expect(formatCoordinate(5_301_925.4)).toBe('5\u00a0301\u00a0925');
});
