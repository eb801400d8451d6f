import { expect, test } from 'vitest';
import { csv, plainCell } from './csv.ts';

test('what would break a line is quoted as in RFC 4180', () => {
  expect(csv(['a', 'b,c'], [['say "hi"', 'two\nlines']])).toBe('a,"b,c"\r\n"say ""hi""","two\nlines"\r\n');
});

test('text that a spreadsheet would compute is marked as text; numbers stay numbers', () => {
  const cells = ['=1+1', '+1', '-1', '@sum', '\tx', 'plain', "'quoted'"];
  expect(csv(['a'], [[...cells, -1]])).toBe("a\r\n'=1+1,'+1,'-1,'@sum,'\tx,plain,'quoted',-1\r\n");
  expect(cells.map((cell) => csv([cell], []).trimEnd().replace(/\r\n$/, '')).map(plainCell)).toEqual(
    cells.map((cell) => cell.trimEnd()),
  );
});
