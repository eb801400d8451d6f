import { parseNumber } from '#app/lib/parse-number.ts';
import { readDate, type SeriesColumns, type SeriesTable } from './series-table.ts';

/** One value of a drought series; without a year where the text gave none. */
export interface SeriesEntry {
  readonly year: number | undefined;
  readonly month?: number | undefined;
  readonly value: number;
}

/** Something wrong in one line. */
export interface LineProblem {
  /** counted from 1; 0 for the text as a whole */
  readonly line: number;
  readonly message: string;
}

export type ReadSeries =
  | {
      readonly ok: true;
      readonly dated: boolean;
      readonly monthly: boolean;
      readonly entries: readonly SeriesEntry[];
      /** lines that say that there is no value */
      readonly missing: readonly number[];
    }
  | { readonly ok: false; readonly problems: readonly LineProblem[] };

/** Bounds of a value, and what it is called where it lies outside. */
export interface ValueRange {
  readonly least: number;
  readonly most: number;
  readonly called: string;
}
export const palmerRange: ValueRange = {
  least: -15,
  most: 15,
  called: 'a drought index on the Palmer scale',
};
export const standardisedRange: ValueRange = {
  least: -6,
  most: 6,
  called: 'an SPEI or SPI, in standard deviations,',
};

const mostProblems = 8;
/** What stands for no value in files of weather services. */
const noValue = /^(|na|n\/a|nan|null|-|[-−]99(\.99?|99(\.0+)?)?|[-−]999(\.0+)?)$/i;

/** Reads a series out of a table. Nothing is taken while a line is wrong; every complaint names its line. */
export function readSeries(
  table: SeriesTable,
  columns: SeriesColumns,
  range: ValueRange = palmerRange,
): ReadSeries {
  if (table.lines.length === 0)
    return whole('Found no values. Give one line a year, such as 2027,-0.4 or just -0.4.');
  const problems: LineProblem[] = [];
  const entries: SeriesEntry[] = [];
  const missing: number[] = [];
  const lineOf = new Map<string, number>();
  const dated = columns.date !== undefined;
  let monthly: boolean | undefined;
  for (const { line, fields } of table.lines) {
    const complain = (message: string) => problems.push({ line, message });
    if (fields.length > table.columns.length) {
      complain(
        `Found ${fields.length} fields; expected ${table.columns.length === 1 ? 'one value, such as -0.4' : `${table.columns.length}, as in the lines before`}`,
      );
      continue;
    }
    const date = dated ? readWhen(fields, columns) : undefined;
    if (typeof date === 'string') {
      complain(date);
      continue;
    }
    const named =
      date &&
      (date.month === undefined ? `${date.year}` : `${date.year}-${String(date.month).padStart(2, '0')}`);
    if (date) {
      const ofMonth = date.month !== undefined;
      monthly ??= ofMonth;
      if (ofMonth !== monthly) {
        complain(
          `Found ${named!}, ${ofMonth ? 'a month' : 'a year'}, after ${ofMonth ? 'years' : 'months'}; give all by year or all by month`,
        );
        continue;
      }
    }
    const text = fields[columns.value];
    if (text === undefined) {
      complain(`Found one field; expected a year and a value, such as 2027,-0.4`);
      continue;
    }
    const first = named === undefined ? undefined : lineOf.get(named);
    if (first !== undefined) {
      complain(`${named!} stands in line ${first} already`);
      continue;
    }
    if (named !== undefined) lineOf.set(named, line);
    if (dated && noValue.test(text)) {
      missing.push(line);
      continue;
    }
    const value = parseNumber(text);
    if (value === undefined) complain(`Found “${text}” where a number was expected`);
    else if (value < range.least || value > range.most)
      complain(`Found ${text}; ${range.called} lies between ${sign(range.least)} and ${range.most}`);
    else entries.push({ year: date?.year, ...(date?.month !== undefined && { month: date.month }), value });
  }
  if (problems.length > 0) return { ok: false, problems: shortened(problems) };
  if (entries.length === 0) return whole('Every line says that it has no value.');
  return { ok: true, dated, monthly: monthly ?? false, entries, missing };
}

/** @returns what is wrong, in words, where the line names no date */
function readWhen(
  fields: readonly string[],
  { date, month }: SeriesColumns,
): { year: number; month: number | undefined } | string {
  const text = fields[date!] ?? '';
  const found = readDate(text);
  if (!found) return `Found “${text}” where a year or a date such as 2027 or 2027-05 was expected`;
  if (month === undefined) return found;
  const ofMonth = fields[month] ?? '';
  const number = Number(ofMonth);
  return /^\d{1,2}$/.test(ofMonth) && number >= 1 && number <= 12
    ? { year: found.year, month: number }
    : `Found “${ofMonth}” where a month from 1 to 12 was expected`;
}

const sign = (x: number) => (x < 0 ? `−${-x}` : String(x));
const whole = (message: string): ReadSeries => ({ ok: false, problems: [{ line: 0, message }] });

function shortened(problems: readonly LineProblem[]): LineProblem[] {
  const more = problems.length - mostProblems;
  if (more <= 0) return [...problems];
  return [
    ...problems.slice(0, mostProblems),
    { line: 0, message: `${more} more ${more === 1 ? 'line' : 'lines'} cannot be read` },
  ];
}
