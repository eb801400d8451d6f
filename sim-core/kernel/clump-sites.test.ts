import { expect, test } from 'vitest';
import { RunProblem } from '#sim-core/run/run-problem.ts';
import { clumpSites } from './clump-sites.ts';

test('N = round(K ν Δx²), at least 1 where K > 0', () => {
  const sites = clumpSites(4, 2);
  expect([sites[0], sites[1], sites[128], sites[255]]).toEqual([0, 1, 8, 16]);
  expect(clumpSites(0.01, 1)[255]).toBe(1);
});

test('more than 100,000 in a cell are refused at their rate', () => {
  expect(clumpSites(1000, 10)[255]).toBe(100_000);
  expect(() => clumpSites(1000, 11)).toThrow(RunProblem);
  expect(() => clumpSites(1000, 11)).toThrow(/^rates\.clumpsPerSquareMetre: 1000 .* 121000 .* at most 826/);
});
