import { parseNumber } from '#app/lib/parse-number.ts';

/** One value of a drought series; without a year where the text gave none. */
export interface SeriesEntry {
  readonly year: number | undefined;
  readonly value: number;
}

/** Something wrong in one line. */
export interface LineProblem {
  /** counted from 1; 0 for the text as a whole */
  readonly line: number;
  readonly message: string;
}

export type ParsedSeries =
  | { readonly ok: true; readonly dated: boolean; readonly entries: readonly SeriesEntry[] }
  | { readonly ok: false; readonly problems: readonly LineProblem[] };

const driest = -15;
const wettest = 15;
const mostProblems = 8;

/**
 * Reads a drought series as people have it: `year,value` or one value a line; comma, semicolon or tab between fields;
 * decimal point or comma; one header line, blank lines and lines that start with # are passed over. Every complaint
 * names its line.
 */
export function parseSeries(text: string): ParsedSeries {
  const lines = text
    .replace(/^\uFEFF/, '')
    .split(/\r\n|\r|\n/)
    .map((content, i) => ({ number: i + 1, content: content.trim() }))
    .filter(({ content }) => content !== '' && !content.startsWith('#'));
  if (lines.length > 0 && !/\d/.test(lines[0].content)) lines.shift();
  if (lines.length === 0)
    return whole('Found no values. Give one line a year, such as 2027,-0.4 or just -0.4.');
  const rows = lines.map(({ number, content }) => ({ number, fields: splitFields(content) }));
  const dated = rows[0].fields.length > 1;
  const problems: LineProblem[] = [];
  const entries: SeriesEntry[] = [];
  const lineOf = new Map<number, number>();
  for (const { number, fields } of rows) {
    const entry = readRow(fields, dated);
    if (typeof entry === 'string') {
      problems.push({ line: number, message: entry });
      continue;
    }
    const first = entry.year === undefined ? undefined : lineOf.get(entry.year);
    if (first !== undefined)
      problems.push({ line: number, message: `${entry.year} stands in line ${first} already` });
    else if (entry.year !== undefined) lineOf.set(entry.year, number);
    entries.push(entry);
  }
  if (problems.length === 0) return { ok: true, dated, entries };
  const more = problems.length - mostProblems;
  return {
    ok: false,
    problems:
      more > 0
        ? [...problems.slice(0, mostProblems), { line: 0, message: `${more} more lines cannot be read` }]
        : problems,
  };
}

const whole = (message: string): ParsedSeries => ({ ok: false, problems: [{ line: 0, message }] });

const unquoted = (field: string) =>
  field
    .trim()
    .replace(/^"(.*)"$/, '$1')
    .trim();

/** A comma parts fields only where nothing else does; `-1,5` alone is a value, `2027,-1,5` a year and a value. */
function splitFields(content: string): string[] {
  const separator = content.includes(';') ? ';' : content.includes('\t') ? '\t' : undefined;
  if (separator !== undefined) return content.split(separator).map(unquoted);
  const parts = content.split(',').map(unquoted);
  if (parts.length === 2 && !isYear(parts[0])) return [parts.join(',')];
  if (parts.length === 3 && isYear(parts[0]) && /^\d+$/.test(parts[2]))
    return [parts[0], `${parts[1]},${parts[2]}`];
  return parts;
}

const isYear = (field: string) => /^[1-9]\d{3}$/.test(field);

/** @returns what is wrong, in words, where the row cannot be read */
function readRow(fields: readonly string[], dated: boolean): SeriesEntry | string {
  const expected = dated ? 'a year and a value, such as 2027,-0.4' : 'one value, such as -0.4';
  if (fields.length !== (dated ? 2 : 1))
    return `Found ${fields.length === 1 ? 'one field' : `${fields.length} fields`}; expected ${expected}`;
  const [yearText, valueText] = dated ? fields : [undefined, fields[0]];
  if (yearText !== undefined && !isYear(yearText))
    return `Found “${yearText}” where a year such as 2027 was expected`;
  const value = parseNumber(valueText);
  if (value === undefined) return `Found “${valueText}” where a number was expected`;
  if (value < driest || value > wettest)
    return `Found ${value}; a drought index on the Palmer scale lies between −15 and 15`;
  return { year: yearText === undefined ? undefined : Number(yearText), value };
}
