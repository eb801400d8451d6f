import { describe, expect, it } from 'vitest';
import { drawnOutlookWords, listYears, outlookWords, yearEffect } from './outlook-words.ts';

const tolerances = { open: -2.3, mound: -4.2 };
const series = (...values: number[]) => values.map((index, i) => ({ year: 2027 + i, index }));

it('lists years and stretches of them', () => {
  expect(listYears([2049])).toBe('2049');
  expect(listYears([2049, 2050])).toBe('2049 and 2050');
  expect(listYears([2031, 2049, 2050, 2051])).toBe('2031 and 2049 to 2051');
  expect(listYears(Array.from({ length: 10 }, (_, i) => 2000 + 2 * i))).toBe(
    '2000, 2002, 2004, 2006, 2008, 2010, 2012 and 3 more',
  );
});

describe('outlookWords', () => {
  it('says that nothing kills where nothing does; the tolerance itself does not count', () => {
    expect(outlookWords(series(0, -2.3), tolerances)[0]).toBe(
      'No year of 2 is dry enough to kill open marsh.',
    );
  });

  it('names the years, what a mound changes, and the longest stretch between them', () => {
    expect(outlookWords(series(0, -3, 0, 0, -5), tolerances)).toEqual([
      '2 of 5 years would kill open marsh: 2028 and 2031.',
      'Near a mound it still dies in 2031.',
      expect.stringContaining('2 years, 2029 to 2030'),
    ]);
    expect(outlookWords(series(0, -3, 0, 0, -5), tolerances)[2]).toContain('starts again from its footholds');
    expect(outlookWords(series(0, -3, 0, 0), tolerances)[2]).toBe(
      'The longest stretch without such a year is 2 years, 2029 to 2030: no drought ends it within this outlook.',
    );
    expect(outlookWords(series(-3), tolerances)).toEqual([
      '1 of 1 year would kill open marsh: 2027.',
      'Near a mound the marsh bears them all.',
    ]);
    expect(outlookWords(series(-9, 0), tolerances)[1]).toBe(
      'Near a mound the marsh does not bear them either.',
    );
  });
});

it('says what one year does', () => {
  expect(yearEffect(-2, tolerances)).toBe('open marsh bears it');
  expect(yearEffect(-3, tolerances)).toBe('kills open marsh, not near a mound');
  expect(yearEffect(-5, tolerances)).toBe('kills marsh, also near a mound');
});

it('speaks of drawn futures where the weather is drawn, and of the listed years as what they are', () => {
  const futures = {
    futures: 1000,
    lines: [
      { below: -2, inYear: [0.5, 0.5], byThen: [0.5, 0.99] },
      { below: -4, inYear: [0.1, 0.1], byThen: [0.1, 0.19] },
    ],
  };
  const series = [
    { year: 2027, index: 0 },
    { year: 2028, index: 0 },
  ];
  const words = drawnOutlookWords(futures, series, { open: -2, mound: -4 }).join(' ');
  expect(words).toContain('By 2028, a year dry enough to kill open marsh comes in 99 % of futures');
  expect(words).toContain('near a mound too in 19 %');
  expect(words).toContain('none of the 2 would kill open marsh');
  expect(words).not.toContain('without a drought');
});
