import { expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import type { Belief } from '#sim-core/spec/belief.ts';
import { beliefQuantile, centralValue, cutShare } from './belief-quantile.ts';

const range = { min: 0.005, max: 20 };
const uniform: Belief = { law: 'uniform', low: 0.2, high: 1.5 };
const triangular: Belief = { law: 'triangular', low: 0.2, mode: 0.5, high: 1.5 };
const normal: Belief = { law: 'normal', mean: 0.5, standardDeviation: 0.4 };
const logNormal: Belief = { law: 'log-normal', median: 0.5, factor: 3 };
const beta: Belief = { law: 'beta', alpha: 2, beta: 5, low: 0.2, high: 0.8 };
const values: Belief = { law: 'values', values: [3, 1, 2, 10] };

// SciPy 1.17.1: stats.uniform.ppf(p, .2, 1.3), stats.triang.ppf(p, .3/1.3, .2, 1.3),
// stats.truncnorm.ppf(p, (.005-.5)/.4, (20-.5)/.4, .5, .4), exp(stats.truncnorm.ppf(p, log(.005/.5)/log(3),
// log(20/.5)/log(3), log(.5), log(3))), .2 + .6 stats.beta.ppf(p, 2, 5); NumPy: quantile([3, 1, 2, 10], p).
test.each([
  [uniform, [0.213, 0.525, 0.85, 1.37]],
  [triangular, [0.262449979983984, 0.512579117093425, 0.6937742251701451, 1.1394448724536013]],
  [normal, [0.023690584160965478, 0.32509783965346706, 0.5542846573347552, 1.038266905235722]],
  [logNormal, [0.03883245185246785, 0.23824550015028415, 0.4997391147389644, 2.0392439719382986]],
  [beta, [0.21605791468565305, 0.2966977500741959, 0.3586699899773961, 0.5061897839308951]],
  [values, [1.03, 1.75, 2.5, 7.9]],
])('quantiles of %o', (belief, expected) => {
  const quantile = beliefQuantile(belief, range);
  for (const [i, p] of [0.01, 0.25, 0.5, 0.9].entries()) expect(quantile(p)).toBeCloseTo(expected[i], 11);
});

test('what lies beyond the range is cut off and told', () => {
  // SciPy 1.17.1: 1 − (norm.cdf(high) − norm.cdf(low)) of the two laws above.
  expect(cutShare(normal, range)).toBeCloseTo(0.10795075716732483, 12);
  expect(cutShare(logNormal, range)).toBeCloseTo(0.0004067171730149921, 12);
  expect(cutShare(beta, range)).toBe(0);
  // A median within a range that begins at or below 0: nothing of a log-normal law lies there.
  expect(cutShare(logNormal, { min: -10, max: 1e6 })).toBeCloseTo(0, 12);
});

test.each([uniform, triangular, normal, logNormal, beta, values, { ...normal, standardDeviation: 1e6 }])(
  '%o never leaves its range and rises with the share',
  (belief) => {
    const quantile = beliefQuantile(belief, range);
    const random = stream('range', 'survey');
    const shares = [1e-12, 1 - 1e-12, ...Array.from({ length: 300 }, () => random.double())].sort(
      (a, b) => a - b,
    );
    const drawn = shares.map(quantile);
    expect(drawn.every((x) => x >= range.min && x <= range.max)).toBe(true);
    for (let i = 1; i < drawn.length; i++) expect(drawn[i]).toBeGreaterThanOrEqual(drawn[i - 1]);
  },
);

test('a triangular law may have its mode at an end', () => {
  const rising = beliefQuantile({ law: 'triangular', low: 0, mode: 1, high: 1 }, range);
  const falling = beliefQuantile({ law: 'triangular', low: 1, mode: 1, high: 2 }, range);
  // Shares x² of 0..1 and 1 − (2 − x)² of 1..2, by hand.
  expect(rising(0.25)).toBeCloseTo(0.5, 14);
  expect(falling(0.75)).toBeCloseTo(1.5, 14);
});

test('a single run takes the mode of a triangular law and the median of any other', () => {
  expect(centralValue(triangular, range)).toBe(0.5);
  expect(centralValue(uniform, range)).toBeCloseTo(0.85, 14);
  expect(centralValue(values, range)).toBe(2.5);
});
