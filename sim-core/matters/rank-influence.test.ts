import { expect, test } from 'vitest';
import { latinHypercube } from '#sim-core/ensemble/latin-hypercube.ts';
import { stream } from '#sim-core/random/streams.ts';
import { rankInfluence } from './rank-influence.ts';

const columns = (points: readonly Float64Array[]) => Array.from(points[0], (_, i) => points.map((p) => p[i]));

test('of two factors it is the textbook formula of a partial correlation', () => {
  const x = [1, 2, 3, 4, 5, 6, 7, 8];
  const z = [2, 1, 4, 3, 6, 5, 8, 7];
  const y = [1, 3, 2, 5, 4, 8, 6, 7];
  // Spearman without ties: 1 − 6 Σd² / (n (n² − 1)); (r_xy − r_xz r_zy) / √((1 − r_xz²)(1 − r_zy²)) (Yule 1907).
  const spearman = (a: number[], b: number[]) =>
    1 - (6 * a.reduce((sum, v, i) => sum + (v - b[i]) ** 2, 0)) / (8 * 63);
  const [xy, xz, zy] = [spearman(x, y), spearman(x, z), spearman(z, y)];
  const [found] = rankInfluence([x, z], y)!.factors;
  expect(found.correlation).toBeCloseTo(xy, 12);
  expect(found.partial.estimate).toBeCloseTo((xy - xz * zy) / Math.sqrt((1 - xz ** 2) * (1 - zy ** 2)), 12);
  // Fisher 1924: tanh(artanh r ± 1.959964 / √(n − 3 − 1)).
  const half = 1.959963984540054 / Math.sqrt(4);
  expect(found.partial.low).toBeCloseTo(Math.tanh(Math.atanh(found.partial.estimate) - half), 9);
  expect(found.partial.high).toBeCloseTo(Math.tanh(Math.atanh(found.partial.estimate) + half), 9);
});

test('finds what rises, what falls and what does nothing, however bent, as long as it has one direction', () => {
  const points = latinHypercube('ranks', 200, 3);
  const noise = stream('noise', 'survey');
  const { factors, explained } = rankInfluence(
    columns(points),
    points.map(([a, b]) => Math.exp(4 * a) * (1.2 - b) + 0.5 * noise.double()),
  )!;
  expect(factors[0].partial.low).toBeGreaterThan(0.8);
  expect(factors[1].partial.high).toBeLessThan(-0.5);
  expect(factors[2].partial.low).toBeLessThan(0);
  expect(factors[2].partial.high).toBeGreaterThan(0);
  expect(explained).toBeGreaterThan(0.8);
});

test('nineteen in twenty intervals of a factor that does nothing hold 0', () => {
  let held = 0;
  const trials = 400;
  for (let trial = 0; trial < trials; trial++) {
    const points = latinHypercube(`null ${trial}`, 30, 3);
    const noise = stream(`null ${trial}`, 'survey');
    const { partial } = rankInfluence(
      columns(points),
      points.map(([a]) => a + noise.double()),
    )!.factors[2];
    if (partial.low <= 0 && partial.high >= 0) held++;
  }
  // Three standard errors of 400 trials are 0.033.
  expect(Math.abs(held / trials - 0.95)).toBeLessThan(0.035);
});

test('too few points, nothing that changes and factors that move together tell nothing', () => {
  expect(rankInfluence([[1, 2, 3, 4]], [1, 2, 3, 4])).toBeUndefined();
  expect(rankInfluence([[1, 2, 3, 4, 5, 6]], [1, 1, 1, 1, 1, 1])).toBeUndefined();
  expect(
    rankInfluence(
      [
        [1, 2, 3, 4, 5, 6],
        [2, 4, 6, 8, 10, 12],
      ],
      [1, 3, 2, 5, 4, 6],
    ),
  ).toBeUndefined();
  expect(rankInfluence([], [1, 2, 3, 4, 5, 6])).toBeUndefined();
});
