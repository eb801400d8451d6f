import Papa from 'papaparse';
import { parseNumber } from '#app/lib/parse-number.ts';

/** One line of a table, with the line of the file on which it begins, counted from 1. */
export interface TableLine {
  readonly line: number;
  readonly fields: readonly string[];
}

/** A file of a series as a table: its heads where it has some, and its lines. */
export interface SeriesTable {
  /** names of the columns, from the first line or counted */
  readonly columns: readonly string[];
  readonly lines: readonly TableLine[];
}

/**
 * Reads text as a table: semicolon, tab or comma between fields, quotes, a byte-order mark; blank lines and lines that
 * start with # are passed over. Where commas part fields and also stand for points, `2027,-1,5` is a year and a value.
 */
export function seriesTable(text: string): SeriesTable {
  const clean = text.replace(/^\uFEFF/, '').replace(/\r\n?/g, '\n');
  const delimiter = clean.includes(';') ? ';' : clean.includes('\t') ? '\t' : ',';
  const found: TableLine[] = [];
  let from = 0;
  let line = 1;
  Papa.parse<string[]>(clean, {
    delimiter,
    newline: '\n',
    step: ({ data, meta }) => {
      const fields = data.map((field) => field.trim());
      if (fields.some((field) => field !== '') && !fields[0].startsWith('#')) found.push({ line, fields });
      // A quoted field may run over lines, so lines are counted in the text and not by records.
      for (; from < meta.cursor; from++) if (clean[from] === '\n') line++;
    },
  });
  const body = delimiter === ',' ? joinDecimals(found) : found;
  const [first] = body;
  if (first && !first.fields.some((field) => /\d/.test(field)))
    return { columns: first.fields.map((name, i) => name || `Column ${i + 1}`), lines: body.slice(1) };
  const width = Math.max(0, ...body.map(({ fields }) => fields.length));
  return { columns: Array.from({ length: width }, (_, i) => `Column ${i + 1}`), lines: body };
}

/** Commas that part no fields but stand for points: in `2027,-1,5`, and in `-1,5` alone. */
function joinDecimals(lines: readonly TableLine[]): TableLine[] {
  const rows = lines.filter(({ fields }) => fields.some((field) => /\d/.test(field)));
  const head = lines.length > rows.length ? lines[0].fields.length : undefined;
  return lines.map((row) => {
    const [a, b, c] = row.fields;
    const { length } = row.fields;
    if (length === 3 && head !== 3 && isDate(a) && /^[-−+]?\d+$/.test(b) && /^\d+$/.test(c))
      return { ...row, fields: [a, `${b},${c}`] };
    if (length === 2 && head !== 2 && !isDate(a) && /^[-−+]?\d+$/.test(a) && /^\d+$/.test(b))
      return { ...row, fields: [`${a},${b}`] };
    return row;
  });
}

const isDate = (field: string) => readDate(field) !== undefined;

/** A year, or a month of one: `2027`, `2027-05`, `2027-05-31`, `202705`. */
export function readDate(field: string): { year: number; month: number | undefined } | undefined {
  const found = /^([1-9]\d{3})(?:-?(0[1-9]|1[0-2])(?:-(0[1-9]|[12]\d|3[01]))?)?(?:T.*)?$/.exec(field);
  return found ? { year: Number(found[1]), month: found[2] ? Number(found[2]) : undefined } : undefined;
}

/** Which columns hold what; `undefined` where none does. */
export interface SeriesColumns {
  readonly date: number | undefined;
  /** months in a column of their own, beside one of years */
  readonly month: number | undefined;
  readonly value: number;
}

/** The columns that a table most likely means: the first with dates, one named month, the first other with numbers. */
export function likelyColumns({ columns, lines }: SeriesTable): SeriesColumns {
  const share = (column: number, fits: (field: string) => boolean) =>
    lines.filter(({ fields }) => fits(fields[column] ?? '')).length / Math.max(1, lines.length);
  const all = columns.map((_, column) => column);
  const single = columns.length < 2;
  const date = single ? undefined : all.find((column) => share(column, isDate) > 0.5);
  const month = all.find((column) => column !== date && /^month/i.test(columns[column]));
  const value =
    all.find(
      (column) =>
        column !== date && column !== month && share(column, (f) => parseNumber(f) !== undefined) > 0.5,
    ) ??
    all.find((column) => column !== date && column !== month) ??
    0;
  return { date, month: date === undefined ? undefined : month, value };
}
