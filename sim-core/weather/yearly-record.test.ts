import { describe, expect, test } from 'vitest';
import { yearlyRecord } from './yearly-record.ts';

const year = { from: 1, to: 12 };
const months = (first: number, count: number) =>
  Array.from({ length: count }, (_, m) => ({
    year: first + Math.floor(m / 12),
    month: (m % 12) + 1,
    value: (m % 12) + 1,
  }));

describe('a record by year', () => {
  test('values by year are sorted and mapped; years between that lack are gaps', () => {
    const values = [
      { year: 2003, value: -1.5 },
      { year: 2000, value: 1 },
    ];
    expect(yearlyRecord({ values, factor: 2, season: year })).toEqual({
      years: [
        { year: 2000, index: 2 },
        { year: 2003, index: -3 },
      ],
      gaps: [2001, 2002],
      cut: [],
    });
  });
  test('months are averaged over the season', () => {
    const of = (season: { from: number; to: number }) =>
      yearlyRecord({ values: months(2000, 24), factor: 1, season }).years.map(({ year: y, index }) => [
        y,
        index,
      ]);
    expect(of(year)).toEqual([
      [2000, 6.5],
      [2001, 6.5],
    ]);
    expect(of({ from: 5, to: 8 })).toEqual([
      [2000, 6.5],
      [2001, 6.5],
    ]);
    expect(of({ from: 7, to: 7 })[0]).toEqual([2000, 7]);
    // October to March belongs to the year in which it ends; of 2000 half is not there.
    expect(of({ from: 10, to: 3 })).toEqual([[2001, (10 + 11 + 12 + 1 + 2 + 3) / 6]]);
  });
  test('a year that lacks a month of the season is a gap, one that lacks another is not', () => {
    const values = months(2000, 36).filter(({ year: y, month }) => !(y === 2001 && month === 6));
    expect(yearlyRecord({ values, factor: 1, season: { from: 5, to: 8 } }).gaps).toEqual([2001]);
    expect(yearlyRecord({ values, factor: 1, season: { from: 7, to: 9 } }).gaps).toEqual([]);
  });
  test('what a factor takes off the scale is cut and told', () => {
    const values = [
      { year: 2000, value: -9 },
      { year: 2001, value: 0 },
    ];
    expect(yearlyRecord({ values, factor: 2, season: year })).toMatchObject({
      years: [{ index: -15 }, { index: 0 }],
      cut: [2000],
    });
  });
});
