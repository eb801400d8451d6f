import { describe, expect, it } from 'vitest';
import { readSeries, standardisedRange } from './read-series.ts';
import { likelyColumns, readDate, seriesTable } from './series-table.ts';

function read(
  text: string,
  ...more: Parameters<typeof readSeries> extends [unknown, unknown, ...infer R] ? R : []
) {
  const table = seriesTable(text);
  return readSeries(table, likelyColumns(table), ...more);
}
const values = (text: string) => {
  const series = read(text);
  return series.ok
    ? series.entries.map((e) =>
        series.monthly ? [e.year, e.month, e.value] : series.dated ? [e.year, e.value] : e.value,
      )
    : series.problems;
};

describe('a series as people have it', () => {
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
    [
      'year,index\n2027,"-1,5"\n2028,2',
      [
        [2027, -1.5],
        [2028, 2],
      ],
    ],
    ['\uFEFF-0.4\n-1,5\n2', [-0.4, -1.5, 2]],
    ['index\n0', [0]],
    [
      '\uFEFFdate,pdsi\n2027-01,-1\n2027-02-15,1',
      [
        [2027, 1, -1],
        [2027, 2, 1],
      ],
    ],
    [
      'date,pdsi\n202701,-1\n202702,2',
      [
        [2027, 1, -1],
        [2027, 2, 2],
      ],
    ],
    [
      'year,month,pdsi\n2027,3,-1\n2027,4,1',
      [
        [2027, 3, -1],
        [2027, 4, 1],
      ],
    ],
    [
      'station,year,pdsi\nA,2027,-1\nA,2028,1',
      [
        [2027, -1],
        [2028, 1],
      ],
    ],
    [
      'year,a,b\n2027,1,5\n2028,2,7',
      [
        [2027, 1],
        [2028, 2],
      ],
    ],
  ])('reads %j', (text, expected) => {
    expect(values(text)).toEqual(expected);
  });

  it('names the line of each complaint, counting blank, comment and quoted lines', () => {
    expect(
      values('year,value\n\n2027,-0.4\n# note\n2027,dry\n2028,dry\n28,1\n2029\n2030,99\n2031,1,x'),
    ).toEqual([
      { line: 5, message: '2027 stands in line 3 already' },
      { line: 6, message: 'Found “dry” where a number was expected' },
      { line: 7, message: 'Found “28” where a year or a date such as 2027 or 2027-05 was expected' },
      { line: 8, message: 'Found one field; expected a year and a value, such as 2027,-0.4' },
      { line: 9, message: 'Found 99; a drought index on the Palmer scale lies between −15 and 15' },
      { line: 10, message: 'Found 3 fields; expected 2, as in the lines before' },
    ]);
    expect(values('year,value,note\n2027,1,"two\nlines"\n2028,dry,')).toEqual([
      { line: 4, message: 'Found “dry” where a number was expected' },
    ]);
  });

  it('counts what has no value, and takes nothing of a series that mixes years and months', () => {
    expect(read('year,v\n2027,1\n2028,NA\n2029,-99.99\n2030,\n2031,2')).toMatchObject({
      entries: [{ year: 2027 }, { year: 2031 }],
      missing: [3, 4, 5],
    });
    expect(values('2027,1\n2028-02,1')).toEqual([
      { line: 2, message: 'Found 2028-02, a month, after years; give all by year or all by month' },
    ]);
    expect(values('year,v\n2027,NA')).toEqual([
      { line: 0, message: expect.stringContaining('no value') as string },
    ]);
  });

  it('knows the range of what it reads', () => {
    expect(read('2027,-7\n2028,1', standardisedRange)).toMatchObject({
      problems: [
        { line: 1, message: 'Found -7; an SPEI or SPI, in standard deviations, lies between −6 and 6' },
      ],
    });
  });

  it('says when there is nothing to read, and does not bury the reader in complaints', () => {
    for (const nothing of [' \n# only a note', 'year,value'])
      expect(values(nothing)).toEqual([
        { line: 0, message: expect.stringContaining('Found no values') as string },
      ]);
    const problems = values(Array.from({ length: 50 }, () => 'x1').join('\n'));
    expect(problems).toHaveLength(9);
    expect(problems.at(-1)).toEqual({ line: 0, message: '42 more lines cannot be read' });
  });
});

it('reads dates as ISO has them, and no others', () => {
  expect(readDate('2027-05')).toEqual({ year: 2027, month: 5 });
  expect(readDate('2027-05-31T00:00')).toEqual({ year: 2027, month: 5 });
  for (const other of ['05/2027', '27', '2027-13', '2027-5', '20270501x'])
    expect(readDate(other)).toBeUndefined();
});
