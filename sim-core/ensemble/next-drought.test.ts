import { expect, test } from 'vitest';
import { beforeDrought, firstToCome, nextDroughtYear } from './next-drought.ts';

test('the next drought is the first year with an index at or below the threshold', () => {
  const series = [
    { time: 2020, droughtIndex: null },
    { time: 2020.5, droughtIndex: -1 },
    { time: 2021, droughtIndex: 2 },
    { time: 2021.5, droughtIndex: -2.3 },
    { time: 2022, droughtIndex: -5 },
  ];
  expect(nextDroughtYear(series, -2.3)).toBe(2022);
  expect(nextDroughtYear(series, -1)).toBe(2021);
  expect(nextDroughtYear(series, -6)).toBeNull();
});

test('recovery in the year of the drought, or after it, is not before it', () => {
  expect(firstToCome(2024, 2025)).toBe('recovery');
  expect(firstToCome(2025, 2025)).toBe('drought');
  expect(firstToCome(2026, 2025)).toBe('drought');
  expect(firstToCome(2026, null)).toBe('recovery');
  expect(firstToCome(null, 2025)).toBe('drought');
  expect(firstToCome(null, null)).toBe('neither');
});

test('futures in which neither came are counted, and flatter nothing', () => {
  const found = beforeDrought({ recovery: 5, drought: 3, neither: 2 });
  expect(found.share?.estimate).toBe(0.5);
  // Wilson, 5 of 10 (R prop.test)
  expect(found.share?.low).toBeCloseTo(0.236593, 6);
  expect(beforeDrought({ recovery: 0, drought: 0, neither: 0 }).share).toBeUndefined();
});
