import { expect, test } from 'vitest';
import { scaledBesselI } from '#sim-core/numeric/bessel.ts';
import { cutMass, discreteGaussian, logMoment, logMomentOfTaps } from './spread-kernel.ts';

test.each([1e-5, 0.01, 0.3, 4, 900])('the discrete Gaussian of variance %f', (t) => {
  const taps = discreteGaussian(t);
  const radius = taps.length - 1;
  const sum = taps.reduce((total, w, n) => total + (n === 0 ? w : 2 * w), 0);
  const variance = taps.reduce((total, w, n) => total + 2 * n * n * w, 0);
  expect(sum).toBeCloseTo(1, 14);
  // The cut takes a millionth of the mass, from the far end.
  expect(variance / t).toBeGreaterThan(radius > 2 ? 0.9999 : 0.995);
  expect(variance / t).toBeLessThan(1 + 2 * cutMass);
  const whole = scaledBesselI(t, radius + 400);
  const outside = (r: number) => 2 * whole.slice(r + 1).reduce((a, b) => a + b, 0);
  expect(outside(radius)).toBeLessThan(cutMass);
  expect(outside(radius - 1)).toBeGreaterThanOrEqual(cutMass);
});

test('ln M of the taps is that of the formula, where the cut does not reach', () => {
  const taps = discreteGaussian(4);
  for (const theta of [0.01, 0.1, 0.3])
    expect(logMomentOfTaps(taps, 0.8, 0.6)(theta) / logMoment(4, 0.8, 0.6)(theta)).toBeCloseTo(1, 3);
});
