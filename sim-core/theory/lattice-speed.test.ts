import { describe, expect, test } from 'vitest';
import { latticeSpeed } from './lattice-speed.ts';

const gaussian = (s: number) => (s * s) / 2;
const laplace = (a: number) => (s: number) => (a * s < 1 ? -Math.log(1 - a * a * s * s) : Infinity);
const uniform = (s: number) =>
  s > 300 ? s - Math.log(2 * s) : s < 1e-3 ? (s * s) / 6 : Math.log(Math.sinh(s) / s);

describe('integrodifference speeds, Kot, Lewis & van den Driessche 1996, Ecology 77:2027–2042', () => {
  // Computed from the published formula c* = min (1/s) ln[R0 M(s)].
  test.each([
    [1.05, 0.312378502, 0.447044253, 0.316108023, 0.179468898],
    [1.1, 0.436600916, 0.631578362, 0.446593343, 0.249653241],
    [1.2, 0.603856865, 0.890192802, 0.629461367, 0.342199531],
    [1.5, 0.900516639, 1.385685975, 0.979827949, 0.498229139],
    [2, 1.177410023, 1.898985345, 1.342785415, 0.630344958],
    [3, 1.482303807, 2.528312757, 1.787787095, 0.754675692],
    [5, 1.794122578, 3.24676518, 2.295809676, 0.852848039],
    [10, 2.145966026, 4.153116695, 2.936696978, 0.926424112],
  ])('all seeds leave, R0 = %f', (r0, ofGaussian, ofLaplace, ofLaplaceUnitVariance, ofUniform) => {
    expect(latticeSpeed(0, r0, gaussian)?.speed).toBeCloseTo(ofGaussian, 8);
    expect(latticeSpeed(0, r0, gaussian)?.speed).toBeCloseTo(Math.sqrt(2 * Math.log(r0)), 9);
    expect(latticeSpeed(0, r0, laplace(1))?.speed).toBeCloseTo(ofLaplace, 8);
    expect(latticeSpeed(0, r0, laplace(Math.SQRT1_2))?.speed).toBeCloseTo(ofLaplaceUnitVariance, 8);
    expect(latticeSpeed(0, r0, uniform)?.speed).toBeCloseTo(ofUniform, 8);
  });

  test.each([
    [1.2, 1.076132347],
    [2, 2.240980511],
    [5, 3.735710822],
  ])('two-dimensional exponential kernel, R0 = %f', (r0, speed) => {
    const logM = (s: number) => (s < 1 ? -1.5 * Math.log(1 - s * s) : Infinity);
    expect(latticeSpeed(0, r0, logM)?.speed).toBeCloseTo(speed, 8);
  });
});

test.each([
  [0.5, 0.6, 0.328333134, 0.481654897],
  [0.8, 0.3, 0.24012892, 0.360595723],
  [0.9, 0.2, 0.201682134, 0.308292028],
  [0.9, 0.5, 0.542119297, 0.865889805],
  [0.5, 1.5, 1.062816174, 1.737014635],
  [0.95, 0.1, 0.105051936, 0.160063111],
  [1, 0.1, 0.152392435, 0.241884105],
  [1, 0.5, 0.588705011, 0.958384853],
  [1, 1, 0.9248094, 1.544428873],
])(
  'adults stay, S = %f, B = %f: Neubert & Caswell 2000, Ecology 81:1613–1628',
  (s, b, ofGaussian, ofLaplace) => {
    expect(latticeSpeed(s, b, gaussian)?.speed).toBeCloseTo(ofGaussian, 8);
    expect(latticeSpeed(s, b, laplace(1))?.speed).toBeCloseTo(ofLaplace, 8);
  },
);

describe('lattice kernels, c(θ) = min (1/s) ln[S + B Σ k e^(s(i cosθ + j sinθ))]: Weinberger 1982', () => {
  type Cells = [x: number, y: number, weight: number][];
  const box = (radius: number, weight: (x: number, y: number) => number): Cells => {
    const cells: Cells = [];
    for (let y = -radius; y <= radius; y++)
      for (let x = -radius; x <= radius; x++) if (weight(x, y) > 0) cells.push([x, y, weight(x, y)]);
    const sum = cells.reduce((total, [, , w]) => total + w, 0);
    return cells.map(([x, y, w]) => [x, y, w / sum]);
  };
  const logM = (cells: Cells, cosine: number, sine: number) => (s: number) => {
    const exponents = cells.map(([x, y]) => s * (x * cosine + y * sine));
    const top = Math.max(...exponents);
    return top + Math.log(cells.reduce((sum, [, , w], i) => sum + w * Math.exp(exponents[i] - top), 0));
  };
  const four = box(1, (x, y) => (Math.abs(x) + Math.abs(y) === 1 ? 1 : 0));
  const eight = box(1, (x, y) => (x === 0 && y === 0 ? 0 : 1));
  const bell = (x: number, y: number) => Math.exp(-(x * x + y * y) / 2);
  test.each([
    ['4 neighbours', four, 0, 1.2, 0.420369, 0.4134462],
    ['4 neighbours', four, 1, 0.2, 0.1906659, 0.1805848],
    ['4 neighbours', four, 1, 1, 0.604675, 0.5515039],
    ['4 neighbours, the critical edge', four, 0, 2, 0.7799443, Math.SQRT1_2],
    ['8 neighbours', eight, 0, 1.2, 0.509314, 0.5149381],
    ['8 neighbours', eight, 1, 0.2, 0.2256693, 0.2339502],
    ['8 neighbours', eight, 1, 1, 0.7009052, 0.7440387],
    ['8 neighbours', eight, 0, 2, 0.9067826, 0.9586833],
    ['3 × 3', box(1, () => 1), 0, 2, 0.8682416, 0.9176037],
    ['3 × 3', box(1, () => 1), 1, 1, 0.6711879, 0.7136159],
    ['5 × 5', box(2, () => 1), 0, 2, 1.5311941, 1.6005143],
    ['5 × 5', box(2, () => 1), 1, 1, 1.185225, 1.2463971],
    ['Gaussian cut at 3 × 3', box(1, bell), 0, 2, 0.8071696, 0.8409423],
    ['Gaussian cut at 5 × 5', box(2, bell), 0, 2, 1.1048134, 1.1188617],
    ['Gaussian cut at 7 × 7', box(3, bell), 0, 2, 1.170963, 1.1732216],
    ['Gaussian cut at 13 × 13', box(6, bell), 0, 2, 1.17741, 1.17741],
  ])('%s', (_, cells, s, b, axis, diagonal) => {
    expect(latticeSpeed(s, b, logM(cells, 1, 0))?.speed).toBeCloseTo(axis, 6);
    expect(latticeSpeed(s, b, logM(cells, Math.SQRT1_2, Math.SQRT1_2))?.speed).toBeCloseTo(diagonal, 6);
  });
});

test('where nothing grows, no front advances', () => {
  expect(latticeSpeed(0.5, 0.5, gaussian)).toBeUndefined();
  expect(latticeSpeed(0.5, 0, gaussian)).toBeUndefined();
});
