import { describe, expect, test } from 'vitest';
import { morrisScreening, morrisTrajectories, trajectoryFrom, type Trajectory } from './morris.ts';

const delta = 2 / 3;
const orders = (n: number): number[][] =>
  n === 0
    ? [[]]
    : orders(n - 1).flatMap((o) => Array.from({ length: n }, (_, i) => o.toSpliced(i, 0, n - 1)));

/** Every walk of p = 4, Δ = 2/3: all base points, directions and orders. */
const everyWalk = (factors: number): Trajectory[] =>
  Array.from({ length: 4 ** factors }, (_, code) => code).flatMap((code) =>
    orders(factors).map((order) =>
      trajectoryFrom(
        Array.from({ length: factors }, (_, f) => ((code >> (2 * f)) & 1) / 3),
        Array.from({ length: factors }, (_, f) => ((code >> (2 * f + 1)) & 1) === 1),
        Uint32Array.from(order),
        delta,
      ),
    ),
  );

function screen(walks: Trajectory[], f: (x: Float64Array) => number) {
  const factors = walks[0].order.length;
  const screening = morrisScreening(factors);
  for (const walk of walks) screening.add(walk, walk.points.map(f));
  // The published deviations divide by n, ours by n − 1.
  const n = walks.length;
  return screening.effects().map((e) => ({ ...e, spread: e.deviation * Math.sqrt((n - 1) / n) }));
}

describe('Morris 1991, Technometrics 33:161, all base points', () => {
  // Computed from the published definitions.
  test.each<[string, (x: Float64Array) => number, number[], number[], number[]]>([
    [
      'x1 + 2 x2 + 3 x1 x3',
      (x) => x[0] + 2 * x[1] + 3 * x[0] * x[2],
      [2.5, 2, 1.5],
      [2.5, 2, 1.5],
      [1.1180339887, 0, 1.1180339887],
    ],
    ['(x1 − ½)² + x2: why sizes are needed', (x) => (x[0] - 0.5) ** 2 + x[1], [0, 1], [1 / 3, 1], [1 / 3, 0]],
    [
      'Ishigami on [0, 1]³',
      (x) => {
        const [a, b, c] = x.map((u) => Math.PI * (2 * u - 1));
        return Math.sin(a) + 7 * Math.sin(b) ** 2 + 0.1 * c ** 4 * Math.sin(a);
      },
      [7.7040541116, 0, 0],
      [7.7040541116, 7.875, 6.2487961033],
      [6.2487961033, 7.875, 8.8371321978],
    ],
  ])('%s', (_, f, mean, meanSize, spread) => {
    screen(everyWalk(mean.length), f).forEach((effect, i) => {
      expect(effect.mean).toBeCloseTo(mean[i], 9);
      expect(effect.meanSize).toBeCloseTo(meanSize[i], 9);
      expect(effect.spread).toBeCloseTo(spread[i], 9);
    });
  });

  test('the matrix B* for k = 2, x* = (⅓, ⅓), D = diag(1, −1), P the swap, and P the identity', () => {
    const rows = (rises: boolean[], order: number[]) =>
      trajectoryFrom([1 / 3, 1 / 3], rises, Uint32Array.from(order), delta).points.map((p) => [...p]);
    const third = expect.closeTo(1 / 3, 12);
    const one = expect.closeTo(1, 12);
    // The swap makes the first column of B the second factor's, and D's second sign the first factor's.
    expect(rows([false, true], [1, 0])).toEqual([
      [one, third],
      [one, one],
      [third, one],
    ]);
    expect(rows([true, false], [0, 1])).toEqual([
      [third, one],
      [one, one],
      [one, third],
    ]);
  });
});

describe('drawn walks', () => {
  const walks = morrisTrajectories('a', 5, 400);
  test('stay on the grid and move one factor at a time by Δ', () => {
    for (const { points, order, moves } of walks) {
      expect([...order].sort()).toEqual([0, 1, 2, 3, 4]);
      points.forEach((point, i) => {
        for (const x of point) expect(Math.abs(x * 3 - Math.round(x * 3))).toBeLessThan(1e-12);
        if (i === 0) return;
        const moved = [...point].map((x, f) => x - points[i - 1][f]);
        moved.forEach((by, f) => expect(by).toBeCloseTo(f === order[i - 1] ? moves[f] : 0, 12));
        expect(Math.abs(moves[order[i - 1]])).toBeCloseTo(delta, 12);
      });
    }
  });
  test('visit each level as often', () => {
    const counts = [0, 0, 0, 0];
    for (const { points } of walks) for (const x of points[0]) counts[Math.round(3 * x)]++;
    // 2,000 first values over four levels; χ² with 3 degrees of freedom exceeds 16.266 with chance 0.001.
    expect(counts.reduce((sum, n) => sum + (n - 500) ** 2 / 500, 0)).toBeLessThan(16.266);
  });
  test('give the mean sizes to within their standard errors', () => {
    const effects = screen(morrisTrajectories('b', 3, 400), (x) => x[0] + 2 * x[1] + 3 * x[0] * x[2]);
    [2.5, 2, 1.5].forEach((size, i) => {
      expect(Math.abs(effects[i].meanSize - size)).toBeLessThanOrEqual(4 * effects[i].meanSizeError + 1e-12);
    });
    expect(effects[0].meanSizeError).toBeCloseTo(1.118 / 20, 2);
  });
  test('follow from the seed', () => {
    expect(morrisTrajectories('a', 5, 400)).toEqual(walks);
    expect(morrisTrajectories('c', 5, 400)).not.toEqual(walks);
  });
});

test('what does not fit is refused', () => {
  expect(() => morrisTrajectories('a', 2, 1, 5)).toThrow('Found 5 levels');
  expect(() => morrisScreening(2).add(everyWalk(2)[0], [1, 2])).toThrow(
    'Found a walk of 2 factors with 2 outputs',
  );
});
