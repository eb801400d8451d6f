import Papa from 'papaparse';
import { plainCell } from '#contract/csv.ts';

/** One row of a table read from text, with the line where it begins in the file, from 1. */
export interface TableRow {
  readonly line: number;
  readonly cells: readonly string[];
}

export interface TextTable {
  /** as written, without blanks around */
  readonly header: readonly string[];
  readonly rows: readonly TableRow[];
  /** a number in one of its cells; undefined where it is none. Reads `1,5` where commas do not part the cells. */
  readonly number: (cell: string) => number | undefined;
}

/**
 * Reads comma-, semicolon- or tab-separated values (RFC 4180) whose first row names the columns. Empty rows are passed over.
 * @returns undefined where there is no header
 */
export function readTable(text: string): TextTable | undefined {
  const delimiter = delimiterOf(text);
  const { data } = Papa.parse<string[]>(text.replace(/^\uFEFF/, ''), { delimiter, newline: newlineOf(text) });
  const rows: TableRow[] = [];
  let line = 1;
  for (const cells of data) {
    if (cells.some((cell) => cell.trim() !== ''))
      rows.push({ line, cells: cells.map((cell) => plainCell(cell.trim())) });
    line += 1 + cells.reduce((sum, cell) => sum + (cell.match(/\r\n|\n|\r/g)?.length ?? 0), 0);
  }
  const [header, ...body] = rows;
  return header && { header: header.cells, rows: body, number: numberReader(delimiter !== ',') };
}

/** What parts the cells of the header parts those of all rows. */
function delimiterOf(text: string): string {
  const header = /[^\r\n]+/.exec(text)?.[0] ?? '';
  return [';', '\t'].find((mark) => header.includes(mark)) ?? ',';
}

const newlineOf = (text: string) => /\r\n|\n|\r/.exec(text)?.[0] as '\r\n' | '\n' | '\r' | undefined;

const numberReader = (commas: boolean) => (cell: string) => {
  const text = commas ? cell.replace(/^([+-]?\d*),(\d+)$/, '$1.$2') : cell;
  return /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(text) ? Number(text) : undefined;
};
