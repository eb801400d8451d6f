import { expect, test } from 'vitest';
import { gridOf, specOf } from '#sim-core/testing/setups.ts';
import { gridProblems } from './grid-problems.ts';

test('everything that cannot be on a grid is named at once, at its field', () => {
  const spec = specOf({
    rates: { lateralSpread: 0.005 },
    processes: { grazers: { grazerSpread: 400 } },
    actions: [{ kind: 'clumps', year: 2021, points: [[0, 0]] }],
  });
  expect(gridProblems(spec, gridOf(20, 20)).map((p) => p.field)).toEqual([
    'actions.0.points.0',
    'rates.lateralSpread',
    'processes.grazers.grazerSpread',
  ]);
  expect(gridProblems(specOf({}), gridOf(20, 20))).toEqual([]);
});
