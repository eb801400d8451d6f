import { describe, expect, it } from 'vitest';
import type { OutlookFigures } from './comparison-figures.ts';
import { fewFuturesWords, listed, summaryWords } from './summary-words.ts';

const none = { estimate: 0, low: 0, high: 0 };

/** Figures of options by years sooner than Wait; pairs of those named `first second` differ for sure. */
function figures(
  years: Record<string, number>,
  apart: readonly string[],
  replicates = 60,
  inTime = none,
): OutlookFigures {
  const names = Object.keys(years);
  const pairs = names.flatMap((_, second) =>
    names.slice(second + 1).map((__, after) => {
      const first = second + 1 + after;
      const estimate = years[names[first]] - years[names[second]];
      const half = apart.includes(`${names[first]} ${names[second]}`) ? Math.abs(estimate) / 2 : 9;
      return {
        first,
        second,
        sooner: { estimate, low: estimate - half, high: estimate + half },
        chanceGained: inTime,
      };
    }),
  );
  const share = { estimate: 0.5, low: 0.31, high: 0.69 };
  return {
    replicates,
    pairs,
    options: names.map((name) => ({
      name,
      wait: name === 'Wait',
      yearsSooner: years[name],
      summary: { beforeDrought: { share } },
    })),
  } as unknown as OutlookFigures;
}

describe('what can be told apart, in words', () => {
  it.each([
    [{ Wait: 0, Clumps: 4 }, ['Clumps Wait'], '“Clumps” recovers sooner than “Wait”, by 4 years (2 to 6).'],
    [{ Wait: 0, Fences: -4 }, ['Fences Wait'], '“Wait” recovers sooner than “Fences”, by 4 years (2 to 6).'],
    [
      { Wait: 0, Clumps: 4 },
      [],
      'No option can be told from the others by 60 futures: whichever recovers soonest may be so by chance.',
    ],
    [
      { Wait: 0, Mounds: 4, Clumps: 5 },
      ['Mounds Wait', 'Clumps Wait'],
      '“Clumps” and “Mounds” recover soonest, and 60 futures cannot tell the two apart. “Mounds” recovers sooner than “Wait”, by 4 years (2 to 6); “Clumps” recovers sooner than “Wait”, by 5 years (2.5 to 7.5).',
    ],
    [
      { Wait: 0, Mounds: 1, Clumps: 5 },
      ['Clumps Wait', 'Clumps Mounds'],
      '“Clumps” recovers sooner than “Wait”, by 5 years (2.5 to 7.5) and “Mounds”, by 4 years (2 to 6). “Mounds” cannot be told from “Wait”.',
    ],
  ])('%j', (years, apart, words) => {
    expect(summaryWords(figures(years as Record<string, number>, apart))).toBe(
      `${words} No difference from “Wait” in closing before the next drought can be told.`,
    );
  });
  it('says what a gain in years does to closing in time', () => {
    const inTime = { estimate: 0.22, low: 0.1, high: 0.34 };
    expect(summaryWords(figures({ Wait: 0, Clumps: 0.2 }, ['Clumps Wait'], 60, inTime))).toBe(
      '“Clumps” recovers sooner than “Wait”, by 0.2 years (0.1 to 0.3). Before the next drought closes “Clumps” in 22 more of 100 futures (10 to 34) than “Wait”.',
    );
  });
  it('says nothing before there are pairs', () => {
    expect(summaryWords({ ...figures({ Wait: 0 }, []), pairs: [] })).toBeUndefined();
  });
  it('lists as people do', () => {
    expect([['A'], ['A', 'B'], ['A', 'B', 'C']].map(listed)).toEqual(['A', 'A and B', 'A, B and C']);
  });
});

it('warns below 30 futures, with what more would give', () => {
  // Wilson's interval of 100 in 200 is 43.1 to 56.9.
  expect(fewFuturesWords(figures({ Wait: 0, Clumps: 1 }, [], 24))).toBe(
    'These are 24 futures of each option: few. A chance is known to about ± 19 of 100 only; 200 futures would make that about ± 7.',
  );
  expect(fewFuturesWords(figures({ Wait: 0, Clumps: 1 }, [], 30))).toBeUndefined();
});
