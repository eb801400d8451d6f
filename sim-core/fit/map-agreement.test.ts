import { describe, expect, test } from 'vitest';
import { agreementMeasures, agreementOf, changeAgreement, standing, unknown } from './map-agreement.ts';

const drawn = (...rows: string[]) =>
  Uint8Array.from(rows.join(''), (c) => (c === '?' ? unknown : c === '1' ? standing : 0));

describe('Cohen’s κ: Cohen 1960, Educ. Psychol. Meas. 20:37; first value by scikit-learn', () => {
  test.each([
    [[20, 5, 10, 15], 0.7, 0.5, 0.4],
    [[45, 15, 25, 15], 0.6, 0.54, 0.1304348],
    [[25, 35, 5, 35], 0.6, 0.46, 0.2592593],
  ])('%j', ([hits, misses, falseAlarms, bareInBoth], agreement, byChance, kappa) => {
    const found = agreementMeasures({ hits, misses, falseAlarms, bareInBoth });
    expect(found.agreement).toBeCloseTo(agreement, 12);
    expect(found.byChance).toBeCloseTo(byChance, 12);
    expect(found.kappa).toBeCloseTo(kappa, 7);
    expect(found.kappaOfPlace! * found.kappaOfAmount!).toBeCloseTo(kappa, 7);
  });
});

test('quantity and allocation disagreement, Pontius & Millones 2011, Int. J. Remote Sens. 32:4407', () => {
  const found = agreementMeasures({ hits: 20, misses: 5, falseAlarms: 10, bareInBoth: 15 });
  expect(found.amountDisagreement).toBeCloseTo(0.1, 12);
  expect(found.placeDisagreement).toBeCloseTo(0.2, 12);
});

test('Finley’s tornado forecasts of 1884: κ, there called Heidke’s score, 0.355, and Gilbert’s 0.228 (Murphy 1996, Weather and Forecasting 11:3–20, from memory)', () => {
  const found = agreementMeasures({ hits: 28, misses: 23, falseAlarms: 72, bareInBoth: 2680 });
  expect(found.kappa).toBeCloseTo(0.355, 3);
  expect(found.criticalSuccess).toBeCloseTo(0.228, 3);
});

test('right places in wrong amounts is the fault of the amounts alone, and the other way round', () => {
  const tooMuch = agreementMeasures({ hits: 20, misses: 0, falseAlarms: 10, bareInBoth: 70 });
  expect(tooMuch.kappaOfPlace).toBeCloseTo(1, 12);
  expect(tooMuch.kappaOfAmount).toBeLessThan(0.8);
  expect(tooMuch.placeDisagreement).toBe(0);
  const elsewhere = agreementMeasures({ hits: 10, misses: 10, falseAlarms: 10, bareInBoth: 70 });
  expect(elsewhere.kappaOfAmount).toBeCloseTo(1, 12);
  expect(elsewhere.amountDisagreement).toBe(0);
});

test('maps without any plant say nothing of skill, and no cell at all is refused', () => {
  const empty = agreementMeasures({ hits: 0, misses: 0, falseAlarms: 0, bareInBoth: 9 });
  expect([empty.kappa, empty.kappaOfPlace, empty.criticalSuccess]).toEqual([undefined, undefined, undefined]);
  expect(() => agreementMeasures(agreementOf(drawn('??'), [1, 0]))).toThrow(/says nothing anywhere/);
});

describe('two maps after a first survey, Pontius et al. 2008, Ann. Reg. Sci. 42:11', () => {
  const before = drawn('1100', '1000', '0000', '0001');
  const after = drawn('1110', '1100', '0001', '0011');
  const simulated = drawn('1111', '1000', '1001', '0001');
  test('figure of merit 2/6', () => {
    expect(changeAgreement(before, after, simulated)).toEqual({
      hits: 2,
      misses: 2,
      falseAlarms: 2,
      figureOfMerit: 2 / 6,
    });
  });
  test('at the second survey: 6, 2, 2, 6, critical success 0.6, κ 0.5', () => {
    const found = agreementOf(after, simulated);
    expect(found).toEqual({ hits: 6, misses: 2, falseAlarms: 2, bareInBoth: 6 });
    expect(agreementMeasures(found)).toMatchObject({ criticalSuccess: 0.6, kappa: 0.5, agreement: 0.75 });
  });
  test('cells that the survey leaves out count nowhere', () => {
    const half = drawn('11??', '11??', '00??', '00??');
    expect(agreementOf(half, simulated)).toEqual({ hits: 3, misses: 1, falseAlarms: 1, bareInBoth: 3 });
    expect(changeAgreement(before, half, simulated)).toMatchObject({ hits: 0, misses: 1, falseAlarms: 1 });
  });
});
