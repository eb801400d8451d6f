import { expect, test } from 'vitest';
import { normalCdf } from './normal-cdf.ts';

test('the normal distribution against scipy.stats.norm.cdf (SciPy 1.17.1)', () => {
  for (const [x, p] of [
    [-6, 9.865876450376946e-10],
    [-3, 0.0013498980316300933],
    [-1.959963984540054, 0.025],
    [-0.5, 0.3085375387259869],
    [1, 0.8413447460685429],
    [2.5, 0.9937903346742238],
  ])
    expect(normalCdf(x) / p).toBeCloseTo(1, 12);
  expect(normalCdf(0)).toBe(0.5);
});
