import { describe, expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import { palmerClass } from './palmer-classes.ts';
import {
  anomalyWeight,
  drawPalmerRecursion,
  memoryOver,
  monthlyMemory,
  nextIndex,
} from './palmer-recursion.ts';

/** The index after each month of anomalies Z. */
const runUp = (anomalies: number[], start = 0) => {
  let index = start;
  return anomalies.map((z) => (index = nextIndex(index, memoryOver(1 / 12), anomalyWeight * z)));
};
const near = (found: number[], expected: number[], digits: number) =>
  expected.forEach((value, i) => expect(found[i]).toBeCloseTo(value, digits));

describe('X_t = 0.897 X_{t−1} + Z_t / 3, Palmer 1965; Alley 1984, J. Clim. Appl. Met. 23:1100', () => {
  // Computed from the published constants.
  test('run-up from 0', () => {
    near(
      runUp(new Array<number>(12).fill(-1.236)),
      [-0.412, -0.781564, -1.113063, -1.410417, -1.677144, -1.916399],
      6,
    );
    expect(runUp(new Array<number>(12).fill(-1.236))[11]).toBeCloseTo(-2.914651, 6);
    near(
      runUp([-3, -3, -3, 0, 0, 3]),
      [-1, -1.897, -2.701609, -2.423343273, -2.173738915881, -0.949843807545],
      12,
    );
  });
  test('steady state Z / 0.309', () => {
    for (const [z, index] of [
      [-0.309, -1],
      [-0.618, -2],
      [-0.927, -3],
      [-1.236, -4],
    ])
      expect(runUp(new Array<number>(400).fill(z))[399]).toBeCloseTo(index, 12);
  });
  test('memory: half-life 6.376733 months, 0.271337 over a year; from −4 above −0.5 in month 20', () => {
    expect(memoryOver(6.376733 / 12)).toBeCloseTo(0.5, 6);
    expect(memoryOver(1)).toBeCloseTo(0.271337, 6);
    expect(memoryOver(1 / 12)).toBeCloseTo(monthlyMemory, 14);
    const calm = runUp(new Array<number>(24).fill(0), -4);
    expect(calm[11]).toBeCloseTo(-1.085349, 6);
    expect(calm.findIndex((x) => x > -0.5) + 1).toBe(20);
  });
  test('white anomalies of spread 1 give an index of spread 0.754096', () => {
    expect(anomalyWeight / Math.sqrt(1 - monthlyMemory ** 2)).toBeCloseTo(0.754096, 6);
  });
});

describe('drawn weather', () => {
  test.each([1, 2, 4, 12])(
    'has the given mean and spread and the memory of %i steps a year',
    (stepsPerYear) => {
      const steps = 40_000;
      const random = stream('palmer', 'weather/0');
      const x = drawPalmerRecursion({ mean: -0.7, standardDeviation: 2.1 }, steps, stepsPerYear, random);
      const mean = x.reduce((a, b) => a + b) / steps;
      let variance = 0;
      let lagged = 0;
      for (let i = 0; i < steps; i++) {
        variance += (x[i] - mean) ** 2 / steps;
        if (i > 0) lagged += ((x[i] - mean) * (x[i - 1] - mean)) / steps;
      }
      const memory = memoryOver(1 / stepsPerYear);
      // Standard errors of an AR(1): of the mean, of the variance, of the correlation (Bartlett 1946, JRSS Suppl. 8:27).
      const meanError = 2.1 * Math.sqrt((1 + memory) / (1 - memory) / steps);
      const varianceError = Math.sqrt((2 * (1 + memory ** 2)) / (1 - memory ** 2) / steps);
      expect(Math.abs(mean + 0.7)).toBeLessThan(4.5 * meanError);
      expect(Math.abs(variance / 2.1 ** 2 - 1)).toBeLessThan(4.5 * varianceError);
      expect(Math.abs(lagged / variance - memory)).toBeLessThan(4.5 * Math.sqrt((1 - memory ** 2) / steps));
    },
  );
  test('goes on from the index that is given, and nothing else changes by giving it', () => {
    const draw = (start?: number) =>
      drawPalmerRecursion({ standardDeviation: 1, start }, 60, 1, stream('a', 'weather/1'));
    const [free, given, other] = [draw(), draw(-4), draw(2)];
    expect(other[0] - given[0]).toBeCloseTo(6 * memoryOver(1), 12);
    expect(other[59]).toBeCloseTo(given[59], 12);
    expect(free[59]).toBeCloseTo(given[59], 12);
    expect([...drawPalmerRecursion({ standardDeviation: 0, start: -4 }, 2, 12, () => 0.9)]).toEqual([
      expect.closeTo(-4 * 0.897, 12),
      expect.closeTo(-4 * 0.897 ** 2, 12),
    ]);
  });
});

test.each([
  [-6, 'extreme drought'],
  [-4, 'extreme drought'],
  [-3.99, 'severe drought'],
  [-3, 'severe drought'],
  [-2.99, 'moderate drought'],
  [-1.99, 'mild drought'],
  [-0.99, 'incipient dry spell'],
  [-0.5, 'incipient dry spell'],
  [-0.49, 'near normal'],
  [0.49, 'near normal'],
  [0.5, 'incipient wet spell'],
  [1, 'slightly wet'],
  [2.99, 'moderately wet'],
  [3, 'very wet'],
  [4, 'extremely wet'],
])('an index of %f is %s', (index, name) => {
  // Classes of Palmer 1965; limits as published by NOAA, the inner ones from memory.
  expect(palmerClass(index)).toBe(name);
});
