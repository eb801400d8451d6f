import { describe, expect, it } from 'vitest';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { chanceSentence } from './chance-words.ts';
import { comparisonFigures } from './comparison-figures.ts';

const plan = {
  common: { surveyYear: 2020, years: 12 },
  options: [
    { name: 'Wait', wait: true, cost: 0 },
    { name: 'Clumps', wait: false, cost: 500 },
  ],
  outlooks: [{ name: 'As drawn' }],
};
const record = (replicate: number, recovers: number | null, drought: number | null): ReplicateRecord => ({
  replicate,
  digest: '0'.repeat(64),
  recoveredYear: recovers === null ? null : 2020 + recovers,
  lostYear: replicate === 0 ? 2031 : null,
  droughtYear: drought === null ? null : 2020 + drought,
  coveredArea: Array.from({ length: 13 }, (_, i) => i + replicate),
  droughtIndex: new Array<number>(12).fill(0),
  lost: { drought: 10, background: 2, grazing: 0, events: replicate },
  drawn: {},
});
const ensemble = (...times: [recovers: number | null, drought: number | null][]) =>
  new Map(times.map(([recovers, drought], i) => [i, record(i, recovers, drought)] as const));

describe('the figures of a comparison', () => {
  const known = [
    [ensemble([10, 8], [null, 5], [9, null], [null, null])],
    [ensemble([6, 8], [4, 5], [9, null], [11, null], [3, 4])],
  ];
  const { outlooks, regret } = comparisonFigures(plan, known, 'seed');
  const [{ options, pairs, replicates, efficient }] = outlooks;

  it('rest on the replicates that all options have', () => {
    expect(replicates).toBe(4);
    expect(options.map((o) => o.summary.replicates)).toEqual([4, 4]);
    expect(regret).toBeUndefined();
  });
  it('count what came first, and drop none', () => {
    expect(options[0].summary.beforeDrought).toMatchObject({ recovery: 1, drought: 2, neither: 1 });
    expect(options[1].summary.beforeDrought).toMatchObject({ recovery: 4, drought: 0, neither: 0 });
    expect(options[0].summary.recovery.at(-1)?.open).toBe(0.5);
    expect(options.map((o) => o.lostAgain)).toEqual([1, 1]);
    expect(options[0].lost).toEqual({ drought: 10, background: 2, grazing: 0, events: 1.5 });
  });
  it('pair futures of the same luck, with those still open at the horizon', () => {
    // 10 − 6, 12 − 4, 9 − 9 and 12 − 11 years.
    expect(pairs).toHaveLength(1);
    expect(pairs[0]).toMatchObject({ first: 1, second: 0, chanceGained: { estimate: 0.75 } });
    expect(pairs[0].sooner.estimate).toBeCloseTo(13 / 4, 12);
    expect(options[1].yearsSooner).toBe(pairs[0].sooner.estimate);
    expect(options.map((o) => o.best.estimate)).toEqual([0.125, 0.875]);
  });
  it('join the efficient options, where costs are known', () => {
    expect(efficient).toEqual([0, 1]);
    const noCosts = { ...plan, options: plan.options.map((option) => ({ ...option, cost: null })) };
    expect(comparisonFigures(noCosts, known, 'seed').outlooks[0].efficient).toEqual([]);
  });
  it('say nothing before there is anything', () => {
    expect(comparisonFigures(plan, [[new Map()], [new Map()]], 'seed').outlooks).toEqual([]);
  });
  it('weigh options across outlooks', () => {
    const two = { ...plan, outlooks: [plan.outlooks[0], { ...plan.outlooks[0], name: 'Drier' }] };
    const across = comparisonFigures(
      two,
      known.map(([one]) => [one, ensemble([null, 2], [null, 2], [null, 2], [1, 2])]),
      'seed',
    );
    expect(across.outlooks.map((o) => o.name)).toEqual(['As drawn', 'Drier']);
    expect(across.regret?.rows.map((row) => row.neverFar)).toEqual([false, true]);
    expect(across.regret?.leastRegret).toEqual([1]);
  });
});

it('tells a chance to people who decide, with what is still open', () => {
  const share = { estimate: 0.834, low: 0.761, high: 0.876 };
  expect(chanceSentence({ share, recovery: 125, drought: 25, neither: 0 })).toBe(
    'In 83 of 100 futures this closes before the next drought (76 to 88), from 150 that were run.',
  );
  expect(chanceSentence({ share, recovery: 125, drought: 20, neither: 5 })).toMatch(
    /In 5 of them neither came by the horizon; they count as not closed in time\.$/,
  );
  expect(chanceSentence({ share: undefined, recovery: 0, drought: 0, neither: 0 })).toMatch(/No future/);
});
