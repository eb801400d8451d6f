import { expect, test } from 'vitest';
import type { Action } from '#sim-core/spec/run-spec.ts';
import { unitCostsSchema } from '#sim-core/spec/unit-costs.ts';
import { amountsOf, costPerHectare, costsOf } from './costs.ts';
import { areaExtent, ringLength } from './extent.ts';

const ring: [number, number][] = [
  [500_000, 4_000_000],
  [500_030, 4_000_000],
  [500_030, 4_000_040],
];
const works: Action[] = [
  { kind: 'mound', year: 2027, x: 0, y: 0, radius: 2, strength: 1, halo: 0 },
  { kind: 'mound', year: 2027, x: 9, y: 0, radius: 2, strength: 1, halo: 0 },
  { kind: 'mound', year: 2028, x: 0, y: 9, radius: 2, strength: 1, halo: 0 },
  {
    kind: 'clumps',
    year: 2028,
    points: [
      [0, 0],
      [1, 1],
      [2, 2],
    ],
    each: 4,
  },
  { kind: 'planting', year: 2027, area: { shape: 'polygon', ring }, cover: 0.1 },
  { kind: 'fence', year: 2027, until: 2035, area: { shape: 'polygon', ring }, strength: 1 },
  { kind: 'loss', year: 2029, area: { shape: 'polygon', ring }, share: 0.5 },
];
const unitCosts = unitCostsSchema.parse({
  currency: 'EUR',
  mound: 100,
  clump: 5,
  fenceMetre: 20,
  visit: 300,
  visitsPerYear: 2,
  perYear: 50,
  discountRate: 0.1,
  budget: 6000,
});
const input = { works, unitCosts, surveyYear: 2026, years: 3, clumpsPerSquareMetre: 4 };

test('worked by hand', () => {
  // The triangle of 30, 40 and 50 m: 120 m of fence, 600 m², of which a tenth at 4 clumps a square metre is 240 clumps.
  const costs = costsOf(input);
  expect(costs.amounts).toEqual({ mounds: 3, clumps: 252, fenceMetres: 120, visits: 4 });
  // 2027: 200 for mounds, 1200 for 240 clumps, 2400 for the fence, 600 for visits, 50. 2028: 100, 60 for 12 clumps, 600, 50. 2029: 50.
  expect(costs.byYear.map(({ year, total }) => [year, total])).toEqual([
    [2027, 4450],
    [2028, 810],
    [2029, 50],
  ]);
  expect(costs.byYear[0]).toMatchObject({ mounds: 200, clumps: 1200, fences: 2400, visits: 600, fixed: 50 });
  expect(costs).toMatchObject({
    mounds: 300,
    clumps: 1260,
    fences: 2400,
    visits: 1200,
    fixed: 150,
    total: 5310,
  });
  expect(costs.left).toBe(690);
  // 4450 / 1.1 + 810 / 1.21 + 50 / 1.331
  expect(costs.presentValue).toBeCloseTo(4045.4545 + 669.4215 + 37.5657, 3);
});

test('no works cost nothing, and losses alone neither; without a discount rate worth and total agree', () => {
  expect(costsOf({ ...input, works: [] }).total).toBe(0);
  expect(costsOf({ ...input, works: works.slice(-1) }).total).toBe(0);
  const plain = costsOf({ ...input, unitCosts: { ...unitCosts, discountRate: 0, budget: null } });
  expect([plain.presentValue, plain.left]).toEqual([5310, null]);
});

test('for each hectare that recovers beyond Wait', () => {
  expect(costPerHectare(9000, 50_000, 20_000)).toBe(3000);
  expect(costPerHectare(9000, 20_000, 20_000)).toBeUndefined();
});

test('extents of polygons, either way round, and of discs', () => {
  expect(areaExtent({ shape: 'polygon', ring })).toEqual({ area: 600, outline: 120 });
  expect(areaExtent({ shape: 'polygon', ring: ring.toReversed() }).area).toBe(600);
  expect(ringLength(ring)).toBe(120);
  const disc = { shape: 'disc' as const, x: 0, y: 0, radius: 5 };
  expect(areaExtent(disc)).toEqual({ area: Math.PI * 25, outline: Math.PI * 10 });
  expect(amountsOf({ kind: 'fence', year: 2027, area: disc, strength: 1 }, 4).fenceMetres).toBe(Math.PI * 10);
});

test('a currency is three capital letters, and no cost is below nothing', () => {
  expect(unitCostsSchema.safeParse({ currency: 'euro' }).error?.issues[0].message).toContain(
    'three capital letters',
  );
  expect(unitCostsSchema.safeParse({ currency: 'EUR', mound: -1 }).success).toBe(false);
});
