import { expect, test } from 'vitest';
import { referenceShare } from './reference-cover.ts';
import { stepRates } from './step-rates.ts';

test('the reference is where a step without losses changes nothing', () => {
  for (const [carryOver, fillRate, vigour, steps] of [
    [0.7, 1, 1, 1],
    [0, 1, 0.5, 1],
    [0.95, 0.2, 0.8, 12],
  ] as const) {
    const step = stepRates({ carryOver, fillRate, seedlingRate: 0 }, steps);
    const u = referenceShare(step, vigour);
    expect(u).toBeGreaterThan(0.05);
    const next = step.carryOver * u + (1 - step.carryOver * u) * (1 - Math.exp(-step.recruits * vigour * u));
    expect(next).toBeCloseTo(u, 12);
  }
});

test('σ = 0, βg = 2: the final size of an epidemic of R0 = 2, 0.796812', () => {
  // u = 1 − e^(−2u); 1 − 0.203187870, the extinction chance in Harris 1963, The Theory of Branching Processes.
  expect(referenceShare({ carryOver: 0, recruits: 2 }, 1)).toBeCloseTo(1 - 0.20318787, 8);
});

test('there is none where little does not grow', () => {
  expect(referenceShare({ carryOver: 0.7, recruits: 1 }, 0.3)).toBe(0);
  expect(referenceShare({ carryOver: 0.7, recruits: 1 }, 0.31)).toBeGreaterThan(0);
  expect(referenceShare({ carryOver: 0.7, recruits: 1 }, 0)).toBe(0);
});

test('yearly rates as they act in a step', () => {
  const step = stepRates({ carryOver: 0.81, fillRate: 1, seedlingRate: 0.2 }, 2);
  expect(step.carryOver).toBeCloseTo(0.9, 14);
  expect(step.recruits).toBeCloseTo(Math.exp(0.5) - 0.9, 14);
  expect(step).toMatchObject({ years: 0.5, seedlings: 0.1 });
  expect(stepRates({ carryOver: 0, fillRate: 1, seedlingRate: 0 }, 12).carryOver).toBe(0);
  expect(stepRates({ carryOver: 1, fillRate: 1, seedlingRate: 0 }, 12).carryOver).toBe(1);
});
