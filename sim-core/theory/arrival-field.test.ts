import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { arrivalField, type ArrivalField } from './arrival-field.ts';
import { arrivalTimes } from './arrival-time.ts';

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
