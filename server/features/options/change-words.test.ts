import { expect, it } from 'vitest';
import type { Work } from '#contract/works.ts';
import { changeInWords, worksCounted, type OptionState } from './change-words.ts';

const mound = (id: string, x = 1): Work => ({
  id,
  kind: 'mound',
  year: 2027,
  x,
  y: 2,
  radius: 1.5,
  strength: 1,
  halo: 0,
});
const clumps: Work = {
  id: 'c',
  kind: 'clumps',
  year: 2027,
  points: [
    [1, 1],
    [2, 2],
  ],
  each: 6,
};
const state = (works: Work[], more: Partial<OptionState> = {}): OptionState => ({
  name: 'A',
  note: '',
  archived: false,
  works,
  ...more,
});

it.each([
  [[mound('a')], [mound('a'), mound('b'), clumps], '1 mound added, 12 clumps added'],
  [[mound('a'), mound('b')], [mound('b', 4)], '1 mound changed, 1 mound removed'],
  [[mound('a'), mound('b')], [mound('b'), mound('a')], 'works put in another order'],
  [[mound('a')], [mound('a')], 'saved without a change'],
])('says what was done to the works', (before, after, words) => {
  expect(changeInWords(state(before), state(after))).toBe(words);
});

it('says what else was changed', () => {
  const before = state([]);
  expect(changeInWords(before, state([], { name: 'B', note: 'n' }))).toBe(
    'renamed from “A” to “B”; note changed',
  );
  expect(changeInWords(state([], { note: 'n' }), before)).toBe('note removed');
  expect(changeInWords(before, state([mound('a')], { archived: true }))).toBe('1 mound added; archived');
  expect(changeInWords(state([], { archived: true }), before)).toBe('brought back from the archive');
  expect([worksCounted([]), worksCounted([mound('a'), clumps])]).toEqual([
    'no works',
    '1 mound and 12 clumps',
  ]);
});
