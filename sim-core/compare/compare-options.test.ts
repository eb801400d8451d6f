import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { bestShares } from './best-option.ts';
import { efficiency, efficientLine } from './efficient-options.ts';
import { regretTable } from './regret.ts';
import { weighOptions, type Criterion } from './weighting.ts';

describe('how often each is best', () => {
  test('by hand, ties split', () => {
    const [wait, mounds, clumps] = bestShares([
      [9, 5, 7, 4],
      [3, 5, 8, 2],
      [4, 5, 6, 9],
    ]);
    expect(wait).toMatchObject({ estimate: 1 / 12, atLeastTied: 1 });
    expect(mounds).toMatchObject({ estimate: (1 + 1 / 3 + 1) / 4, atLeastTied: 3 });
    expect(clumps).toMatchObject({ estimate: (1 / 3 + 1) / 4, atLeastTied: 2 });
    expect(wait.estimate + mounds.estimate + clumps.estimate).toBeCloseTo(1, 12);
  });
  test('unlike lengths and nothing are refused', () => {
    expect(() => bestShares([[1, 2], [1]])).toThrow(/as many of each/);
    expect(() => bestShares([])).toThrow(RangeError);
  });
});

describe('efficient options', () => {
  const options = [
    { cost: 0, gain: 34 },
    { cost: 56, gain: 83 },
    { cost: 49, gain: 55 },
    { cost: 56, gain: 45 },
    { cost: 60, gain: 83 },
  ];
  test('by hand', () => {
    expect(efficientLine(options)).toEqual([0, 2, 1]);
    expect(efficiency(options).map((o) => o.beatenBy)).toEqual([undefined, undefined, undefined, 1, 1]);
  });
  test('whatever is not efficient is beaten by one that is; alike ones both stay', () => {
    expect(efficientLine([options[1], options[1]])).toEqual([0, 1]);
    const drawn = fc.array(
      fc.record({ cost: fc.integer({ min: 0, max: 9 }), gain: fc.integer({ min: 0, max: 9 }) }),
      { minLength: 1 },
    );
    fc.assert(
      fc.property(drawn, (some) => {
        const line = efficientLine(some);
        efficiency(some).forEach(({ beatenBy }, i) => {
          expect(line.includes(i)).toBe(beatenBy === undefined);
          if (beatenBy !== undefined) expect(line).toContain(beatenBy);
        });
      }),
      { seed: 4 },
    );
  });
});

describe('regret across outlooks', () => {
  // Worked by hand: best of the outlooks 80, 60 and 30.
  const values = [
    [50, 45, 30],
    [80, 40, 10],
    [70, 60, 22],
  ];
  test('by hand', () => {
    const table = regretTable(values, 10);
    expect(table.rows.map((row) => row.regrets)).toEqual([
      [30, 15, 0],
      [0, 20, 20],
      [10, 0, 8],
    ]);
    expect(table.rows.map((row) => row.neverFar)).toEqual([false, false, true]);
    expect(table.leastRegret).toEqual([2]);
    expect(table.bestWorst).toEqual([0]);
  });
  test('gaps are refused', () => {
    expect(() => regretTable([[1], [1, 2]], 0)).toThrow(RangeError);
    expect(() => regretTable([], 0)).toThrow(RangeError);
  });
});

describe('weights', () => {
  const chance: Criterion = { values: [34, 83, 55], better: 'more', weight: 3 };
  const cost: Criterion = { values: [0, 56, 49], better: 'less', weight: 1 };
  test('by hand', () => {
    const { scores, ranking, room } = weighOptions([chance, cost]);
    expect(scores[0]).toBeCloseTo(0.25, 12);
    expect(scores[1]).toBeCloseTo(0.75, 12);
    expect(scores[2]).toBeCloseTo((3 * (21 / 49) + 7 / 56) / 4, 12);
    expect(ranking).toEqual([1, 2, 0]);
    // Wait takes over where chance and cost weigh alike: s · 1 = (1 − s) · 1.
    expect(room[0]).toEqual({ share: 0.75, low: 0.5, high: 1 });
    expect(room[1]).toEqual({ share: 0.25, low: 0, high: 0.5 });
  });
  test('a criterion in which all are alike sets none back', () => {
    const alike: Criterion = { values: [5, 5, 5], better: 'less', weight: 2 };
    expect(weighOptions([chance, alike]).ranking).toEqual([1, 2, 0]);
    expect(weighOptions([{ ...chance, values: [83, 83, 55] }, alike]).places).toEqual([1, 1, 3]);
    expect(() => weighOptions([{ ...chance, weight: 0 }])).toThrow(/above 0/);
    expect(() => weighOptions([chance, { ...cost, values: [1] }])).toThrow(RangeError);
  });
  test('within its room a weight leaves the first option first; beyond it, another comes first', () => {
    const criterion = fc.record({
      values: fc.array(fc.integer({ min: 0, max: 20 }), { minLength: 4, maxLength: 4 }),
      better: fc.constantFrom('more' as const, 'less' as const),
      weight: fc.integer({ min: 1, max: 9 }),
    });
    fc.assert(
      fc.property(
        fc.array(criterion, { minLength: 2, maxLength: 4 }),
        fc.double({ min: 0.01, max: 0.99, noNaN: true }),
        (criteria, share) => {
          const { ranking, room } = weighOptions(criteria);
          const others = criteria.slice(1).reduce((sum, c) => sum + c.weight, 0);
          const moved = weighOptions([
            { ...criteria[0], weight: (share / (1 - share)) * others },
            ...criteria.slice(1),
          ]);
          const lead = moved.scores[ranking[0]] - Math.max(...moved.scores);
          if (share > room[0].low + 1e-9 && share < room[0].high - 1e-9)
            expect(lead).toBeGreaterThanOrEqual(-1e-9);
          if (share < room[0].low - 1e-9 || share > room[0].high + 1e-9)
            expect(lead).toBeLessThanOrEqual(1e-9);
          expect(room[0].low).toBeLessThanOrEqual(room[0].share + 1e-12);
          expect(room[0].high).toBeGreaterThanOrEqual(room[0].share - 1e-12);
        },
      ),
      { seed: 7, numRuns: 500 },
    );
  });
});
