import { describe, expect, test } from 'vitest';
import { createRun } from '#sim-core/run/create-run.ts';
import { defaultRates, type Rates } from '#sim-core/spec/parameters.ts';
import { gridOf, groundOf, specOf } from '#sim-core/testing/setups.ts';
import { closingEstimate } from './closing-estimate.ts';
import { localGrowth } from './local-growth.ts';

const rates = defaultRates;
const [width, height] = [50, 4];
const cells = width * height;
/** A strip that stands in its first columns. */
const strip = (cover: number, columns = 6) =>
  Float32Array.from({ length: cells }, (_, i) => (i % width < columns ? cover : 0));

describe('against runs without losses or chance', () => {
  // A front from a sharp edge lags behind its speed by 1.5 ln t and a constant (Bramson 1983), which the fill time
  // stands in for: so near by, a little late, and far off, a little early.
  test.each<[string, Partial<Rates>, 1 | 4, number]>([
    ['default rates', {}, 1, 1],
    ['quarterly steps', {}, 4, 1],
    ['slow growth, fast spread', { lateralSpread: 1, fillRate: 0.5 }, 1, 1],
    ['no carry-over', { fillRate: 2, carryOver: 0 }, 1, 1],
    ['long-lived', { carryOver: 0.95, fillRate: 0.3 }, 1, 1],
    ['small cells', {}, 1, 0.5],
  ])('%s: within 2 years and 5 % of the way', (_, given, stepsPerYear, cellSize) => {
    const spec = specOf({ mode: 'mean-field', years: 100, stepsPerYear, rates: given });
    const grid = gridOf(width, height, cellSize);
    const ground = groundOf(cells, { cover: strip(1) });
    const run = createRun({ spec, grid, ground });
    while (run.nextYear());
    const closed = run.closing();
    const estimate = closingEstimate({ grid, ground, rates: spec.rates, stepsPerYear });
    let compared = 0;
    for (let x = 0; x < width; x++) {
      const i = 2 * width + x;
      // Next to the edge neighbours seed a cell faster than it fills alone.
      if (closed[i] === 0 || (x >= 6 && x < 14)) continue;
      compared++;
      const found = closed[i] - spec.surveyYear;
      expect(Math.abs(estimate[i] - found)).toBeLessThan(2 + 0.05 * found);
    }
    expect(compared).toBeGreaterThan(30);
  });
});

describe('by its parts', () => {
  const estimate = (given: Partial<Parameters<typeof groundOf>[1]>, more = {}) =>
    closingEstimate({
      grid: gridOf(width, height),
      ground: groundOf(cells, given),
      rates,
      stepsPerYear: 1,
      ...more,
    });
  const good = localGrowth(rates, 1, 1)(255, 0);

  test('what stands is closed, the rest closes at the front’s speed plus the time to fill', () => {
    const found = estimate({ cover: strip(1) });
    expect(found[3]).toBe(0);
    expect(good.speed).toBeCloseTo(rates.lateralSpread, 9);
    for (const x of [6, 20, 49]) expect(found[x]).toBeCloseTo((x - 5) / 0.5 + good.fill(0.05), 4);
  });
  test('a thin foothold first grows to 5 %', () => {
    const found = estimate({ cover: strip(0.01) });
    expect(found[0]).toBeCloseTo(good.fill(0.01), 5);
    expect(found[20] - found[10]).toBeCloseTo(20, 4);
    expect(found[10]).toBeCloseTo(5 / 0.5 + good.fill(0.01), 4);
  });
  test('refuges speed it up, poor ground slows it down', () => {
    const cover = strip(1);
    const [refuge, vigour] = [new Uint8Array(cells).fill(255), new Uint8Array(cells).fill(150)];
    const [plain, sheltered, poor] = [
      estimate({ cover }),
      estimate({ cover, refuge }),
      estimate({ cover, vigour }),
    ];
    expect(sheltered[40]).toBeLessThan(0.85 * plain[40]);
    expect(poor[40]).toBeGreaterThan(1.1 * plain[40]);
  });
  test('ground that cannot hold the plant, or on which nothing grows, stops it', () => {
    const capacity = new Uint8Array(cells).fill(255);
    const vigour = new Uint8Array(cells).fill(255);
    for (let y = 0; y < height; y++) capacity[y * width + 20] = 0;
    for (let y = 0; y < height; y++) vigour[y * width + 30] = 0;
    const found = estimate({ cover: strip(1), capacity, vigour });
    expect(found[19]).toBeLessThan(40);
    expect([found[20], found[21], found[30], found[31]]).toEqual([NaN, Infinity, NaN, Infinity]);
  });
  test('round a lone foothold, order 2 comes nearer the circle on the diagonal', () => {
    const cover = new Float32Array(41 * 41);
    cover[20 * 41 + 20] = 1;
    const at = (order?: 1 | 2) =>
      closingEstimate({
        grid: gridOf(41, 41),
        ground: groundOf(41 * 41, { cover }),
        rates,
        stepsPerYear: 1,
        order,
      })[0];
    const circle = Math.hypot(20, 20) / 0.5 + good.fill(0.05);
    expect(at()).toBe(at(1));
    expect(at(1) - circle).toBeGreaterThan(1.5);
    expect(at(1) - circle).toBeLessThan(2.5);
    expect(Math.abs(at(2) - circle)).toBeLessThan(0.8);
  });
  test('plantings start when they are planted, with what is planted', () => {
    const plantings = [
      { cell: 2 * width + 40, after: 3, cover: 0.9 },
      { cell: 2 * width + 45, after: 10, cover: 0.1 },
    ];
    const found = estimate({ cover: strip(1) }, { plantings });
    expect(found[2 * width + 40]).toBe(3);
    expect(found[2 * width + 38]).toBeCloseTo(3 + 2 / 0.5 + good.fill(0.05), 4);
    expect(found[2 * width + 45]).toBeCloseTo(10 + good.fill(0.1), 4);
    expect(found[2 * width + 10]).toBeCloseTo(5 / 0.5 + good.fill(0.05), 4);
    const never = estimate({}, { plantings: [] });
    expect(never.every((t) => t === Infinity)).toBe(true);
  });
});
