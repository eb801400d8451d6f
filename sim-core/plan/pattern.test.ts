import { describe, expect, test } from 'vitest';
import { gridOf } from '#sim-core/testing/setups.ts';
import type { Point } from './extent.ts';
import { layPattern, type Pattern, type PatternInput } from './pattern.ts';

const side = 100;
const grid = gridOf(side, side, 2);
const cells = side * side;
const place = (x: number, y: number): Point => [grid.originX + x, grid.originY - y];
/** A square of 160 m, 20 m from the edges of the map. */
const square = [place(20, 20), place(180, 20), place(180, 180), place(20, 180)];
const area = 160 * 160;
const everywhere = new Uint8Array(cells).fill(255);

const lay = (pattern: Pattern, more: Partial<PatternInput> = {}) =>
  layPattern({ pattern, ring: square, grid, capacity: everywhere, seed: 'a', ...more });

/** By the even-odd rule, edge by edge. */
const insideRing = (x: number, y: number, ring: readonly Point[]) =>
  ring.filter(([xi, yi], i) => {
    const [xj, yj] = ring[(i + 1) % ring.length];
    return yi > y !== yj > y && x < xi + ((y - yi) / (yj - yi)) * (xj - xi);
  }).length %
    2 ===
  1;
const distance = ([x, y]: Point, [ox, oy]: Point) => Math.hypot(x - ox, y - oy);
const nearest = (points: readonly Point[]) =>
  points.map((point, i) =>
    points.reduce((least, other, j) => (i === j ? least : Math.min(least, distance(point, other))), Infinity),
  );
/**
 * Mean distance to the nearest other, over what random points of that density have, 1 / (2 √n) (Clark & Evans 1954, Ecology
 * 35:445), without correction for the edge: near it, neighbours outside are missing, which raises the ratio a little.
 */
const clarkEvans = (points: readonly Point[], openArea = area) =>
  (nearest(points).reduce((a, b) => a + b, 0) / points.length) * 2 * Math.sqrt(points.length / openArea);

const kinds: Pattern[] = [
  { kind: 'scattered', amount: { by: 'count', count: 90 } },
  { kind: 'apart', distance: 9, amount: { by: 'count', count: 90 } },
  { kind: 'grid', angle: 17, amount: { by: 'count', count: 90 } },
  { kind: 'groups', each: 6, reach: 4, distance: 12, amount: { by: 'count', count: 90 } },
  { kind: 'line', line: [place(30, 30), place(170, 60), place(60, 150)], amount: { by: 'count', count: 90 } },
];

describe.each(kinds)('$kind', (pattern) => {
  test('as many as asked, inside, and the same for the same seed', () => {
    const { points, asked, short, openArea } = lay(pattern);
    expect([points.length, asked, short]).toEqual([90, 90, undefined]);
    expect(openArea).toBeCloseTo(area, 6);
    expect(points.every(([x, y]) => insideRing(x, y, square))).toBe(true);
    expect(lay(pattern).points).toEqual(points);
    const drawn = pattern.kind === 'grid' || pattern.kind === 'line';
    expect(lay(pattern, { seed: 'b' }).points).toEqual(drawn ? points : expect.not.arrayContaining(points));
  });

  test('nowhere that works are not allowed, the plant cannot grow, or, if so wished, plants stand', () => {
    const strip = (from: number) => (i: number) => i % side >= from && i % side < from + 15;
    const shut = {
      capacity: everywhere.map((k, i) => (strip(20)(i) ? 0 : k)),
      allowed: everywhere.map((_, i) => (strip(45)(i) ? 0 : 1)),
      cover: Float32Array.from(everywhere, (_, i) => (strip(70)(i) ? 0.4 : 0)),
    };
    const { points, openArea } = lay(pattern, { ...shut, bareOnly: true });
    expect(openArea).toBeCloseTo(area * (35 / 80), 6);
    expect(points.length).toBeGreaterThan(40);
    for (const [x] of points) {
      const column = Math.floor((x - grid.originX) / 2);
      expect([20, 45, 70].some((from) => strip(from)(column))).toBe(false);
    }
  });
});

describe('how points lie', () => {
  test('apart: never nearer than the distance, and no place left for one more', () => {
    const { points, short } = lay({ kind: 'apart', distance: 9 });
    expect(short).toBeUndefined();
    expect(Math.min(...nearest(points))).toBeGreaterThanOrEqual(9);
    for (let x = 21; x < 180; x += 2)
      for (let y = 21; y < 180; y += 2)
        expect(Math.min(...points.map((p) => distance(p, place(x, y))))).toBeLessThan(9 + 1.5);
    // Between the densest, 2 / √3 on d², and the loosest that nothing more fits into.
    expect((points.length * 81) / area).toBeGreaterThan(0.6);
    expect((points.length * 81) / area).toBeLessThan(2 / Math.sqrt(3));
  });

  test('apart: fills ground in several pieces', () => {
    const allowed = everywhere.map((_, i) => (i % side < 20 || i % side > 80 ? 1 : 0));
    const { points } = lay({ kind: 'apart', distance: 5 }, { allowed });
    const west = points.filter(([x]) => x < grid.originX + 100).length;
    expect(west).toBeGreaterThan(20);
    expect(points.length - west).toBeGreaterThan(20);
  });

  test('Clark–Evans ratio: clumped < random < apart < grid, which is 2', () => {
    const of = (pattern: Pattern) => clarkEvans(lay(pattern).points);
    const amount = { by: 'count' as const, count: 400 };
    const clumped = of({ kind: 'groups', each: 8, reach: 2, distance: 0, amount });
    const random = of({ kind: 'scattered', amount });
    const apart = of({ kind: 'apart', distance: 5.5, amount });
    const inRows = of({ kind: 'grid', angle: 0, amount });
    expect(clumped).toBeLessThan(0.4);
    // Standard error 0.26136 / √(n · n/A) of the mean distance: 0.52272 / √n of the ratio (Clark & Evans 1954).
    expect(Math.abs(random - 1)).toBeLessThan(3.5 * (0.52272 / Math.sqrt(400)));
    expect(apart).toBeGreaterThan(1.3);
    expect(apart).toBeLessThan(inRows);
    expect(inRows).toBeCloseTo(2, 6);
  });

  test('scattered: every quarter gets its share', () => {
    const { points } = lay({ kind: 'scattered', amount: { by: 'count', count: 4000 } });
    const quarters = [0, 0, 0, 0];
    for (const [x, y] of points)
      quarters[(x > square[0][0] + 80 ? 1 : 0) + (y > square[0][1] - 80 ? 2 : 0)]++;
    const chiSquared = quarters.reduce((sum, n) => sum + (n - 1000) ** 2 / 1000, 0);
    expect(chiSquared).toBeLessThan(16.27); // 0.999 of χ² with 3 degrees of freedom
  });

  test('grid: square, turned by its angle', () => {
    const { points } = lay({ kind: 'grid', angle: 30, amount: { by: 'spacing', spacing: 10 } });
    expect(Math.abs(points.length - area / 100)).toBeLessThan(25);
    for (const away of nearest(points)) expect(away).toBeCloseTo(10, 6);
    const row = points.findIndex((point, i) => i > 0 && distance(point, points[i - 1]) < 11);
    const [first, second] = points.slice(row - 1);
    expect(Math.atan2(second[1] - first[1], second[0] - first[0])).toBeCloseTo(Math.PI / 6, 6);
    expect(lay({ kind: 'grid', angle: 0, amount: { by: 'spacing', spacing: 16 } }).points).toHaveLength(100);
  });

  test('groups: each round its middle, middles apart', () => {
    const { points } = lay({
      kind: 'groups',
      each: 7,
      reach: 3,
      distance: 20,
      amount: { by: 'count', count: 100 },
    });
    const groups = Array.from({ length: 15 }, (_, i) => points.slice(7 * i, 7 * i + 7));
    expect(groups.map((group) => group.length)).toEqual([...new Array<number>(14).fill(7), 2]);
    for (const group of groups)
      for (const a of group) for (const b of group) expect(distance(a, b)).toBeLessThanOrEqual(6);
    const middles = groups.map((group): Point => [
      group.reduce((sum, [x]) => sum + x, 0) / group.length,
      group.reduce((sum, [, y]) => sum + y, 0) / group.length,
    ]);
    expect(Math.min(...nearest(middles))).toBeGreaterThan(20 - 6);
  });

  test('line: every spacing from its first point, corners cut by none', () => {
    const line = [place(30, 30), place(60, 30), place(60, 55)];
    const { points } = lay({ kind: 'line', line, amount: { by: 'spacing', spacing: 10 } });
    const expected = [
      [30, 30],
      [40, 30],
      [50, 30],
      [60, 30],
      [60, 40],
      [60, 50],
    ].map(([x, y]) => place(x, y));
    points.forEach(([x, y], i) => {
      expect(x).toBeCloseTo(expected[i][0], 6);
      expect(y).toBeCloseTo(expected[i][1], 6);
    });
    expect(points).toHaveLength(6);
    const ends = lay({ kind: 'line', line, amount: { by: 'count', count: 3 } }).points;
    expect(ends[0]).toEqual(line[0]);
    expect(distance(ends[2], line[2])).toBeLessThan(1e-5);
  });

  test('edge: so far outside of what stands, all the way round', () => {
    // A disc of 40 m that stands in the middle of the map.
    const cover = Float32Array.from({ length: cells }, (_, i) =>
      Math.hypot((i % side) - 49.5, Math.floor(i / side) - 49.5) * 2 <= 40 ? 0.8 : 0,
    );
    const { points } = lay({ kind: 'edge', offset: 10, amount: { by: 'spacing', spacing: 5 } }, { cover });
    const middle = place(100, 100);
    for (const point of points) expect(Math.abs(distance(point, middle) - 50.5)).toBeLessThan(1.5);
    expect(Math.abs(points.length - (2 * Math.PI * 50.5) / 5)).toBeLessThan(6);
    const counted = lay(
      { kind: 'edge', offset: 0, amount: { by: 'count', count: 24 } },
      { cover, bareOnly: true },
    );
    expect(counted.points).toHaveLength(24);
    for (const point of counted.points) expect(Math.abs(distance(point, middle) - 40.5)).toBeLessThan(1.5);
    expect(lay({ kind: 'edge', offset: 10, amount: { by: 'count', count: 5 } }).short).toContain(
      'no edge of what stands',
    );
  });

  test('edge: none along the edge of the map', () => {
    const cover = Float32Array.from({ length: cells }, (_, i) => (i % side < 30 ? 1 : 0));
    const ring = [place(0, 0), place(200, 0), place(200, 200), place(0, 200)];
    const { points } = lay(
      { kind: 'edge', offset: 4, amount: { by: 'spacing', spacing: 10 } },
      { cover, ring },
    );
    for (const [x] of points) expect(x - grid.originX).toBeCloseTo(64, 3);
    expect(Math.abs(points.length - 20)).toBeLessThan(2);
  });
});

describe('how many', () => {
  test('by density of open ground, by budget, by spacing', () => {
    const allowed = everywhere.map((_, i) => (i % side < 50 ? 1 : 0));
    const dense = lay({ kind: 'scattered', amount: { by: 'density', perHectare: 100 } }, { allowed });
    expect([dense.openArea, dense.points.length]).toEqual([area / 2, 128]);
    const bought = lay({ kind: 'grid', angle: 0, amount: { by: 'budget', budget: 1000, each: 30 } });
    expect([bought.asked, bought.points.length]).toEqual([33, 33]);
    expect(lay({ kind: 'scattered', amount: { by: 'budget', budget: 0.3, each: 0.1 } }).points).toHaveLength(
      3,
    );
    expect(lay({ kind: 'scattered', amount: { by: 'spacing', spacing: 8 } }).points).toHaveLength(400);
  });

  test('says how many fit where fewer do, and why none', () => {
    const apart = lay({ kind: 'apart', distance: 60, amount: { by: 'count', count: 50 } });
    expect(apart.short).toBe(`${apart.points.length} of 50 fit at least 60 m apart.`);
    expect(apart.points.length).toBeGreaterThan(3);
    const shut = lay(kinds[0], { allowed: new Uint8Array(cells) });
    expect(shut).toMatchObject({ points: [], short: expect.stringContaining('works are allowed') as string });
    const poor = lay({ kind: 'scattered', amount: { by: 'budget', budget: 10, each: 30 } });
    expect(poor.short).toContain('a larger budget');
  });

  test('any polygon, such as a star off the edge of the map: points inside it, and its area told', () => {
    const star = Array.from({ length: 10 }, (_, i) => {
      const reach = i % 2 === 0 ? 90 : 35;
      const turn = (i * Math.PI) / 5 + 0.2;
      return place(150 + reach * Math.cos(turn), 100 + reach * Math.sin(turn));
    });
    const { points, openArea } = lay({ kind: 'apart', distance: 3 }, { ring: star });
    expect(points.every(([x, y]) => insideRing(x, y, star) && x < grid.originX + 200)).toBe(true);
    let inside = 0;
    for (let x = 0.25; x < 200; x += 0.5)
      for (let y = 0.25; y < 200; y += 0.5) if (insideRing(...place(x, y), star)) inside++;
    expect(Math.abs(openArea / (inside / 4) - 1)).toBeLessThan(0.003);
  });

  test('a polygon smaller than a cell still takes points', () => {
    const ring = [place(50.2, 50.2), place(51, 50.2), place(51, 51), place(50.2, 51)];
    const { points, openArea } = lay({ kind: 'scattered', amount: { by: 'count', count: 5 } }, { ring });
    expect(points).toHaveLength(5);
    expect(Math.abs(openArea / 0.64 - 1)).toBeLessThan(0.5);
    expect(points.every(([x, y]) => insideRing(x, y, ring))).toBe(true);
  });

  test.each<[Pattern, RegExp]>([
    [{ kind: 'apart', distance: 0 }, /distance of 0; expected more than 0/],
    [{ kind: 'apart', distance: 0.1 }, /some 2,9\d\d,\d\d\d points; at most 100,000/],
    [{ kind: 'scattered', amount: { by: 'count', count: 2.5 } }, /Found 2.5 points; expected a whole number/],
    [
      { kind: 'grid', angle: 0, amount: { by: 'spacing', spacing: -1 } },
      /spacing of -1; expected more than 0/,
    ],
    [{ kind: 'scattered', amount: { by: 'density', perHectare: 1e6 } }, /at most 100,000/],
    [{ kind: 'groups', each: 0, reach: 1, distance: 1, amount: { by: 'count', count: 3 } }, /groups of 0/],
  ])('refuses %o', (pattern, message) => {
    expect(() => lay(pattern)).toThrow(message);
  });
});
