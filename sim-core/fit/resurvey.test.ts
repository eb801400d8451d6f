import { expect, test } from 'vitest';
import { agreementMeasures } from './map-agreement.ts';
import { fitOfYear, resurveyOf, standingCells } from './resurvey.ts';

const cells = { width: 4, height: 2, cellSize: 2 };
const capacity = Uint8Array.from([255, 255, 255, 255, 255, 255, 128, 0]);
const survey = resurveyOf(2030, [1, 0.5, 0.2, NaN, 1, 0, 0.9, 1], capacity, cells);

test('a survey is read against what each cell can hold; where it says nothing, or nothing can grow, it is left out', () => {
  expect([...survey.cells]).toEqual([1, 1, 0, 255, 1, 0, 1, 255]);
  // 1 + 0.5 + 0.2 + 1 + 0 + 128/255 of 4 m² each
  expect(survey.coveredArea).toBeCloseTo(4 * (2.7 + 128 / 255), 4);
  // sides between standing and other cells: 3 in the north and south row, 2 between the rows; 2 m each
  expect(survey.edgeLength).toBe(2 * (1 + 3 + 2));
});

test('a run that is the survey fits it wholly', () => {
  const cover = Float32Array.from([1, 0.5, 0.2, 0.7, 1, 0, 128 / 255, 0]);
  const fit = fitOfYear(survey, cover, capacity, cells);
  expect(fit.agreement).toEqual({ hits: 4, misses: 0, falseAlarms: 0, bareInBoth: 2 });
  expect(fit.edge?.mean).toBe(0);
  expect(fit.coveredArea).toBeCloseTo(survey.coveredArea, 4);
  expect(fit.edgeLength).toBe(survey.edgeLength);
});

test('what stands where the survey says nothing counts nowhere', () => {
  const with3 = Float32Array.from([1, 0.5, 0.2, 1, 1, 0, 128 / 255, 0]);
  const without3 = Float32Array.from([1, 0.5, 0.2, 0, 1, 0, 128 / 255, 0]);
  expect(fitOfYear(survey, with3, capacity, cells)).toEqual(fitOfYear(survey, without3, capacity, cells));
});

test('plants in other places are wrong places, not wrong amounts', () => {
  const moved = Float32Array.from([1, 0, 0.7, 0, 1, 0, 128 / 255, 0]);
  const fit = fitOfYear(survey, moved, capacity, cells);
  expect(fit.agreement).toEqual({ hits: 3, misses: 1, falseAlarms: 1, bareInBoth: 1 });
  expect(agreementMeasures(fit.agreement).placeDisagreement).toBeCloseTo(2 / 6, 12);
});

test('standing is from half of what the cell holds', () => {
  expect([...standingCells(Float32Array.from([0.5, 0.49, 0.25]), Uint8Array.from([255, 255, 127]))]).toEqual([
    1, 0, 1,
  ]);
});
