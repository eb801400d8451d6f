import { describe, expect, test } from 'vitest';
import { createRun } from '#sim-core/run/create-run.ts';
import { defaultRates, type Rates } from '#sim-core/spec/parameters.ts';
import type { Action } from '#sim-core/spec/run-spec.ts';
import { gridOf, groundOf, specOf } from '#sim-core/testing/setups.ts';
import { localGrowth } from '#sim-core/theory/local-growth.ts';
import { referenceShare } from '#sim-core/theory/reference-cover.ts';
import { stepRates } from '#sim-core/theory/step-rates.ts';
import { createQuickLook, type QuickLookInput } from './quick-look.ts';

const [width, height] = [50, 4];
const cells = width * height;
const grid = gridOf(width, height);
const surveyYear = 2025;
/** A strip that stands in its first columns. */
const strip = (cover: number, columns = 6) =>
  Float32Array.from({ length: cells }, (_, i) => (i % width < columns ? cover : 0));
const place = (column: number, row: number) => ({
  x: grid.originX + column + 0.5,
  y: grid.originY - row - 0.5,
});
const point = (column: number, row: number): [number, number] => [place(column, row).x, place(column, row).y];
const lookAt = (
  given: Parameters<typeof groundOf>[1],
  works: Action[] = [],
  more: Partial<QuickLookInput> = {},
) => {
  const look = createQuickLook({
    grid,
    ground: groundOf(cells, given),
    rates: defaultRates,
    stepsPerYear: 1,
    surveyYear,
    years: 150,
    ...more,
  });
  look.change({ removed: [], added: works.map((work, i) => [i, work]) });
  return look;
};

describe('against runs without losses or chance', () => {
  // A front from a sharp edge lags behind its speed by 1.5 ln t and a constant (Bramson 1983), which the fill time
  // stands in for: so near by, a little late, and far off, a little early.
  test.each<[string, Partial<Rates>, 1 | 4, number, Action[]]>([
    ['default rates', {}, 1, 1, []],
    ['quarterly steps', {}, 4, 1, []],
    ['slow growth, fast spread', { lateralSpread: 1, fillRate: 0.5 }, 1, 1, []],
    ['no carry-over', { fillRate: 2, carryOver: 0 }, 1, 1, []],
    ['long-lived', { carryOver: 0.95, fillRate: 0.3 }, 1, 1, []],
    ['small cells', {}, 1, 0.5, []],
    [
      'planted cover and clumps',
      {},
      1,
      1,
      [
        {
          kind: 'planting',
          year: 2028,
          area: { shape: 'polygon', ring: [point(29, -1), point(31, -1), point(31, 5), point(29, 5)] },
          cover: 0.9,
        },
        { kind: 'clumps', year: 2035, points: [0, 1, 2, 3].map((row) => point(45, row)), each: 3 },
      ],
    ],
  ])('%s: within 2 years and 5 % of the way', (_, given, stepsPerYear, cellSize, actions) => {
    const spec = specOf({ mode: 'mean-field', years: 100, stepsPerYear, rates: given, surveyYear, actions });
    const where = gridOf(width, height, cellSize);
    const ground = groundOf(cells, { cover: strip(1) });
    const run = createRun({ spec, grid: where, ground });
    while (run.nextYear());
    const closed = run.closing();
    const look = lookAt({ cover: strip(1) }, actions, { grid: where, rates: spec.rates, stepsPerYear });
    let compared = 0;
    for (let x = 0; x < width; x++) {
      const i = 2 * width + x;
      // Next to the edge neighbours seed a cell faster than it fills alone.
      if (closed[i] === 0 || (x >= 6 && x < 14)) continue;
      compared++;
      const found = closed[i] - surveyYear;
      expect(Math.abs(look.closing(i) - found)).toBeLessThan(2 + 0.05 * found);
    }
    expect(compared).toBeGreaterThan(30);
  });
});

describe('by its parts', () => {
  const good = localGrowth(defaultRates, 1, 1)(255, 0);
  const closings = (...given: Parameters<typeof lookAt>) => {
    const look = lookAt(...given);
    return Array.from({ length: cells }, (_, i) => look.closing(i));
  };

  test('what stands is closed, the rest closes at the front’s speed plus the time to fill', () => {
    const look = lookAt({ cover: strip(1) });
    expect([look.closing(3), look.years[3]]).toEqual([0, surveyYear]);
    expect(good.speed).toBeCloseTo(defaultRates.lateralSpread, 9);
    for (const x of [6, 20, 49]) {
      const years = (x - 5) / 0.5 + good.fill(0.05);
      expect(look.closing(x)).toBeCloseTo(years, 3);
      expect(look.arrival(x)).toBeCloseTo((x - 5) / 0.5, 3);
      expect(look.years[x]).toBe(surveyYear + Math.ceil(years));
    }
  });
  test('a thin foothold first grows to 5 %', () => {
    const found = closings({ cover: strip(0.01) });
    expect(found[0]).toBeCloseTo(good.fill(0.01), 5);
    expect(found[20] - found[10]).toBeCloseTo(20, 3);
    expect(found[10]).toBeCloseTo(5 / 0.5 + good.fill(0.01), 3);
  });
  test('refuges speed it up, poor ground slows it down', () => {
    const cover = strip(1);
    const [refuge, vigour] = [new Uint8Array(cells).fill(255), new Uint8Array(cells).fill(150)];
    const [plain, sheltered, poor] = [
      closings({ cover }),
      closings({ cover, refuge }),
      closings({ cover, vigour }),
    ];
    expect(sheltered[40]).toBeLessThan(0.85 * plain[40]);
    expect(poor[40]).toBeGreaterThan(1.1 * plain[40]);
  });
  test('ground that cannot hold the plant, or on which nothing grows, stops it', () => {
    const capacity = new Uint8Array(cells).fill(255);
    const vigour = new Uint8Array(cells).fill(255);
    for (let y = 0; y < height; y++) capacity[y * width + 20] = 0;
    for (let y = 0; y < height; y++) vigour[y * width + 30] = 0;
    const { years } = lookAt({ cover: strip(1), capacity, vigour });
    expect(years[19]).toBeGreaterThan(surveyYear);
    expect([years[20], years[21], years[30], years[31]]).toEqual([-32768, 0, -32768, 0]);
  });
  test('what arrives after the horizon stays open', () => {
    const { years } = lookAt({ cover: strip(1) }, [], { years: 30 });
    expect(years[10]).toBeGreaterThan(surveyYear);
    // Every second year another column.
    expect(surveyYear + 30 - Math.max(...years)).toBeLessThan(2);
    expect(Math.max(...years)).toBeLessThanOrEqual(surveyYear + 30);
    expect(years[49]).toBe(0);
  });
  test('plantings start when they are planted, with what is planted; those of one year and cell add up', () => {
    const planted = (column: number, year: number, cover: number): Action => ({
      kind: 'planting',
      year,
      area: { shape: 'disc', ...place(column, 2), radius: 0.4 },
      cover,
    });
    const found = closings({ cover: strip(1) }, [planted(40, 2028, 0.4), planted(45, 2035, 0.1)]);
    const row = 2 * width;
    expect(found[row + 40]).toBeCloseTo(3 + good.fill(0.4), 5);
    expect(found[row + 38]).toBeCloseTo(3 + 2 / 0.5 + good.fill(0.05), 3);
    expect(found[row + 45]).toBeCloseTo(10 + good.fill(0.1), 5);
    expect(found[row + 10]).toBeCloseTo(5 / 0.5 + good.fill(0.05), 3);
    const clumps = (each: number, points: number): Action => ({
      kind: 'clumps',
      year: 2028,
      points: Array.from({ length: points }, () => point(40, 2)),
      each,
    });
    // Four clump sites on a square metre.
    expect(closings({}, [clumps(1, 2)])[row + 40]).toBeCloseTo(3 + good.fill(0.5), 5);
    expect(closings({}, [clumps(1, 1)])[row + 40]).toBeCloseTo(3 + good.fill(0.25), 5);
    expect(closings({}, [clumps(1, 1), clumps(1, 1)])[row + 40]).toBeCloseTo(3 + good.fill(0.5), 5);
  });
  test('a mound makes growth faster from its year on, and in its disc alone', () => {
    const cover = strip(1);
    const mound = (year: number): Action => ({
      kind: 'mound',
      year,
      ...place(20, 2),
      radius: 3.2,
      strength: 1,
      halo: 0,
    });
    const at = (x: number, works: Action[]) => lookAt({ cover }, works).arrival(2 * width + x);
    const fast = localGrowth(defaultRates, 1, 1)(255, 255).speed;
    expect(fast).toBeGreaterThan(1.15 * good.speed);
    // Growth comes to column 16 after 22 years, and to the mound's, 17 to 23, from there on.
    const plain = at(23, []);
    const early = at(23, [mound(2026)]);
    expect(at(16, [mound(2026)])).toBeCloseTo(22, 3);
    expect(early).toBeCloseTo(22 + 7 / fast, 2);
    // Built when growth stands on column 20: the rest is faster.
    const half = at(23, [mound(2025 + 30)]);
    expect(half).toBeCloseTo(30 + 3 / fast, 2);
    expect(at(23, [mound(2025 + 40)])).toBe(plain);
    expect(at(20, [mound(2025 + 40)])).toBeCloseTo(30, 3);
  });
});

test('what stands fills sooner when it is added to or sheltered, though growth arrives no sooner', () => {
  const cell = 2 * width + 40;
  const cover = Float32Array.from({ length: cells }, (_, i) => (i === cell ? 0.06 : 0));
  const good = localGrowth(defaultRates, 1, 1);
  const look = lookAt({ cover });
  expect(look.closing(cell)).toBeCloseTo(good(255, 0).fill(0.06), 5);
  const [slow, fast] = [good(255, 0).fill(0.06), good(255, 255).fill(0.06)];
  expect([fast > 1, slow > 2]).toEqual([true, true]);
  const mound = (year: number, strength = 1): Action => ({
    kind: 'mound',
    year,
    ...place(40, 2),
    radius: 2,
    strength,
    halo: 0,
  });
  const sheltered = (...works: Action[]) => lookAt({ cover }, works).closing(cell);
  expect(sheltered(mound(2025 + 1))).toBeCloseTo(fast, 5);
  expect(sheltered(mound(2025 + Math.ceil(slow) - 1))).toBe(Math.ceil(slow) - 1);
  expect(sheltered(mound(2025 + Math.ceil(slow)))).toBeCloseTo(slow, 5);
  // Of two, the stronger counts, from the year of the first.
  for (const pair of [
    [mound(2026, 0.2), mound(2026, 1)],
    [mound(2026, 1), mound(2026, 0.2)],
  ])
    expect(sheltered(...pair)).toBeCloseTo(fast, 5);
  look.change({ removed: [], added: [[1, { kind: 'clumps', year: 2026, points: [point(40, 2)], each: 4 }]] });
  expect([look.closing(cell), look.years[cell]]).toEqual([1, 2026]);
  expect(look.summary().closedBy[1].area).toBeGreaterThan(0);
});

test('works that come and go leave no trace, and a gain that is asked for leaves none', () => {
  const mound: Action = { kind: 'mound', year: 2027, ...place(30, 1), radius: 3, strength: 1, halo: 2 };
  const clumps: Action = { kind: 'clumps', year: 2027, points: [point(30, 1), point(30, 1)], each: 2 };
  const planting: Action = {
    kind: 'planting',
    year: 2030,
    area: { shape: 'disc', ...place(20, 2), radius: 2 },
    cover: 0.4,
  };
  const cover = strip(1);
  const look = lookAt({ cover });
  const bare = look.years.slice();
  const bareSummary = look.summary();
  const gain = look.gainOf([mound, clumps]);
  expect([look.years, look.summary()]).toEqual([bare, bareSummary]);
  look.change({
    removed: [],
    added: [
      [1, mound],
      [2, clumps],
    ],
  });
  let sooner = 0;
  const before = lookAt({ cover });
  for (let i = 0; i < cells; i++) sooner += before.arrival(i) - look.arrival(i);
  expect(gain).toBeCloseTo(sooner / cells, 6);
  look.change({ removed: [], added: [[3, planting]] });
  expect(look.years).toEqual(lookAt({ cover }, [planting, clumps, mound]).years);
  const { half, eighty, ninety, closable } = look.summary();
  expect(closable).toBeCloseTo(cells * referenceShare(stepRates(defaultRates, 1), 1), 2);
  expect([half! < bareSummary.half!, half! <= eighty!, eighty! <= ninety!]).toEqual([true, true, true]);
  look.change({ removed: [2, 1, 3], added: [] });
  expect([look.years, look.summary()]).toEqual([bare, bareSummary]);
});

test('summary: area closed by each year, and when 50, 80 and 90 % have', () => {
  const { closedBy, half, eighty, ninety, closable } = lookAt({ cover: strip(1) }).summary();
  expect(closedBy[0]).toEqual({ year: surveyYear, area: expect.closeTo((closable * 6) / 50, 6) as number });
  expect(closedBy.at(-1)!.area).toBeCloseTo(closable, 6);
  const years = lookAt({ cover: strip(1) })
    .years.slice(0, width)
    .sort();
  expect([half, eighty, ninety]).toEqual([years[24], years[39], years[44]]);
});
