import { expect, test } from 'vitest';
import { parameters } from '#sim-core/spec/parameters.ts';
import { beliefWithin, type Belief } from '#sim-core/spec/belief.ts';
import { fieldProblems } from '#sim-core/spec/problems.ts';

const problems = (belief: Belief) => {
  const parsed = beliefWithin(parameters.lateralSpread).safeParse(belief);
  return parsed.success ? [] : fieldProblems(parsed.error);
};

test.each<[Belief, string, RegExp]>([
  [{ law: 'uniform', low: 1, high: 1 }, 'high', /Found 1; expected more than the low value, 1/],
  [
    { law: 'uniform', low: 0.001, high: 1 },
    'low',
    /Found 0.001; Lateral spread must lie between 0.005 and 20 m\/yr/,
  ],
  [
    { law: 'triangular', low: 1, mode: 0.5, high: 2 },
    'mode',
    /Found 0.5; the likeliest value lies between 1 and 2/,
  ],
  [{ law: 'triangular', low: 2, mode: 1.5, high: 1 }, 'high', /Found 1; expected more than the low value, 2/],
  [{ law: 'normal', mean: 30, standardDeviation: 1 }, 'mean', /Found 30/],
  [{ law: 'normal', mean: 1, standardDeviation: 0 }, 'standardDeviation', /expected number to be >0/],
  [{ law: 'log-normal', median: 21, factor: 2 }, 'median', /Found 21/],
  [{ law: 'log-normal', median: 1, factor: 1 }, 'factor', /./],
  [{ law: 'beta', alpha: 2, beta: 2, low: 0.2, high: 50 }, 'high', /Found 50/],
  [{ law: 'values', values: [0.4, 25, 1] }, 'values.1', /Value 2: Found 25/],
  [{ law: 'values', values: [0.4, 0.4] }, 'values', /known exactly needs no belief/],
  [{ law: 'values', values: [0.4] }, 'values', /./],
])('%o is refused at %s', (belief, field, message) => {
  expect(problems(belief)).toEqual([{ field, message: expect.stringMatching(message) as string }]);
});

test('what lies within is taken', () => {
  expect(problems({ law: 'normal', mean: 0.5, standardDeviation: 5 })).toEqual([]);
  expect(problems({ law: 'triangular', low: 0.2, mode: 0.2, high: 1 })).toEqual([]);
});
