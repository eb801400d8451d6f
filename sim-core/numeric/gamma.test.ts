import { expect, test } from 'vitest';
import { gammaAbove, gammaBelow, gammaQuantileAbove, logGamma } from './gamma.ts';
import { power } from './power.ts';

// SciPy 1.17.1: scipy.special.gammaln, gammaincc, gammainc and gammainccinv.
test('ln Γ', () => {
  for (const [x, value] of [
    [0.01, 4.599479878042022],
    [0.5, 0.5723649429247],
    [1.5, -0.12078223763524526],
    [3, 0.6931471805599453],
    [10.5, 13.940625219403763],
    [100, 359.1342053695754],
  ])
    expect(logGamma(x) / value).toBeCloseTo(1, 13);
  expect(logGamma(1)).toBeCloseTo(0, 14);
});

test('shares above and below', () => {
  for (const [shape, x, above, below] of [
    [0.5, 0.1, 0.6547208460185768, 0.34527915398142317],
    [0.5, 3, 0.014305878435429641, 0.9856941215645704],
    [2, 1, 0.7357588823428847, 0.2642411176571153],
    [2, 10, 0.0004993992273873336, 0.9995006007726127],
    [30, 20, 0.9781817824744425, 0.021818217525557418],
    [30, 50, 0.0009168288614560842, 0.999083171138544],
    [200, 180, 0.9251419650158405, 0.07485803498415958],
    [200, 300, 3.3711032555258874e-10, 0.9999999996628897],
    [0.05, 1e-9, 0.6355297025724234, 0.3644702974275767],
  ]) {
    expect(gammaAbove(shape, x) / above).toBeCloseTo(1, 11);
    expect(gammaBelow(shape, x) / below).toBeCloseTo(1, 11);
  }
  expect([gammaAbove(3, 0), gammaAbove(3, Infinity)]).toEqual([1, 0]);
});

test('quantiles', () => {
  for (const [shape, above, x] of [
    [0.05, 1e-10, 17.298041003617612],
    [0.05, 0.5, 5.573878440746293e-7],
    [0.05, 0.99, 5.844632057286663e-41],
    [0.5, 0.01, 3.3174483005106086],
    [0.5, 0.99, 7.854392895485118e-5],
    [1, 0.5, 0.6931471805599455],
    [4, 1e-10, 31.698982205567795],
    [4, 0.5, 3.672060748850897],
    [4, 0.999999, 0.0709923913591388],
    [4, 1 - 2 ** -33, 0.007280943889438769],
    [80, 0.01, 102.26504729519274],
    [80, 0.999999, 44.42469998130452],
  ])
    expect(gammaQuantileAbove(shape, above) / x).toBeCloseTo(1, 9);
});

test('powers', () => {
  expect(power(0.897, 12)).toBeCloseTo(0.897 ** 12, 14);
  expect(power(2, 0.5)).toBeCloseTo(Math.SQRT2, 14);
  expect([power(0, 2), power(0, 0), power(7, 0)]).toEqual([0, 1, 1]);
});
