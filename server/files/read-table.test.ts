import { expect, it } from 'vitest';
import { readTable } from './read-table.ts';

const cells = (text: string) => readTable(text)?.rows.map((row) => row.cells);

it('reads commas, semicolons and tabs, whatever the line ends, with or without a byte order mark', () => {
  for (const text of ['a,b\n1,2\n3,4\n', 'a;b\r\n1;2\r\n3;4', '\uFEFFa\tb\r1\t2\r3\t4\r'])
    expect([readTable(text)?.header, cells(text)]).toEqual([['a', 'b'], [['1', '2'], ['3', '4']]]); // prettier-ignore
  expect(readTable('')).toBeUndefined();
  expect(readTable('\n\n')).toBeUndefined();
});

it('says on which line a row begins, also after quoted line ends and empty lines', () => {
  const table = readTable('a,b\n"two\nlines",1\n\n3,"say ""hi"""\n');
  expect(table?.rows).toEqual([
    { line: 2, cells: ['two\nlines', '1'] },
    { line: 5, cells: ['3', 'say "hi"'] },
  ]);
});

it('reads numbers strictly, with a decimal comma where commas are free', () => {
  const [comma, semicolon] = ['a,b', 'a;b'].map((header) => readTable(header)!.number);
  expect(['1', '-2.5', '.5', '1e3', ' ', '1 000', '1.000.000', '0x10', 'Infinity'].map(comma)).toEqual([
    1, -2.5, 0.5, 1000, undefined, undefined, undefined, undefined, undefined,
  ]); // prettier-ignore
  expect([comma('1,5'), semicolon('1,5'), semicolon('1,000,5')]).toEqual([undefined, 1.5, undefined]);
});

it('takes the apostrophe off that keeps a spreadsheet from computing', () => {
  expect(cells("a\n'=1+1\n'quoted'\n")).toEqual([['=1+1'], ["'quoted'"]]);
});
