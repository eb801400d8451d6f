import { describe, expect, test } from 'vitest';
import { stream } from '#sim-core/random/streams.ts';
import { defaultRates } from '#sim-core/spec/parameters.ts';
import { gridOf, groundOf } from '#sim-core/testing/setups.ts';
import { candidatePlaces } from './candidates.ts';
import { gainKnee } from './gain-knee.ts';
import { gainMap } from './gain-map.ts';
import { createQuickLook } from './quick-look.ts';
import {
  footholdWorks,
  suggest,
  type FootholdKind,
  type SuggestInput,
  type SuggestProgress,
} from './suggest.ts';

const [width, height] = [22, 16];
const cells = width * height;
const grid = gridOf(width, height);
const clumpsAlone: FootholdKind = { year: 2026, radius: 0, strength: 0, halo: 0, clumps: 4 };
const onMound: FootholdKind = { year: 2026, radius: 2, strength: 1, halo: 2, clumps: 4 };

/** Uneven ground with a wall and a few plants, another one for each seed. */
function ground(seed: string) {
  const random = stream(seed, 'survey');
  const wall = 5 + Math.floor(12 * random());
  return groundOf(cells, {
    vigour: Uint8Array.from({ length: cells }, () => 130 + Math.floor(126 * random())),
    capacity: Uint8Array.from({ length: cells }, (_, i) =>
      i % width === wall && Math.floor(i / width) > 6 ? 0 : 120 + Math.floor(136 * random()),
    ),
    cover: Float32Array.from({ length: cells }, () => (random() < 0.006 ? 0.5 : 0)),
  });
}
const inputOf = (seed: string, more: Partial<SuggestInput> = {}): SuggestInput => ({
  grid,
  ground: ground(seed),
  rates: defaultRates,
  stepsPerYear: 1,
  surveyYear: 2025,
  years: 40,
  works: [],
  foothold: clumpsAlone,
  amount: { by: 'count', count: 3 },
  candidates: 12,
  ...more,
});
function finish<T>(work: Generator<SuggestProgress, T>): { result: T; told: SuggestProgress[] } {
  const told: SuggestProgress[] = [];
  for (;;) {
    const step = work.next();
    if (step.done) return { result: step.value, told };
    told.push(step.value);
  }
}
const sum = (values: readonly number[]) => values.reduce((a, b) => a + b, 0);
describe.each<[string, FootholdKind, string[]]>([
  ['clumps alone', clumpsAlone, ['a', 'b', 'c', 'd', 'e', 'f']],
  ['clumps on mounds', onMound, ['a', 'b', 'd']],
])('%s', (_, foothold, seeds) => {
  test('greedy against every choice of three: at least 1 − 1/e of the best, and mostly within 3 %', () => {
    const shares = seeds.map((seed) => {
      const input = inputOf(seed, { foothold });
      const { places } = candidatePlaces(input, 12);
      const look = createQuickLook(input);
      const gainOf = (...chosen: number[]) =>
        look.gainOf(chosen.flatMap((i) => footholdWorks(places[i].x, places[i].y, foothold)));
      let best = 0;
      for (let a = 0; a < places.length; a++)
        for (let b = a + 1; b < places.length; b++)
          for (let c = b + 1; c < places.length; c++) best = Math.max(best, gainOf(a, b, c));
      const { result } = finish(suggest(input));
      // The gains one by one add up to the gain of all, and nothing beats the best of all.
      const together = look.gainOf(result.works);
      expect(sum(result.footholds.map(({ gain }) => gain))).toBeCloseTo(together, 4);
      expect(together).toBeLessThanOrEqual(best * (1 + 1e-6));
      return together / best;
    });
    expect(Math.min(...shares)).toBeGreaterThan(1 - 1 / Math.E);
    expect(shares.filter((share) => share > 0.97).length).toBeGreaterThan(seeds.length / 2);
  });

  test('lazy is plain: the same footholds in the same order, weighed far less often', () => {
    for (const seed of seeds) {
      const input = inputOf(seed, { foothold, candidates: 40, amount: { by: 'count', count: 6 } });
      const { result } = finish(suggest(input));
      const look = createQuickLook(input);
      const { places } = candidatePlaces(input, 40);
      const left = [...places];
      for (const [i, found] of result.footholds.entries()) {
        const gains = left.map(({ x, y }) => look.gainOf(footholdWorks(x, y, foothold)));
        const best = gains.indexOf(Math.max(...gains));
        expect([found.x, found.y]).toEqual([left[best].x, left[best].y]);
        expect(found.gain).toBeCloseTo(gains[best], 6);
        const works = footholdWorks(left[best].x, left[best].y, foothold);
        look.change({ removed: [], added: works.map((action, j) => [10 * i + j, action]) });
        left.splice(best, 1);
      }
      expect(result.footholds).toHaveLength(6);
      expect(result.weighed).toBeLessThan(0.6 * 6 * places.length);
    }
  });

  test('each further one buys no more than the one before', () => {
    for (const seed of seeds) {
      const { footholds } = finish(
        suggest(inputOf(seed, { foothold, candidates: 60, amount: { by: 'count', count: 12 } })),
      ).result;
      expect(footholds).toHaveLength(12);
      for (let i = 1; i < footholds.length; i++)
        expect(footholds[i].gain).toBeLessThanOrEqual(footholds[i - 1].gain * (1 + 1e-3));
    }
  });
});

test('a budget buys whole footholds; none where works are not allowed; standing works are counted in', () => {
  const allowed = Uint8Array.from({ length: cells }, (_, i) => (i % width < 10 ? 1 : 0));
  const { result, told } = finish(
    suggest(inputOf('a', { allowed, candidates: 30, amount: { by: 'budget', budget: 1000, each: 240 } })),
  );
  expect(result.footholds).toHaveLength(4);
  expect(result.works.map(({ kind }) => kind)).toEqual(Array(4).fill('clumps'));
  for (const { x } of result.footholds) expect(x - grid.originX).toBeLessThan(10);
  expect(told[0]).toEqual({ stage: 'weighing', done: 0, of: result.candidates });
  expect(told.at(-1)).toEqual({ stage: 'placing', done: 3, of: 4 });
  const more = finish(suggest(inputOf('a', { allowed, candidates: 30, works: result.works }))).result;
  expect(more.footholds[0].gain).toBeLessThan(result.footholds[0].gain);
  expect(() => finish(suggest(inputOf('a', { amount: { by: 'budget', budget: 1, each: 0 } })))).toThrow(
    'cost of 0',
  );
});

test('stops when nothing is left to gain', () => {
  const late = { ...clumpsAlone, year: 2070 };
  const { footholds, knee } = finish(suggest(inputOf('a', { foothold: late }))).result;
  expect([footholds, knee]).toEqual([[], undefined]);
});

test('larger sites are weighed on blocks of cells, in about the same places with about the same gain', () => {
  const side = 520;
  const wide = gridOf(side, side);
  const far = { ...defaultRates, lateralSpread: 8 };
  const input = inputOf('a', {
    grid: wide,
    ground: groundOf(side * side, {
      cover: Float32Array.from({ length: side * side }, (_, i) => (i % side < 4 ? 1 : 0)),
    }),
    rates: far,
    candidates: 16,
    amount: { by: 'count', count: 1 },
  });
  const [found] = finish(suggest(input)).result.footholds;
  const exact = createQuickLook(input).gainOf(footholdWorks(found.x, found.y, clumpsAlone));
  expect(Math.abs(found.gain / exact - 1)).toBeLessThan(0.03);
});

describe('where one more would help most', () => {
  const input = inputOf('b', { candidates: 60 });
  const { result, told } = finish(gainMap(input));

  test('is the gain of one at each place that was weighed, and lies between its neighbours in between', () => {
    const look = createQuickLook(input);
    const { places } = candidatePlaces(input, 60);
    const gains = places.map(({ x, y }) => look.gainOf(footholdWorks(x, y, clumpsAlone)));
    expect(result.most).toBeCloseTo(Math.max(...gains), 9);
    const [lowest, highest] = [Math.min(...gains), Math.max(...gains)];
    let shown = 0;
    for (const gain of result.gains)
      if (!Number.isNaN(gain)) {
        shown++;
        expect(gain).toBeGreaterThanOrEqual(lowest - 1e-6);
        expect(gain).toBeLessThanOrEqual(highest + 1e-6);
      }
    expect(shown).toBeGreaterThan(0.8 * cells);
    // Smoothed, but still told apart: highest where the best place is, give or take.
    const best =
      Math.floor(result.best!.x - grid.originX) + width * Math.floor(grid.originY - result.best!.y);
    expect(result.gains[best]).toBeGreaterThan(0.8 * highest);
    expect([told.length, result.candidates]).toEqual([places.length, places.length]);
  });
  test('is nowhere where no foothold may stand', () => {
    const { capacity, cover } = input.ground;
    for (let cell = 0; cell < cells; cell++)
      if (capacity[cell] === 0 || cover[cell] > 0) expect(result.gains[cell]).toBeNaN();
  });
});

test('candidates: one in each block, few enough, and all of them where there are few', () => {
  const input = inputOf('c');
  const { places, side } = candidatePlaces(input, 50);
  expect(places.length).toBeLessThanOrEqual(50);
  expect(places.length).toBeGreaterThan(20);
  const blocks = new Set(
    places.map(({ column, row }) => `${Math.floor(column / side)} ${Math.floor(row / side)}`),
  );
  expect(blocks.size).toBe(places.length);
  const allowed = Uint8Array.from({ length: cells }, (_, i) => (i === 7 || i === 300 ? 1 : 0));
  expect(
    candidatePlaces({ ...input, allowed }, 50).places.map(({ column, row }) => row * width + column),
  ).toEqual([7, 300]);
});

test.each<[string, number[], number | undefined]>([
  ['a bend after the third', [10, 10, 10, 1, 1, 1, 1, 1], 3],
  ['a straight line', [2, 2, 2, 2], undefined],
  ['halving each time', [8, 4, 2, 1, 0.5, 0.25], 2],
  ['too few to tell', [5, 1], undefined],
  ['nothing', [], undefined],
])('knee of the gains: %s', (_, gains, knee) => {
  expect(gainKnee(gains)).toBe(knee);
});
