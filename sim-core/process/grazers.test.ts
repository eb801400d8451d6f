import { expect, test } from 'vitest';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import { processesSchema } from '#sim-core/spec/processes.ts';
import { dryness, grazerDecline, grazerTaps } from './grazers.ts';

const rates = processesSchema.parse({ grazers: {} }).grazers!;

test('predators hunt in full down to an index of −1, not at all from −4 on, and in proportion between', () => {
  expect([3, -1, -2.5, -4, -9].map(dryness)).toEqual([0, 0, 0.5, 1, 1]);
  const given = { ...rates, grazerMortality: 0.5, predation: 2 };
  expect(grazerDecline(given, 1, 0)).toBeCloseTo(-2.5, 12);
  expect(grazerDecline(given, 0.25, -2.5)).toBeCloseTo(-0.375, 12);
  expect(grazerDecline(given, 1, -6)).toBeCloseTo(-0.5, 12);
});

test('they spread by s_G in a year, however many steps it has', () => {
  for (const [steps, cellSize] of [
    [1, 1],
    [4, 1],
    [12, 2.5],
  ]) {
    const taps = grazerTaps({ ...rates, grazerSpread: 6 }, cellSize, steps);
    const variance =
      taps.reduce((sum, weight, n) => sum + 2 * weight * n * n, 0) * cellSize * cellSize * steps;
    // The cut leaves a millionth outside, which is far out.
    expect(Math.sqrt(variance)).toBeCloseTo(6, 3);
  }
  expect([...grazerTaps({ ...rates, grazerSpread: 0 }, 1, 1)]).toEqual([1]);
});

test('farther than a kernel may reach is refused, with what would do', () => {
  const far = { ...rates, grazerSpread: 200 };
  expect(() => grazerTaps(far, 1, 1)).toThrow(RunProblem);
  expect(() => grazerTaps(far, 1, 1)).toThrow(/^processes\.grazers\.grazerSpread: .*200 m.*at most 49\.2 m/);
  expect(grazerTaps({ ...rates, grazerSpread: 49.2 }, 1, 1).length - 1).toBeLessThanOrEqual(256);
  expect(grazerTaps(far, 5, 1).length).toBeGreaterThan(100);
});
