import { describe, expect, it } from 'vitest';
import { parseSeries } from './parse-series.ts';

const values = (text: string) => {
  const series = parseSeries(text);
  return series.ok
    ? series.entries.map((e) => (series.dated ? [e.year, e.value] : e.value))
    : series.problems;
};

describe('parseSeries', () => {
  it.each([
    [
      '2027,-0.4\n2028,1\n',
      [
        [2027, -0.4],
        [2028, 1],
      ],
    ],
    [
      'year;index\r\n2027;-0,4\r\n\r\n# a wet one\r\n2028;1,25',
      [
        [2027, -0.4],
        [2028, 1.25],
      ],
    ],
    ['Year\tPDSI\n2027\t−3.1', [[2027, -3.1]]],
    ['"2027","-2.5"', [[2027, -2.5]]],
    [
      '2027,-1,5\n2028,0,25',
      [
        [2027, -1.5],
        [2028, 0.25],
      ],
    ],
    ['\uFEFF-0.4\n-1,5\n2', [-0.4, -1.5, 2]],
    ['index\n0', [0]],
  ])('reads %j', (text, expected) => {
    expect(values(text)).toEqual(expected);
  });

  it('names the line of each complaint, counting blank and comment lines', () => {
    expect(values('year,value\n\n2027,-0.4\n# note\n2027,dry\n28,1\n2029\n2030,99\n2027,1')).toEqual([
      { line: 5, message: 'Found “dry” where a number was expected' },
      { line: 6, message: 'Found one field; expected a year and a value, such as 2027,-0.4' },
      { line: 7, message: 'Found one field; expected a year and a value, such as 2027,-0.4' },
      { line: 8, message: 'Found 99; a drought index on the Palmer scale lies between −15 and 15' },
      { line: 9, message: '2027 stands in line 3 already' },
    ]);
  });

  it('says when there is nothing to read', () => {
    expect(values(' \n# only a note')).toEqual([
      { line: 0, message: expect.stringContaining('Found no values') },
    ]);
    expect(values('year,value')).toEqual([{ line: 0, message: expect.stringContaining('Found no values') }]);
  });

  it('does not bury the reader in complaints', () => {
    const problems = values(Array.from({ length: 50 }, () => 'x1').join('\n'));
    expect(problems).toHaveLength(9);
    expect(problems.at(-1)).toEqual({ line: 0, message: '42 more lines cannot be read' });
  });

  it('does not mix dated and undated lines', () => {
    expect(values('-1\n2027,-1')).toEqual([
      { line: 2, message: 'Found 2 fields; expected one value, such as -0.4' },
    ]);
  });
});
