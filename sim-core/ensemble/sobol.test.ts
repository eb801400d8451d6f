import { describe, expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import { wholeBelow } from '#sim-core/random/whole.ts';
import { mixColumns, sobolDesign, sobolIndices, type SobolDesign } from './sobol.ts';

type Model = (x: Float64Array) => number;
const run = (design: SobolDesign, f: Model) => ({
  a: design.a.map(f),
  b: design.b.map(f),
  mixed: design.mixed.map((points) => points.map(f)),
});

const ishigami =
  (b: number): Model =>
  (u) => {
    const [x, y, z] = u.map((v) => Math.PI * (2 * v - 1));
    return Math.sin(x) + 7 * Math.sin(y) ** 2 + b * z ** 4 * Math.sin(x);
  };
/** Sobol's g: Π (|4x − 2| + a) / (1 + a) */
const g =
  (a: number[]): Model =>
  (x) =>
    a.reduce((product, ai, i) => (product * (Math.abs(4 * x[i] - 2) + ai)) / (1 + ai), 1);

/** All pairs of points of a grid of `levels` midpoints a factor: the sums are then the integrals over that grid. */
function everyPair(factors: number, levels: number): SobolDesign {
  const grid = Array.from({ length: levels ** (2 * factors) }, (_, code) =>
    Float64Array.from(
      { length: 2 * factors },
      (_, i) => ((Math.floor(code / levels ** i) % levels) + 0.5) / levels,
    ),
  );
  return mixColumns(
    grid.map((p) => p.slice(0, factors)),
    grid.map((p) => p.slice(factors)),
    factors,
  );
}

describe('the estimators are exact where the sums are', () => {
  const indices = (design: SobolDesign, f: Model) => sobolIndices(run(design, f), 'exact', { resamples: 2 });
  test('x1 + 2 x2 + 3 x3: 1/14, 4/14, 9/14', () => {
    indices(everyPair(3, 2), (x) => x[0] + 2 * x[1] + 3 * x[2]).factors.forEach(({ first, total }, i) => {
      expect(first.estimate).toBeCloseTo((i + 1) ** 2 / 14, 12);
      expect(total.estimate).toBeCloseTo((i + 1) ** 2 / 14, 12);
    });
  });
  test('x1 x2: ¼ / (½ + v) alone and (¼ + v) / (½ + v) in all, with v the variance of a margin', () => {
    // v = 1/12 on the whole interval: 3/7 and 4/7, and a variance of 7/144.
    const v = (1 - 1 / 36) / 12;
    const found = indices(everyPair(2, 6), (x) => x[0] * x[1]);
    expect(found.mean).toBeCloseTo(0.25, 12);
    expect(found.variance).toBeCloseTo(v / 2 + v * v, 12);
    for (const { first, total } of found.factors) {
      expect(first.estimate).toBeCloseTo(0.25 / (0.5 + v), 12);
      expect(total.estimate).toBeCloseTo((0.25 + v) / (0.5 + v), 12);
    }
  });
});

describe('published indices lie within the intervals, and these are narrow', () => {
  const check = (f: Model, factors: number, first: number[], total: number[], width: number) => {
    const found = sobolIndices(run(sobolDesign('published', factors, 6000), f), 'published', {
      level: 0.999,
      resamples: 400,
    });
    found.factors.forEach((of, i) => {
      for (const [interval, value] of [
        [of.first, first[i]],
        [of.total, total[i]],
      ] as const) {
        expect(interval.low).toBeLessThanOrEqual(value);
        expect(interval.high).toBeGreaterThanOrEqual(value);
        expect(interval.high - interval.low).toBeLessThan(width);
        expect(interval.estimate).toBeGreaterThan(interval.low);
      }
    });
    return found;
  };
  test('Ishigami & Homma 1990, a = 7, b = 0.1', () => {
    const found = check(
      ishigami(0.1),
      3,
      [0.31390519114781146, 0.4424111447900409, 0],
      [0.5575888552099592, 0.4424111447900409, 0.2436836640621477],
      0.2,
    );
    expect(Math.abs(found.mean - 3.5)).toBeLessThan(0.15);
    expect(Math.abs(found.variance / 13.844587940719254 - 1)).toBeLessThan(0.05);
  });
  test('Ishigami & Homma 1990, b = 0.05', () => {
    check(
      ishigami(0.05),
      3,
      [0.2185185644, 0.6868946436, 0],
      [0.3131053564, 0.6868946436, 0.0945867919],
      0.2,
    );
  });
  test('g-function of Saltelli & Sobol’ 1995, a = 0, 1, 4.5, 9, 99, 99, 99, 99', () => {
    check(
      g([0, 1, 4.5, 9, 99, 99, 99, 99]),
      8,
      [0.716192169, 0.179048042, 0.0236757742, 0.00716192169, ...new Array<number>(4).fill(0.0000716192)],
      [0.787144127, 0.242198193, 0.0343169102, 0.0104603871, ...new Array<number>(4).fill(0.000104949052)],
      0.25,
    );
  });
});

test('nine in ten intervals of 90 % hold the index', () => {
  let held = 0;
  const trials = 150;
  for (let trial = 0; trial < trials; trial++) {
    const [factor] = sobolIndices(
      run(sobolDesign(`cover ${trial}`, 3, 200), ishigami(0.1)),
      `cover ${trial}`,
      {
        level: 0.9,
        resamples: 150,
      },
    ).factors;
    if (factor.total.low <= 0.5575888552099592 && 0.5575888552099592 <= factor.total.high) held++;
  }
  // Three standard errors of 150 trials are 0.073; a Latin hypercube's intervals may be wider than they need be.
  expect(held / trials).toBeGreaterThan(0.82);
});

test('a resample is the definition on the rows drawn, mean and variance included', () => {
  const [a, b, ab] = [
    [3, 1, 4, 1, 5, 9],
    [2, 6, 5, 3, 5, 8],
    [1, 4, 1, 4, 2, 13],
  ];
  const random = stream('again', 'bootstrap');
  const rows = a.map(() => wholeBelow(6, random));
  expect(new Set(rows).size).toBeLessThan(6);
  const mean = rows.reduce((sum, r) => sum + a[r] + b[r], 0) / 12;
  const variance = rows.reduce((sum, r) => sum + (a[r] - mean) ** 2 + (b[r] - mean) ** 2, 0) / 12;
  const first = rows.reduce((sum, r) => sum + (b[r] - mean) * (ab[r] - a[r]), 0) / (6 * variance);
  const total = rows.reduce((sum, r) => sum + (a[r] - ab[r]) ** 2, 0) / (12 * variance);
  const [found] = sobolIndices({ a, b, mixed: [ab] }, 'again', { resamples: 1 }).factors;
  expect(found.first.low).toBeCloseTo(first, 12);
  expect(found.first.high).toBeCloseTo(first, 12);
  expect(found.total.low).toBeCloseTo(total, 12);
});

test('what cannot be estimated', () => {
  const flat = sobolIndices({ a: [1, 1], b: [1, 1], mixed: [[1, 1]] }, 'flat', { resamples: 3 });
  expect(flat.factors[0].first.estimate).toBeNaN();
  expect(() => sobolIndices({ a: [1], b: [1], mixed: [[1]] }, 's')).toThrow('Found 1 rows');
  expect(() => sobolIndices({ a: [1, 2], b: [1, 2], mixed: [[1]] }, 's')).toThrow(
    'Found 1 outputs of mixed 0',
  );
  expect(() => sobolIndices({ a: [1, NaN], b: [1, 2], mixed: [[1, 2]] }, 's')).toThrow(
    'Output 1 of a is NaN',
  );
});
