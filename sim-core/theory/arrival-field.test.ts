import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { arrivalField, type ArrivalField } from './arrival-field.ts';
import { arrivalTimes } from '#sim-core/testing/four-point-arrival.ts';

interface Edit {
  readonly kind: 'start' | 'faster';
  readonly cell: number;
  readonly years: number;
  readonly from?: number;
}

const all = (field: ArrivalField, cells: number) =>
  Float32Array.from({ length: cells }, (_, i) => field.time(i));

/** Growth at 1 m/yr from the middle of a square of n × n nodes, h apart; the largest error, m. */
function worstFromMiddle(n: number): number {
  const h = 1 / (n - 1);
  const middle = (n - 1) / 2;
  const field = arrivalField({ width: n, height: n, crossing: new Float32Array(n * n).fill(h), latest: 2 });
  field.setStart(middle * n + middle, 0);
  field.update();
  const errors = Array.from({ length: n * n }, (_, i) =>
    Math.abs(field.time(i) - h * Math.hypot((i % n) - middle, Math.floor(i / n) - middle)),
  );
  return Math.max(...errors);
}

test('against exact distances: four times nearer than first order on four points, and as h ln 1/h', () => {
  // First order on four points (Zhao 2005) errs by 2.562e-2, 1.553e-2, 9.189e-3; second by 8.224e-3, 4.112e-3, 2.056e-3.
  const [a, b, c] = [41, 81, 161].map(worstFromMiddle);
  expect(a).toBeLessThan(2.562e-2 / 4);
  expect(b).toBeLessThan(1.553e-2 / 4);
  expect(c).toBeLessThan(9.189e-3 / 3.9);
  for (const rate of [Math.log2(a / b), Math.log2(b / c)]) {
    expect(rate).toBeGreaterThan(0.65);
    expect(rate).toBeLessThan(0.8);
  }
});

describe('whatever is changed, the times are those of a solve from scratch', () => {
  const [width, height] = [13, 11];
  const cells = width * height;
  const cell = fc.nat(cells - 1);
  const edit = fc.oneof(
    fc.record({
      kind: fc.constant('start' as const),
      cell,
      years: fc.constantFrom(0, 1.5, 4, 9, Infinity, Infinity),
    }),
    fc.record({
      kind: fc.constant('faster' as const),
      cell,
      years: fc.constantFrom(0.3, 0.8, Infinity),
      from: fc.constantFrom(0, 3, 8),
    }),
  );
  const ground = fc.array(fc.constantFrom(0.7, 1, 1, 2.3, Infinity), { minLength: cells, maxLength: cells });

  test('also after it was rolled back', () => {
    fc.assert(
      fc.property(
        ground,
        fc.array(fc.tuple(fc.array(edit, { maxLength: 6 }), fc.boolean()), { maxLength: 8 }),
        (crossings, rounds) => {
          const crossing = Float32Array.from(crossings);
          const make = () => arrivalField({ width, height, crossing, latest: 18 });
          const field = make();
          const kept: (typeof rounds)[number][0] = [];
          for (const [edits, back] of rounds) {
            const was = all(field, cells);
            for (const e of edits) apply(field, e);
            const { cells: changed, count, before } = field.update();
            const is = all(field, cells);
            const told = was.slice();
            for (let i = 0; i < count; i++) {
              expect(before[i]).toBe(was[changed[i]]);
              told[changed[i]] = is[changed[i]];
            }
            expect(told).toEqual(is);
            if (back) {
              field.rollBack();
              expect(all(field, cells)).toEqual(was);
            } else kept.push(...edits);
          }
          const scratch = make();
          for (const e of kept) apply(scratch, e);
          scratch.update();
          const [found, expected] = [all(field, cells), all(scratch, cells)];
          for (let i = 0; i < cells; i++)
            if (found[i] !== expected[i]) expect(found[i] / expected[i]).toBeCloseTo(1, 6);
        },
      ),
      { seed: 5, numRuns: 120 },
    );
  });

  function apply(field: ArrivalField, e: Edit): void {
    if (e.kind === 'start') field.setStart(e.cell, e.years);
    else field.setFaster(e.cell, e.years, e.from ?? 0);
  }
});

/** A field with everything in sight, its starts set. */
function solved(
  width: number,
  height: number,
  crossing: Float32Array,
  starts: [cell: number, years: number][],
  latest = 1000,
) {
  const field = arrivalField({ width, height, crossing, latest });
  for (const [cell, years] of starts) field.setStart(cell, years);
  field.update();
  return field;
}
const even = (cells: number, years = 1) => new Float32Array(cells).fill(years);

test('goes round a wall by its end: the length of the taut string', () => {
  // From (10, 10) to (70, 10), a wall at x = 40 that leaves room from y = 60 on: two legs past its end.
  const n = 81;
  const crossing = even(n * n, 0.25);
  for (let y = 0; y < 60; y++) crossing[y * n + 40] = Infinity;
  const field = solved(n, n, crossing, [[10 * n + 10, 3]]);
  const taut = 2 * Math.hypot(30, 50) * 0.25;
  expect(field.time(10 * n + 70)).toBeGreaterThan(3 + taut);
  expect(field.time(10 * n + 70)).toBeLessThan(3 + 1.02 * taut);
  expect(field.time(30 * n + 40)).toBe(Infinity);
});

test('across a border between speeds: the fastest way of refraction', () => {
  // 1 a year above row 40 and 3 a year from it on; from (10, 10) to (70, 70), crossing where the sum is least.
  const n = 81;
  const crossing = Float32Array.from({ length: n * n }, (_, i) => (i < 40 * n ? 1 : 1 / 3));
  const found = solved(n, n, crossing, [[10 * n + 10, 0]]).time(70 * n + 70);
  let least = Infinity;
  // The border between cells lies half a cell before the centres of row 40.
  for (let x = 10; x <= 70; x += 0.01)
    least = Math.min(least, Math.hypot(x - 10, 29.5) + Math.hypot(70 - x, 30.5) / 3);
  expect(Math.abs(found / least - 1)).toBeLessThan(0.015);
});

test('nothing slips through a corner between two obstacles, nor round the edge of the map', () => {
  // . #
  // # .
  const corner = solved(2, 2, Float32Array.of(1, Infinity, Infinity, 1), [[0, 0]]);
  expect([0, 1, 2, 3].map((cell) => corner.time(cell))).toEqual([0, Infinity, Infinity, Infinity]);
  const open = solved(2, 2, Float32Array.of(1, 1, Infinity, 1), [[0, 0]]);
  expect(open.time(3)).toBeCloseTo(Math.SQRT2, 6);
  // Column 2 is a wall: the end of a row does not touch the start of the next.
  const wall = Float32Array.from({ length: 12 }, (_, i) => (i % 4 === 2 ? Infinity : 1));
  const rows = solved(4, 3, wall, [[3, 0]]);
  expect([0, 4, 5, 8].map((cell) => rows.time(cell))).toEqual([Infinity, Infinity, Infinity, Infinity]);
  expect([7, 11].map((cell) => rows.time(cell))).toEqual([1, 2]);
});

test('each cell takes the start that comes first, a later one of its own too, and nothing after the latest year', () => {
  const starts: [number, number][] = [
    [0, 0],
    [20, 5],
    [3, 17],
  ];
  const line = solved(21, 1, even(21, 2), starts);
  for (let i = 0; i < 21; i++) expect(line.time(i)).toBeCloseTo(Math.min(2 * i, 5 + 2 * (20 - i)), 5);
  const short = solved(21, 1, even(21, 2), starts, 12);
  expect([short.time(6), short.time(7), short.time(17), short.time(16)]).toEqual([
    12,
    Infinity,
    11,
    Infinity,
  ]);
});

test('ground that turns fast is slow until then, and what is under way arrives no sooner', () => {
  const at = (from: number) => {
    const field = arrivalField({ width: 9, height: 1, crossing: even(9, 4), latest: 100 });
    field.setStart(0, 0);
    for (let cell = 3; cell < 6; cell++) field.setFaster(cell, 1, from);
    field.update();
    return [2, 3, 4, 5, 6].map((cell) => field.time(cell));
  };
  expect(at(0)).toEqual([8, 9, 10, 11, 15]);
  expect(at(10)).toEqual([8, 10, 11, 12, 16]);
  expect(at(14)).toEqual([8, 12, 14, 15, 19]);
  expect(at(50)).toEqual([8, 12, 16, 20, 24]);
});

test('refuses ground of another size, or that takes no time', () => {
  expect(() => arrivalField({ width: 3, height: 3, crossing: even(8), latest: 9 })).toThrow(
    'Found 8 crossings; expected 3 × 3 = 9',
  );
  expect(() => arrivalField({ width: 1, height: 1, crossing: even(1, 0), latest: 9 })).toThrow(
    'Found a crossing of 0 years; expected more than 0',
  );
});

test('agrees with the solver on four points to what both err', () => {
  const n = 60;
  const crossing = Float32Array.from({ length: n * n }, (_, i) =>
    i % n === 30 && Math.floor(i / n) < 40 ? Infinity : Math.floor(i / n) < 20 ? 1 : 2,
  );
  const field = arrivalField({ width: n, height: n, crossing, latest: 1000 });
  const starts = new Float64Array(n * n).fill(Infinity);
  for (const [at, years] of [
    [5 * n + 5, 0],
    [50 * n + 12, 7],
  ]) {
    starts[at] = years;
    field.setStart(at, years);
  }
  field.update();
  const times = arrivalTimes({
    width: n,
    height: n,
    cellSize: 1,
    speed: crossing.map((c) => 1 / c),
    starts,
    order: 2,
  });
  times.forEach((t, i) => {
    if (t === Infinity) expect(field.time(i)).toBe(Infinity);
    else expect(Math.abs(field.time(i) - t)).toBeLessThan(0.6 + 0.03 * t);
  });
});
