import { expect, test } from 'vitest';
import { ensembleMaps } from './ensemble-maps.ts';

test('mean cover and the year by which at least half have closed', () => {
  const maps = ensembleMaps(5, [2020], 4);
  for (const [cover, closing] of [
    [0.1, [2021, 2021, 0, -32768, 0]],
    [0.2, [2025, 2022, 0, -32768, 2023]],
    [0.3, [2023, 0, 0, -32768, 0]],
    [0.8, [2022, 0, 2021, -32768, 0]],
  ] as const) {
    maps.addCover(2020, new Float32Array(5).fill(cover));
    maps.addClosing(Int16Array.from(closing));
  }
  expect(maps.meanCover(2020)[0]).toBeCloseTo(0.35, 7);
  expect([...maps.medianClosing()]).toEqual([2022, 2022, 0, -32768, 0]);
});

test('maps that do not fit are refused before they are made', () => {
  expect(() => ensembleMaps(16_000_000, [2020, 2030], 200)).toThrow(
    /need 7 GB .* at most 2 GB .*"reportYears"/,
  );
});
