import { expect, test } from 'vitest';
import { normalCdf } from '#sim-core/numeric/normal-cdf.ts';
import { drawnFutures } from './drawn-futures.ts';

const span = { surveyYear: 2026, years: 10, stepsPerYear: 1 as const };

test('weather that is the same in every future is certain', () => {
  const { lines, band, examples } = drawnFutures(
    { ...span, droughtIndex: [0, -1, -3, 0, 0, -5, 0, 0, 0, 0] },
    [-2, -4],
    20,
  );
  expect(lines[0].inYear).toEqual([0, 0, 1, 0, 0, 1, 0, 0, 0, 0]);
  expect(lines[0].byThen).toEqual([0, 0, 1, 1, 1, 1, 1, 1, 1, 1]);
  expect(lines[1].byThen).toEqual([0, 0, 0, 0, 0, 1, 1, 1, 1, 1]);
  expect(band[2]).toEqual([-3, -3, -3, -3, -3]);
  expect(examples).toHaveLength(12);
});

test('independent normal years: Φ of the line in each, 1 − (1 − p)^n by then; the trend shifts it', () => {
  const weather = {
    ...span,
    droughtIndex: { kind: 'palmer-type', standardDeviation: 2, memory: 0 } as const,
  };
  const p = normalCdf(-1);
  const near = (found: number, expected: number) =>
    expect(Math.abs(found - expected)).toBeLessThan(4 * Math.sqrt((expected * (1 - expected)) / 4000));
  const [line] = drawnFutures(weather, [-2], 4000).lines;
  line.inYear.forEach((found) => near(found, p));
  line.byThen.forEach((found, y) => near(found, 1 - (1 - p) ** (y + 1)));
  const [drier] = drawnFutures({ ...weather, trend: { shiftPerDecade: -2 } }, [-2], 4000).lines;
  near(drier.inYear[9], normalCdf(0));
});

test('a year of several steps is as dry as its driest', () => {
  const droughtIndex = [0, -3, 0, 0, 1, 1, 1, 1];
  const { examples } = drawnFutures({ surveyYear: 2026, years: 2, stepsPerYear: 4, droughtIndex }, [-2], 12);
  expect(examples[0]).toEqual([-3, 1]);
});
