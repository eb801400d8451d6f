// @vitest-environment node
import { describe, expect, it } from 'vitest';
import { startComparison } from '#contract/comparisons.ts';
import { unitCostsSchema } from '#sim-core/spec/unit-costs.ts';
import { replicateSpec } from '#contract/comparisons.ts';
import { mapYears, shiftedWeather, startBody } from './compose-plan.ts';
import { smallComparison } from './testing/small-comparison.ts';

describe('years of which maps are kept', () => {
  it('are all where they fit, and end with the horizon', () => {
    expect(mapYears(2026, 5, 1000, 3)).toEqual([2026, 2027, 2028, 2029, 2030, 2031]);
    expect(mapYears(2026, 200, 1000, 3)).toHaveLength(60);
    expect(mapYears(2026, 200, 1000, 3).at(-1)).toBe(2226);
  });
  it('are fewer on a large map, and never none', () => {
    // 2,000 × 2,000 cells and three ensembles: 72 MB a year.
    expect(mapYears(2026, 40, 4_000_000, 3)).toEqual([2026, 2036, 2046, 2056, 2066]);
    expect(mapYears(2026, 40, 64_000_000, 8)).toEqual([2026, 2066]);
  });
});

describe('drier and wetter weather', () => {
  it('shifts every kind of it', () => {
    expect(shiftedWeather(-1, -0.5)).toBe(-1.5);
    expect(shiftedWeather([0, -14.9], -0.5)).toEqual([-0.5, -15]);
    expect(shiftedWeather({ kind: 'palmer-type', standardDeviation: 2 }, 0.5)).toMatchObject({ mean: 0.5 });
    expect(
      shiftedWeather({ kind: 'series', order: 'dated', values: [{ year: 2000, value: -1 }] }, 0.25),
    ).toMatchObject({ values: [{ year: 2000, value: -0.75 }] });
    const law = { law: 'fixed', years: 2 } as const;
    expect(
      shiftedWeather({ kind: 'renewal', returnInterval: law, sinceLatest: 1, depth: -4, length: law }, -1),
    ).toMatchObject({ depth: -5, between: -1 });
  });
});

it('makes a body that the contract takes, whose runs are those of the options', () => {
  const { plan } = smallComparison(8);
  const ids = ['00000000-0000-4000-8000-000000000001', '00000000-0000-4000-8000-000000000002'];
  const body = startBody({
    name: 'Wait or clumps',
    options: ids.map((optionId, i) => ({ optionId, cost: i * 500, spec: replicateSpec(plan, i, 0, 0) })),
    outlooks: plan.outlooks,
    replicates: 50,
    stop: { atLeast: 20, halfWidth: 0.05 },
    droughtThreshold: -2.3,
    currency: 'EUR',
    unitCosts: unitCostsSchema.parse({ currency: 'EUR', mound: 300, budget: 900 }),
    cells: 140,
  });
  const parsed = startComparison.body.parse(body);
  expect(parsed.common).toEqual(plan.common);
  expect(parsed.unitCosts).toMatchObject({ mound: 300, budget: 900 });
  expect(parsed.mapYears).toHaveLength(13);
});
