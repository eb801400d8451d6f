import { expect, test } from 'vitest';
import { fitted, runTrial } from './testing/fit-trial.ts';

test('known rates are found again from their resurveys, within far less than was believed before', () => {
  const trials = ['one', 'two', 'three'].map((seed) =>
    runTrial(seed, { population: 40, priorRuns: 160, mostRuns: 400 }),
  );
  const held = trials.flatMap(({ truth, intervals }) =>
    truth.filter((value, i) => value >= intervals[i][0] && value <= intervals[i][2]),
  );
  // Six intervals of nine tenths: fewer than four held would come once in a thousand such tests.
  expect(held.length).toBeGreaterThanOrEqual(4);
  const widths = trials.map(({ intervals: [[low, , high]] }) => high - low);
  const [{ belief }] = fitted;
  if (belief.law !== 'uniform') throw new Error('Expected a uniform belief');
  for (const width of widths) expect(width).toBeLessThan(0.6 * (belief.high - belief.low));
}, 120_000);
