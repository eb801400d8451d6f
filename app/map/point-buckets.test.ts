// @vitest-environment node
import { expect, it } from 'vitest';
import { pointBuckets } from './point-buckets.ts';

/** Scattered without a pattern, in a strip. */
const points = Array.from({ length: 500 }, (_, i) => ({ x: (i * 7919) % 1000, y: (i * 104_729) % 37, i }));

it('shows every point near a place, and few of the others', () => {
  const buckets = pointBuckets(points);
  for (const [x, y, reach] of [
    [500, 20, 12],
    [0, 0, 30],
    [999, 36, 5],
    [-100, 10, 50],
  ]) {
    const seen = new Set<number>();
    buckets.near(x, y, reach, (point) => seen.add(point.i));
    const wanted = points.filter((p) => Math.hypot(p.x - x, p.y - y) <= reach);
    for (const { i } of wanted) expect(seen).toContain(i);
    expect(seen.size).toBeLessThan(100);
  }
});

it('takes none, one, and all in one place', () => {
  const count = (list: { x: number; y: number }[]) => {
    let seen = 0;
    pointBuckets(list).near(5, 5, 1, () => seen++);
    return seen;
  };
  expect(count([])).toBe(0);
  expect(count([{ x: 5, y: 5 }])).toBe(1);
  expect(count(Array.from({ length: 9 }, () => ({ x: 5.5, y: 5 })))).toBe(9);
});
