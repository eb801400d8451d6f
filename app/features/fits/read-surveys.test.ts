import { describe, expect, it } from 'vitest';
import { readAreas, readFronts } from './read-surveys.ts';

describe('a cover series', () => {
  it('takes commas, semicolons with decimal commas, tabs, a head, a BOM and per cent', () => {
    const expected = [
      { year: 2028, area: 1250.5, error: 60 },
      { year: 2030, area: 400, error: 20 },
    ];
    const texts = [
      '\uFEFFyear,covered,±\r\n2028,1250.5,60\r\n2030,20 %,1 %\r\n',
      '2028;1250,5;± 60\n\n2030;20%;1%',
      '2028\t1250.5 m²\t60\n2030\t400\t20',
    ];
    for (const text of texts) expect(readAreas(text, 2000)).toEqual({ rows: expected, problems: [] });
  });

  it.each([
    ['28, 12', /Line 1: found “28” for the year/],
    ['2028, many', /Line 1: found “many” for the covered area/],
    ['2028, -4', /Line 1: found “-4”/],
    ['2028, 12, some', /Line 1: found “some” for the ±/],
    ['2028,1250,5,60', /Line 1: found 4 values/],
    ['2028, 1\n\n2028, 2', /Line 3: 2028 stands twice/],
  ])('says of %j what is wrong with which line', (text, message) => {
    const { problems } = readAreas(text, 100);
    expect(problems).toEqual([expect.stringMatching(message)]);
  });
});

describe('fronts', () => {
  it('take two years, a speed and what it may be off by', () => {
    expect(readFronts('from,until,speed,±\n2026, 2029, 0.45 m/yr, 0.1\n2026;2030;−0,2')).toEqual({
      rows: [
        { from: 2026, until: 2029, speed: 0.45, error: 0.1 },
        { from: 2026, until: 2030, speed: -0.2, error: 0 },
      ],
      problems: [],
    });
  });

  it.each([
    ['2029, 2026, 0.4', /Line 1: found “2029” to “2026”/],
    ['2026, 2029', /Line 1: found 2 values/],
    ['2026, 2029, fast', /Line 1: found “fast” for the speed/],
    ['2026, 2029, 0.4, -1', /Line 1: found “-1” for the ±/],
  ])('say of %j what is wrong', (text, message) => {
    expect(readFronts(text).problems).toEqual([expect.stringMatching(message)]);
  });
});
