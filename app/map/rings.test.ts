// @vitest-environment node
import { describe, expect, it } from 'vitest';
import {
  crossesItself,
  discRing,
  distanceToLine,
  isInside,
  lineLength,
  pointInside,
  ringArea,
  type Ring,
} from './rings.ts';

/** An L of 10 × 10 with a 6 × 6 notch in its north-eastern corner, far from the origin as sites are. */
const l: Ring = (
  [
    [0, 0],
    [10, 0],
    [10, 4],
    [4, 4],
    [4, 10],
    [0, 10],
  ] as const
).map(([x, y]) => [412_000 + x, 5_301_000 + y]);
const at = (x: number, y: number) => [412_000 + x, 5_301_000 + y] as const;

describe('rings', () => {
  it('knows its inside, area and length', () => {
    expect(isInside(l, ...at(2, 8))).toBe(true);
    expect(isInside(l, ...at(8, 8))).toBe(false);
    expect(ringArea(l)).toBeCloseTo(64, 9);
    expect(ringArea([...l].reverse())).toBeCloseTo(64, 9);
    expect(lineLength(l, true)).toBeCloseTo(40, 9);
    expect(lineLength(l, false)).toBeCloseTo(30, 9);
  });
  it('measures to the nearest side, the last one where it is closed', () => {
    expect(distanceToLine(l, ...at(8, 8), true)).toBeCloseTo(4, 9);
    expect(distanceToLine(l, ...at(-3, 5), true)).toBeCloseTo(3, 9);
    expect(distanceToLine(l, ...at(-3, 5), false)).toBeCloseTo(Math.hypot(3, 5), 9);
  });
  it('tells a bow tie from an outline', () => {
    const bow: Ring = [at(0, 0), at(10, 10), at(10, 0), at(0, 10)];
    expect(crossesItself(bow)).toBe(true);
    expect(crossesItself(l)).toBe(false);
    expect(crossesItself([at(0, 0), at(1, 0), at(0, 1)])).toBe(false);
  });
  it('finds a point inside where the middle of the box is outside', () => {
    const [x, y] = pointInside(l);
    expect(isInside(l, x, y)).toBe(true);
  });
  it('rounds a disc within 1 % of its area', () => {
    expect(ringArea(discRing(...at(3, 3), 5)) / (Math.PI * 25)).toBeGreaterThan(0.99);
  });
});
