import { expect, test } from 'vitest';
import { specOf } from '#sim-core/testing/setups.ts';
import { createRun } from './create-run.ts';
import { drawProblems } from './draw-problems.ts';
import { gridOf, groundOf } from '#sim-core/testing/setups.ts';

const slow = specOf({
  uncertain: {
    draws: 40,
    rates: {
      lateralSpread: { law: 'uniform', low: 0.005, high: 0.4 },
      fillRate: { law: 'uniform', low: 0.5, high: 3 },
    },
  },
});

test('names how many futures draw rates that no kernel can show, the first, and which beliefs clash', () => {
  const cells = (replicate: number) => {
    try {
      createRun({ spec: { ...slow, replicate }, grid: gridOf(4, 4), ground: groundOf(16) });
      return true;
    } catch {
      return false;
    }
  };
  const refused = Array.from({ length: 60 }, (_, replicate) => replicate).filter((r) => !cells(r));
  expect(refused.length).toBeGreaterThan(0);
  const [problem, ...others] = drawProblems(slow, 1, 60);
  expect(others).toEqual([]);
  expect(problem.field).toBe('uncertain.rates.lateralSpread');
  expect(problem.message).toMatch(
    new RegExp(
      `^${refused.length} of 60 futures.* Future ${refused[0] + 1} \\(lateral spread 0\\.\\d+, fill-in rate \\d`,
    ),
  );
  expect(problem.message).toMatch(/Narrow what is believed of lateral spread or fill-in rate$/);
});

test('finds nothing on finer cells, and of specs without beliefs', () => {
  expect(drawProblems(slow, 0.02, 40)).toEqual([]);
  expect(drawProblems(specOf({}), 1, 40)).toEqual([]);
});

test('looks at grazers, too', () => {
  const far = specOf({
    processes: { grazers: {} },
    uncertain: { draws: 4, rates: { grazerSpread: { law: 'uniform', low: 20, high: 400 } } },
  });
  expect(drawProblems(far, 1, 4).map(({ field }) => field)).toEqual(['uncertain.rates.grazerSpread']);
});
