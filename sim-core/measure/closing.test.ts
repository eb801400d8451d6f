import { expect, test } from 'vitest';
import { cannotClose, closingYears, referenceSum, stillOpen } from './closing.ts';
import { lostYear, recoveredYear } from './recovery.ts';

const references = new Float64Array(256);
references[255] = 0.9;
references[100] = 0.4;

test('a cell closes in the first year in which its cover reaches half its reference, and stays closed', () => {
  // reference: 0.9, 0.9 × 128/255, 0.4, none (no growth), none (no capacity), 0.9
  const capacity = Uint8Array.of(255, 128, 255, 255, 0, 255);
  const vigour = Uint8Array.of(255, 255, 100, 50, 255, 255);
  const closing = closingYears(capacity, vigour, references);
  expect(closing.update(Float32Array.of(0.46, 0, 0.19, 1, 0, 0.44), 2020)).toBe(1);
  expect(closing.update(Float32Array.of(0, 0.226, 0.21, 1, 0, 0.44), 2021)).toBe(2);
  expect(closing.closed()).toBe(3);
  expect([...closing.years]).toEqual([2020, 2021, 2021, cannotClose, cannotClose, stillOpen]);
  expect(referenceSum(capacity, vigour, references)).toBeCloseTo(0.9 + (0.9 * 128) / 255 + 0.4 + 0.9, 12);
});

test('the year of recovery is the first that reaches the target, or none by the horizon', () => {
  const rows = [
    { time: 2020, recoveredShare: 0.2 },
    { time: 2020.25, recoveredShare: 0.91 },
    { time: 2020.5, recoveredShare: 0.5 },
    { time: 2022, recoveredShare: 0.95 },
  ];
  expect(recoveredYear(rows, 0.9)).toBe(2021);
  expect(recoveredYear(rows, 0.2)).toBe(2020);
  expect(recoveredYear(rows, 0.95)).toBe(2022);
  expect(recoveredYear(rows, 0.96)).toBeNull();
});

test('what was recovered is lost again in the first year from then on that ends below the target', () => {
  const rows = [0.2, 0.92, 0.95, 0.3, 0.95, 0.1].map((recoveredShare, i) => ({
    time: 2020 + i,
    recoveredShare,
  }));
  expect(lostYear(rows, 0.9)).toBe(2023);
  expect(lostYear(rows.slice(0, 3), 0.9)).toBeNull();
  expect(lostYear(rows, 0.96)).toBeNull();
  const within = [
    { time: 2020.5, recoveredShare: 0.95 },
    { time: 2021, recoveredShare: 0.5 },
  ];
  expect(lostYear(within, 0.9)).toBe(2021);
});
