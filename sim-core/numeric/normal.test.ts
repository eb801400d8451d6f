import { expect, test } from 'vitest';
import { normalQuantile } from './normal.ts';

test('the normal quantile against scipy.special.ndtri (SciPy 1.17.1)', () => {
  for (const [p, x] of [
    [1e-300, -37.0470962993612],
    [1e-12, -7.034483825301131],
    [1e-5, -4.264890793922825],
    [0.001, -3.090232306167813],
    [0.02275, -2.0000024438996036],
    [0.025, -1.9599639845400545],
    [0.07, -1.4757910281791706],
    [0.1, -1.2815515655446004],
    [0.3, -0.5244005127080409],
    [0.8, 0.8416212335729143],
    [0.975, 1.959963984540054],
    [0.9999, 3.719016485455709],
  ])
    expect(normalQuantile(p) / x).toBeCloseTo(1, 14);
  expect(normalQuantile(0.5)).toBe(0);
});

test('its ends', () => {
  expect(normalQuantile(0)).toBe(-Infinity);
  expect(normalQuantile(1)).toBe(Infinity);
  expect(normalQuantile(-0.1)).toBeNaN();
  expect(normalQuantile(NaN)).toBeNaN();
});

test('stays within the error of the coarser formula of Abramowitz & Stegun 1964, 26.2.23', () => {
  // |error| < 4.5e−4 by the book; p = 0.02275 gives −2.000438 there, against −2.000002 exactly.
  const coarse = (p: number) => {
    const t = Math.sqrt(-2 * Math.log(p));
    return -(
      t -
      (2.515517 + 0.802853 * t + 0.010328 * t * t) /
        (1 + 1.432788 * t + 0.189269 * t * t + 0.001308 * t * t * t)
    );
  };
  expect(coarse(0.02275)).toBeCloseTo(-2.000438, 6);
  for (let p = 1e-6; p < 0.5; p += 0.0007)
    expect(Math.abs(normalQuantile(p) - coarse(p))).toBeLessThan(4.5e-4);
});
