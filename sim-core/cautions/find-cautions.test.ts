import { describe, expect, test } from 'vitest';
import { runSpecSchema, type RunSpecInput } from '#sim-core/spec/run-spec.ts';
import { findCautions, gatherCautions } from './find-cautions.ts';

const spec = (more: Partial<RunSpecInput> = {}) =>
  runSpecSchema.parse({
    ...{ version: 1, seed: 'a', surveyYear: 2026, years: 30, rates: {} },
    layers: { cover: 0.5, refuge: 0.5 },
    ...more,
  });
/** Sixty years, a drought of −4 every tenth. */
const record = Array.from({ length: 60 }, (_, i) => ({ year: 1966 + i, index: i % 10 === 5 ? -4 : 0 }));
const codes = (more: Partial<RunSpecInput> = {}, given: object = {}) =>
  findCautions({ spec: spec(more), cellSize: 0.5, record, ...given }).map(({ code }) => code);
const renewal = (mean: number, depth = -4) => ({
  kind: 'renewal' as const,
  returnInterval: { law: 'exponential' as const, mean },
  ...{ sinceLatest: 3, depth, length: { law: 'fixed' as const, years: 1 } },
});

describe('cautions', () => {
  test('nothing is said where data carry the belief', () => {
    expect(codes()).toEqual([]);
  });
  test.each([
    [{ rates: { lateralSpread: 3 } }, {}, 'front-speed-outside-published'],
    [{ rates: { lateralSpread: 0.1 } }, {}, 'front-speed-outside-published'],
    [{}, { cellSize: 1 }, 'cell-too-coarse'],
    [{}, { record: undefined }, 'no-drought-record'],
    [{ years: 61 }, {}, 'horizon-beyond-record'],
    [{ droughtIndex: renewal(80) }, {}, 'interval-beyond-record'],
    [{}, { record: record.slice(0, 40) }, 'few-droughts-in-record'],
    [{ droughtIndex: renewal(12, -6) }, {}, 'drier-than-record'],
    [{ droughtIndex: -4.2 }, {}, 'drier-than-record'],
    [{ trend: { shiftPerDecade: -0.2 } }, {}, 'trend-assumed'],
    [{ layers: { cover: 0.5 } }, {}, 'no-refuge'],
  ])('%j %# says %s', (more, given, code) => {
    expect(codes(more as Partial<RunSpecInput>, given)).toContain(code);
    expect(codes()).not.toContain(code);
  });
  test('the range that the plant’s own profile gives comes first', () => {
    const published = { least: 0.01, most: 0.06, source: 'an invented survey' };
    expect(codes({ rates: { lateralSpread: 0.5 } }, { published })).toContain(
      'front-speed-outside-published',
    );
    expect(codes({ rates: { lateralSpread: 0.05 } }, { published, cellSize: 0.05 })).toEqual([]);
  });
  test('words carry the figures', () => {
    const [caution] = findCautions({
      spec: spec({ trend: { shiftPerDecade: -0.2 } }),
      ...{ cellSize: 0.5, record },
    });
    expect(caution).toMatchObject({ message: expect.stringContaining('0.6 lower by the horizon') as string });
    expect(caution.figures.shift).toBeCloseTo(-0.6, 12);
  });
  test('a comparison says each once, with the outlooks that it is about', () => {
    const [a, b] = [{ trend: { shiftPerDecade: -0.2 }, years: 90 }, { years: 90 }].map((more) =>
      findCautions({ spec: spec(more), cellSize: 0.5, record }),
    );
    const said = gatherCautions([
      { name: 'Drier', cautions: a },
      { name: 'As recorded', cautions: b },
    ]);
    expect(said.map(({ code, outlooks }) => [code, outlooks])).toEqual([
      ['horizon-beyond-record', []],
      ['trend-assumed', ['Drier']],
    ]);
  });
});
