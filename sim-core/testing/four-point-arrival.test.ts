import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { arrivalQueue } from './four-point-queue.ts';
import { arrivalTimes, type ArrivalInput } from './four-point-arrival.ts';

/** Growth at 1 m/yr from the middle of a square of n × n nodes, h apart. */
function fromMiddle(n: number, order: 1 | 2, exactWithin = 0) {
  const h = 1 / (n - 1);
  const middle = (n - 1) / 2;
  const exact = Float64Array.from({ length: n * n }, (_, i) => {
    return h * Math.hypot((i % n) - middle, Math.floor(i / n) - middle);
  });
  const starts = exact.map((t) => (t <= exactWithin + 1e-12 ? t : Infinity));
  const times = arrivalTimes({
    width: n,
    height: n,
    cellSize: h,
    speed: new Float64Array(n * n).fill(1),
    starts,
    order,
  });
  return { times, worst: Math.max(...times.map((t, i) => Math.abs(t - exact[i]))) };
}

const open = (width: number, height: number, given: Partial<ArrivalInput> = {}): ArrivalInput => ({
  width,
  height,
  cellSize: 1,
  speed: new Float64Array(width * height).fill(1),
  starts: new Float64Array(width * height).fill(Infinity).fill(0, 0, 1),
  ...given,
});

describe('against exact distances, Sethian 1996, PNAS 93:1591; Zhao 2005, Math. Comp. 74:603', () => {
  test('first order on 5 × 5 cells, by hand', () => {
    const { times } = fromMiddle(5, 1);
    const at = (x: number, y: number) => times[(2 + y) * 5 + 2 + x] * 4;
    expect(at(0, 0)).toBe(0);
    expect(at(1, 0)).toBeCloseTo(1, 12);
    expect(at(1, 1)).toBeCloseTo(1 + Math.SQRT1_2, 12);
    expect(at(0, -2)).toBeCloseTo(2, 12);
    expect(at(-1, 2)).toBeCloseTo(2.54532893, 8);
    expect(at(2, 2)).toBeCloseTo(3.25243571, 8);
  });

  // Largest errors at h = 1/40, 1/80, 1/160, 1/320, from another implementation of the same papers.
  test.each<[string, 1 | 2, number, number[], number, number]>([
    ['order 1 from a point: h ln 1/h', 1, 0, [2.562e-2, 1.553e-2, 9.189e-3, 5.327e-3], 0.7, 0.8],
    ['order 1, exact within 0.1: h', 1, 0.1, [1.706e-2, 8.573e-3, 4.31e-3, 2.157e-3], 0.98, 1.02],
    ['order 2 from a point: h', 2, 0, [8.224e-3, 4.112e-3, 2.056e-3, 1.028e-3], 0.98, 1.02],
    ['order 2, exact within 0.1: h²', 2, 0.1, [3.394e-3, 7.303e-4, 1.78e-4, 4.274e-5], 1.95, 2.3],
  ])('%s', (_, order, exactWithin, published, slowest, fastest) => {
    const errors = [41, 81, 161, 321].map((n) => fromMiddle(n, order, exactWithin).worst);
    errors.forEach((error, i) => expect(error / published[i]).toBeCloseTo(1, 2));
    for (let i = 1; i < 4; i++) {
      const rate = Math.log2(errors[i - 1] / errors[i]);
      expect(rate).toBeGreaterThan(slowest);
      expect(rate).toBeLessThan(fastest);
    }
  });
});

test('goes round a wall by its end: the length of the taut string', () => {
  // From (10, 10) to (70, 10), a wall at x = 40 that leaves room from y = 60 on: two legs past its end.
  const [width, height] = [81, 81];
  const speed = new Float64Array(width * height).fill(2);
  for (let y = 0; y < 60; y++) speed[y * width + 40] = 0;
  const starts = new Float64Array(width * height).fill(Infinity);
  starts[10 * width + 10] = 3;
  const times = arrivalTimes({ width, height, cellSize: 0.5, speed, starts, order: 2 });
  const taut = Math.hypot(30, 50) * 2;
  expect(times[10 * width + 70]).toBeGreaterThan(3 + (taut * 0.5) / 2);
  expect(times[10 * width + 70]).toBeLessThan(3 + (1.02 * taut * 0.5) / 2);
  expect(times[30 * width + 40]).toBe(Infinity);
});

test('across a border between speeds: the fastest way of refraction, to first order', () => {
  // 1 m/yr above row 40 and 3 m/yr from it on; from (10, 10) to (70, 70), crossing where the sum is least.
  const n = 81;
  const speed = Float64Array.from({ length: n * n }, (_, i) => (i < 40 * n ? 1 : 3));
  const starts = new Float64Array(n * n).fill(Infinity);
  starts[10 * n + 10] = 0;
  const found = arrivalTimes({ width: n, height: n, cellSize: 1, speed, starts, order: 2 })[70 * n + 70];
  let least = Infinity;
  // The border between cells lies half a cell before the centres of row 40.
  for (let x = 10; x <= 70; x += 0.01)
    least = Math.min(least, Math.hypot(x - 10, 29.5) + Math.hypot(70 - x, 30.5) / 3);
  expect(Math.abs(found / least - 1)).toBeLessThan(0.02);
});

describe('starts', () => {
  test.each([1, 2] as const)('from the edge of what stands, whole cells at a time, order %i', (order) => {
    const starts = new Float64Array(60).fill(Infinity);
    for (const [from, to] of [
      [0, 4],
      [20, 24],
      [40, 44],
    ])
      starts.fill(0, from, to);
    const times = arrivalTimes(open(20, 3, { starts, cellSize: 2, order }));
    times.forEach((t, i) => expect(t).toBeCloseTo(2 * Math.max(0, (i % 20) - 3), 12));
  });
  test('each cell takes the one that comes first, later starts included', () => {
    const starts = new Float64Array(21).fill(Infinity);
    starts[0] = 0;
    starts[20] = 5;
    starts[3] = 17; // is reached before it starts
    const times = arrivalTimes(open(21, 1, { starts, cellSize: 2 }));
    times.forEach((t, i) => expect(t).toBeCloseTo(Math.min(2 * i, 5 + 2 * (20 - i)), 12));
  });
  test('on an obstacle, or cut off by one, nothing arrives', () => {
    const speed = Float32Array.of(1, 1, 0, 1, NaN, 1);
    const starts = Float64Array.of(0, Infinity, 0, Infinity, 0, Infinity);
    expect([...arrivalTimes(open(6, 1, { speed, starts }))]).toEqual([
      0,
      1,
      Infinity,
      Infinity,
      Infinity,
      Infinity,
    ]);
  });
  test('none: nowhere; another size: refused', () => {
    expect([...arrivalTimes(open(2, 1, { starts: Float64Array.of(Infinity, Infinity) }))]).toEqual([
      Infinity,
      Infinity,
    ]);
    expect(() => arrivalTimes(open(3, 3, { speed: new Float64Array(8) }))).toThrow(
      'Found 8 speeds and 9 starts; expected 3 × 3 = 9',
    );
  });
});

test('properties: mirrored ground mirrors the times, more starts or speed are never later', () => {
  const cell = fc.record({
    speed: fc.constantFrom(0, 0.5, 1, 4),
    start: fc.constantFrom(Infinity, Infinity, 0, 3),
  });
  const map = fc
    .tuple(fc.integer({ min: 1, max: 9 }), fc.integer({ min: 1, max: 9 }))
    .chain(([width, height]) =>
      fc.array(cell, { minLength: width * height, maxLength: width * height }).map((cells) => ({
        width,
        height,
        cellSize: 1,
        speed: Float64Array.from(cells, (c) => c.speed),
        starts: Float64Array.from(cells, (c) => c.start),
      })),
    );
  fc.assert(
    fc.property(map, fc.constantFrom<1 | 2>(1, 2), fc.nat(80), (input, order, pick) => {
      const times = arrivalTimes({ ...input, order });
      const back = <T extends Float64Array>(values: T) => values.toReversed();
      const turned = arrivalTimes({ ...input, order, speed: back(input.speed), starts: back(input.starts) });
      expect(back(turned)).toEqual(times);
      // First order is monotone; the second is not, exactly.
      const starts = input.starts.slice();
      starts[pick % starts.length] = 0;
      const sooner = arrivalTimes({ ...input, starts });
      const faster = arrivalTimes({ ...input, speed: input.speed.map((v) => 2 * v) });
      arrivalTimes(input).forEach((t, i) => {
        expect(sooner[i]).toBeLessThanOrEqual(t + 1e-12);
        expect(faster[i]).toBeLessThanOrEqual(t + 1e-12);
      });
    }),
    { seed: 11, numRuns: 300 },
  );
});

test('the queue gives out cells in order, also after they moved either way', () => {
  const time = fc.integer({ min: 0, max: 50 });
  fc.assert(
    fc.property(fc.array(fc.tuple(time, fc.option(time)), { maxLength: 200 }), (given) => {
      const queue = arrivalQueue(given.length);
      given.forEach(([first], cell) => queue.offer(cell, first));
      given.forEach(([, then], cell) => then !== null && queue.offer(cell, then));
      const latest = given.map(([first, then]) => then ?? first);
      const taken = given.map(() => {
        const earliest = queue.earliest();
        expect(latest[queue.take()]).toBe(earliest);
        return earliest;
      });
      expect(taken).toEqual(latest.toSorted((a, b) => a - b));
      expect([queue.take(), queue.earliest()]).toEqual([-1, Infinity]);
    }),
    { seed: 1 },
  );
  // More than the queue starts with room for.
  const queue = arrivalQueue(5000);
  const cells = Array.from({ length: 5000 }, (_, cell) => cell);
  cells.forEach((cell) => queue.offer(cell, (cell * 7919) % 5000));
  expect(cells.map(() => (queue.take() * 7919) % 5000)).toEqual(cells);
});
