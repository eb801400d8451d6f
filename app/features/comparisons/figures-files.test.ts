// @vitest-environment node
import { expect, it } from 'vitest';
import { comparisonFigures } from '#sim-core/compare/comparison-figures.ts';
import type { ReplicateRecord } from '#sim-core/spec/replicate-record.ts';
import { decisionText } from './decision-text.ts';
import { answersCsv, pairsCsv, recoveryCsv } from './figures-files.ts';
import { smallComparison } from './testing/small-comparison.ts';

const record = (replicate: number, recoveredYear: number | null): ReplicateRecord => ({
  replicate,
  digest: '0'.repeat(64),
  recoveredYear,
  lostYear: null,
  droughtYear: 2027,
  coveredArea: Array.from({ length: 13 }, (_, i) => i),
  droughtIndex: new Array<number>(12).fill(0),
  lost: { drought: 1, background: 0, grazing: 0, events: 0 },
  drawn: {},
});
const made = smallComparison(4);
const comparison = {
  ...made,
  plan: {
    ...made.plan,
    options: made.plan.options.map((option, i) =>
      i === 1 ? { ...option, name: 'Clumps, "dense"' } : option,
    ),
  },
  decision: {
    optionId: '2',
    optionName: 'Clumps, "dense"',
    reason: 'Sooner.',
    reservations: 'Survey again.',
    decidedAt: '2026-12-01T10:00:00.000Z',
    decidedBy: 'Ines Marlow',
  },
};
/** Wait: one of four closes before the drought of 2027; Clumps: three. */
const known = [
  [2026, 2030, null, 2029],
  [2024, 2025, 2030, 2025],
].map((years) => [new Map(years.map((year, i) => [i, record(i, year)]))]);
const figures = comparisonFigures(comparison.plan, known, comparison.id);
const rows = (text: string) => text.trimEnd().split('\r\n');

it('writes the answers, quoted as RFC 4180 says, with the chosen option marked', () => {
  const text = answersCsv(comparison, figures);
  expect(text.endsWith('\r\n')).toBe(true);
  const [head, wait, clumps] = rows(text);
  const columns = head.split(',');
  expect(columns).toHaveLength(19);
  const of = (line: string) =>
    new Map(
      line
        .replace('"Clumps, ""dense"""', 'C')
        .split(',')
        .map((cell, i) => [columns[i], cell]),
    );
  expect(of(wait).get('chance_before_drought')).toBe('0.25');
  expect([of(wait).get('chosen'), of(clumps).get('chosen')]).toEqual(['no', 'yes']);
  expect(clumps).toContain('As drawn,"Clumps, ""dense""",yes,4,500,EUR,0.75,');
  // 6, 10, 12 (cut) and 9 years against 4, 5, 10 and 5.
  expect(of(clumps).get('years_sooner_than_wait')).toBe('3.25');
});

it('writes the recovery curves and the pairs', () => {
  const curve = rows(recoveryCsv(comparison.plan, figures));
  expect(curve[0]).toBe('outlook,option,year,recovered_share,low,high,open_before');
  expect(curve[1]).toBe('As drawn,Wait,2020,0,0,0,4');
  const wait = curve.filter((row) => row.startsWith('As drawn,Wait,')).map((row) => row.split(','));
  expect(wait.map(([, , year]) => Number(year))).toEqual(Array.from({ length: 13 }, (_, i) => 2020 + i));
  const share = (year: number) => Number(wait[year - 2020][3]);
  expect([2025, 2026, 2028, 2029, 2030, 2032].map(share)).toEqual([0, 0.25, 0.25, 0.5, 0.75, 0.75]);
  const [head, pair, ...more] = rows(pairsCsv(figures));
  expect(head.split(',').slice(0, 5)).toEqual(['outlook', 'option', 'than', 'pairs', 'years_sooner']);
  expect(pair).toMatch(/^As drawn,"Clumps, ""dense""",Wait,4,3\.25,/);
  expect(more).toEqual([]);
});

it('says the decision as a text that stands alone', () => {
  const text = decisionText(comparison, figures, 'Sallow Reach');
  for (const words of [
    'Small: Sallow Reach',
    'Decided: Clumps, "dense"',
    'By Ines Marlow, ',
    'Reason: Sooner.',
    'Reservations: Survey again.',
    'These are 4 futures of each option: few.',
    '- Wait, ',
    '- Clumps, "dense" (chosen), ',
    'In 75 of 100 futures this closes before the next drought',
    'On average 3.3 years sooner than Wait.',
    'it is no permit, survey or engineering design',
  ])
    expect(text).toContain(words);
  expect(decisionText({ ...comparison, decision: null }, figures, 'X')).toContain('Nothing is decided yet.');
});
