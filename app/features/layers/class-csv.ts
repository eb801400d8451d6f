import Papa from 'papaparse';
import { habitatClassSchema, habitatClassesSchema, type HabitatClass } from '#contract/layers.ts';
import { parseNumber } from '#app/lib/parse-number.ts';

const columns = ['value', 'name', 'colour', 'capacity', 'vigour'] as const;
const mostProblems = 8;

/** Something wrong in one row; the header is row 1, and 0 stands for the file as a whole. */
export interface RowProblem {
  readonly row: number;
  readonly message: string;
}
export type ParsedClasses =
  | { readonly ok: true; readonly classes: HabitatClass[] }
  | { readonly ok: false; readonly problems: readonly RowProblem[] };

/** A class table as CSV (RFC 4180), a header row first. */
export const classesToCsv = (classes: readonly HabitatClass[]): string =>
  `${Papa.unparse({ fields: [...columns], data: classes.map((row) => columns.map((name) => row[name])) })}\r\n`;

/**
 * Reads a class table from CSV: the header names the columns, in any order; comma, semicolon or tab between fields;
 * decimal point, or comma where it does not part fields. Every complaint names its row.
 */
export function parseClassCsv(text: string): ParsedClasses {
  const { data } = Papa.parse<string[]>(text.replace(/^\uFEFF/, ''), {
    skipEmptyLines: false,
    delimitersToGuess: [',', ';', '\t'],
  });
  const rows = data
    .map((fields, i) => ({ row: i + 1, fields: fields.map((field) => field.trim()) }))
    .filter(({ fields }) => fields.some((field) => field !== ''));
  const header = rows.shift();
  if (!header) return whole('Found nothing. Expected a header row and a row for each class.');
  const heads = header.fields.map((field) => field.toLowerCase().replace('color', 'colour'));
  const missing = columns.filter((name) => !heads.includes(name));
  if (missing.length > 0)
    return {
      ok: false,
      problems: [
        {
          row: header.row,
          message: `Found the columns ${header.fields.join(', ')}; expected ${columns.join(', ')}. Missing: ${missing.join(', ')}`,
        },
      ],
    };
  if (rows.length === 0) return whole('Found a header row alone. Expected a row for each class.');
  return readRows(rows, (fields, name) => fields[heads.indexOf(name)] ?? '');
}

function readRows(
  rows: readonly { row: number; fields: string[] }[],
  field: (fields: string[], name: (typeof columns)[number]) => string,
): ParsedClasses {
  const problems: RowProblem[] = [];
  const classes: HabitatClass[] = [];
  const rowOf = new Map<number, number>();
  for (const { row, fields } of rows) {
    const read = habitatClassSchema.safeParse({
      value: parseNumber(field(fields, 'value')),
      name: field(fields, 'name'),
      colour: field(fields, 'colour'),
      capacity: parseNumber(field(fields, 'capacity')),
      vigour: parseNumber(field(fields, 'vigour')),
    });
    if (!read.success) {
      for (const issue of read.error.issues) {
        const name = issue.path[0] as (typeof columns)[number];
        problems.push({
          row,
          message: `${name}: found “${field(fields, name)}”, expected ${expected[name]}`,
        });
      }
      continue;
    }
    const before = rowOf.get(read.data.value);
    if (before !== undefined)
      problems.push({ row, message: `value: ${read.data.value} stands in row ${before} already` });
    rowOf.set(read.data.value, row);
    classes.push(read.data);
  }
  const more = problems.length - mostProblems;
  if (more > 0)
    return {
      ok: false,
      problems: [...problems.slice(0, mostProblems), { row: 0, message: `${more} more things are wrong` }],
    };
  if (problems.length > 0) return { ok: false, problems };
  if (!habitatClassesSchema.safeParse(classes).success)
    return whole(`Found ${classes.length} classes; expected at most 256.`);
  return { ok: true, classes };
}

const whole = (message: string): ParsedClasses => ({ ok: false, problems: [{ row: 0, message }] });

const expected: Record<(typeof columns)[number], string> = {
  value: 'a whole class number',
  name: 'a name of 1 to 80 characters',
  colour: 'a colour such as #5b825a',
  capacity: 'a share from 0 to 1',
  vigour: 'a share from 0 to 1',
};
