import { describe, expect, test } from 'vitest';
import { createRun } from '#sim-core/run/create-run.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { gridOf, groundOf, specOf } from '#sim-core/testing/setups.ts';
import { fillTime } from './fill-time.ts';
import { referenceShare } from './reference-cover.ts';
import { stepRates } from './step-rates.ts';

test('in short steps it is logistic: (1/r) ln((a₁ (K − a₀)) / (a₀ (K − a₁))) with K = r / (r − ln σ)', () => {
  // The limit of the step as Δt falls: du/dt = u (r − (r − ln σ) u). Verhulst 1838, Corr. Math. Phys. 10:113.
  for (const [fillRate, carryOver] of [
    [1, 0.7],
    [0.3, 0.95],
    [2, 0.2],
  ]) {
    const settles = fillRate / (fillRate - Math.log(carryOver));
    const [from, to] = [0.01, settles / 2];
    const exact = Math.log((to * (settles - from)) / (from * (settles - to))) / fillRate;
    const errors = [200, 400, 800].map((stepsPerYear) => {
      const step = stepRates({ ...defaultRates, fillRate, carryOver }, stepsPerYear);
      expect(referenceShare(step, 1)).toBeCloseTo(settles, 1.7);
      return Math.abs(fillTime(step, 1, from, to) - exact);
    });
    expect(errors[2] / exact).toBeLessThan(0.01);
    // Halving the step halves the error.
    expect(errors[0] / errors[1]).toBeCloseTo(2, 0);
    expect(errors[1] / errors[2]).toBeCloseTo(2, 0);
  }
});

describe('against the kernel', () => {
  test.each([
    [1, 1],
    [0.5, 1],
    [1, 4],
  ])(
    'even cover closes in the year after its fill time, vigour %f, %i steps a year',
    (vigour, stepsPerYear) => {
      const byte = Math.round(vigour * 255);
      const share = Math.fround(0.004);
      const ground = groundOf(64, {
        vigour: new Uint8Array(64).fill(byte),
        cover: new Float32Array(64).fill(share),
      });
      const spec = specOf({ mode: 'mean-field', years: 40, stepsPerYear: stepsPerYear as 1 | 4 });
      const run = createRun({ spec, grid: gridOf(8, 8), ground });
      while (run.nextYear());
      const step = stepRates(spec.rates, stepsPerYear);
      const fill = fillTime(step, byte / 255, share, referenceShare(step, byte / 255) / 2);
      expect(fill).toBeGreaterThan(2);
      expect(run.closing()[30]).toBe(spec.surveyYear + Math.ceil(fill));
    },
  );
});

test('its ends', () => {
  const step = stepRates(defaultRates, 1);
  expect(fillTime(step, 1, 0.5, 0.4)).toBe(0);
  expect(fillTime(step, 1, 0.4, 0.4)).toBe(0);
  expect(fillTime(step, 0, 0.1, 0.4)).toBe(Infinity);
  expect(fillTime(step, 1, 0.1, 0.9999)).toBe(Infinity);
  expect(fillTime(step, 2, 0.05, 0.4)).toBeLessThan(fillTime(step, 1, 0.05, 0.4));
  // Additive along the way, but for the step's own coarseness.
  expect(fillTime(step, 1, 0.01, 0.4)).toBeCloseTo(
    fillTime(step, 1, 0.01, 0.1) + fillTime(step, 1, 0.1, 0.4),
    1,
  );
});
