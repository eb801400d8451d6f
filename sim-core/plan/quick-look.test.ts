import { expect, test } from 'vitest';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';
import { closingEstimate } from '#sim-core/theory/closing-estimate.ts';
import { gridOf, groundOf } from '#sim-core/testing/setups.ts';
import { createQuickLook } from './quick-look.ts';

const [width, height] = [41, 33];
const grid = gridOf(width, height);
const cover = Float32Array.from({ length: width * height }, (_, i) => (i % width < 3 ? 1 : 0));
const ground = groundOf(width * height, { cover });
const input = { grid, ground, rates: defaultRates, stepsPerYear: 1 as const, surveyYear: 2025, years: 80 };
const at = (column: number, row: number) => ({ x: grid.originX + column + 0.5, y: grid.originY - row - 0.5 });
const point = (column: number, row: number): [number, number] => [at(column, row).x, at(column, row).y];

test('without works it is the closing estimate', () => {
  const look = createQuickLook(input);
  const estimate = closingEstimate({ grid, ground, rates: defaultRates, stepsPerYear: 1 });
  for (let cell = 0; cell < width * height; cell++) expect(look.closing(cell)).toBeCloseTo(estimate[cell], 3);
});

test('works that come and go leave no trace, and a gain that is asked for leaves none', () => {
  const mound: Action = { kind: 'mound', year: 2027, ...at(30, 16), radius: 3, strength: 1, halo: 2 };
  const clumps: Action = { kind: 'clumps', year: 2027, points: [point(30, 16), point(30, 16)], each: 2 };
  const planting: Action = {
    kind: 'planting',
    year: 2030,
    area: { shape: 'disc', ...at(20, 5), radius: 2 },
    cover: 0.4,
  };
  const look = createQuickLook(input);
  const bare = look.years.slice();
  const bareSummary = look.summary();
  expect(look.gainOf([mound, clumps])).toBeGreaterThan(0.5);
  expect(look.years).toEqual(bare);
  look.change({
    removed: [],
    added: [
      [1, mound],
      [2, clumps],
      [3, planting],
    ],
  });
  const scratch = createQuickLook(input);
  scratch.change({
    removed: [],
    added: [
      [7, planting],
      [8, clumps],
      [9, mound],
    ],
  });
  expect(look.years).toEqual(scratch.years);
  expect(look.years).not.toEqual(bare);
  const summary = look.summary();
  expect(summary.closedBy.at(-1)!.area).toBeGreaterThanOrEqual(bareSummary.closedBy.at(-1)!.area);
  expect(summary.half).toBeLessThan(bareSummary.half!);
  look.change({ removed: [2, 1, 3], added: [] });
  expect(look.years).toEqual(bare);
  const again = look.summary();
  again.closedBy.forEach(({ area }, i) => expect(area).toBeCloseTo(bareSummary.closedBy[i].area, 6));
});
