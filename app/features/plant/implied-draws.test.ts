import { describe, expect, it } from 'vitest';
import { fitKernel } from '#sim-core/index.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { verdictOf, verdictWords } from './field-verdict.ts';
import { impliedDraws } from './implied-draws.ts';

const asked = { rates: defaultRates, cellSize: 0.5, stepsPerYear: 1 as const };
const spread = { law: 'uniform', low: 0.3, high: 0.9 } as const;
const tolerance = { law: 'normal', mean: -2.3, standardDeviation: 0.5 } as const;

describe('what beliefs imply', () => {
  it('is one number where nothing is uncertain, the very one of the kernel', () => {
    const { speeds, halfLoss, refused } = impliedDraws({ ...asked, beliefs: {} });
    const kernel = fitKernel(defaultRates, 0.5, 1);
    expect(refused).toBe(0);
    expect(speeds![0].speed.low).toBeCloseTo(kernel.frontSpeed, 10);
    expect(speeds![0].speed.high).toBeCloseTo(kernel.frontSpeed, 10);
    expect(speeds!.at(-1)!.speed.middle).toBeCloseTo(kernel.diagonalFrontSpeed, 10);
    expect(halfLoss.refuge.middle).toBeCloseTo(defaultRates.tolerance - defaultRates.refugeShift, 10);
  });

  it('holds nine tenths of the draws between its bounds', () => {
    const { speeds, halfLoss } = impliedDraws({ ...asked, beliefs: { lateralSpread: spread, tolerance } });
    // 5 and 95 % of the uniform law, less what the cut takes of a front (up to 2 %).
    expect(speeds![0].speed.low / 0.33).toBeGreaterThan(0.96);
    expect(speeds![0].speed.low / 0.33).toBeLessThan(1.02);
    expect(speeds![0].speed.high / 0.87).toBeGreaterThan(0.96);
    expect(speeds![0].speed.high / 0.87).toBeLessThan(1.02);
    // −2.3 ± 1.645 · 0.5, within what 200 strata leave open.
    expect(halfLoss.open.low).toBeCloseTo(-2.3 - 1.645 * 0.5, 1);
    expect(halfLoss.open.high).toBeCloseTo(-2.3 + 1.645 * 0.5, 1);
  });

  it('counts draws that no kernel can show, and goes on without them', () => {
    const slow = { law: 'uniform', low: 0.005, high: 0.4 } as const;
    const { speeds, refused, fill, draws } = impliedDraws({
      ...asked,
      cellSize: 2,
      beliefs: { lateralSpread: slow },
    });
    // Cells of 2 m need 0.18 m/yr at these rates (fit-kernel says so): (0.18 − 0.005) / 0.395 of the law is below.
    expect(refused / draws).toBeCloseTo(0.44, 1);
    expect(speeds![0].speed.low).toBeGreaterThan(0.17);
    expect(fill).toHaveLength(41);
    expect(impliedDraws({ ...asked, cellSize: 100, beliefs: {} }).speeds).toBeNull();
  });
});

describe('against field numbers', () => {
  const band = { low: 0.4, middle: 0.5, high: 0.6 };
  it.each([
    [{ value: 0.7, plusMinus: 0.15 }, 'agrees'],
    [{ value: 0.9, plusMinus: 0.15 }, 'too low'],
    [{ value: 0.2, plusMinus: 0.1 }, 'too high'],
    [{ value: 0.61, plusMinus: 0 }, 'agrees'],
  ] as const)('%o %s', (measured, verdict) => {
    expect(verdictOf(band, measured)).toBe(verdict);
  });
  it('says fast and slow the right way round for speeds and for times', () => {
    expect(verdictWords(band, { value: 2, plusMinus: 0.1 }, 'speed')).toMatch(
      /too slow: they imply 0.4 to 0.6/,
    );
    expect(verdictWords(band, { value: 2, plusMinus: 0.1 }, 'time')).toMatch(/too fast/);
    const never = { low: 30, middle: Infinity, high: Infinity };
    expect(verdictWords(never, { value: 8, plusMinus: 1 }, 'time')).toMatch(
      /too slow: they imply 30 to longer than 40/,
    );
  });
});
