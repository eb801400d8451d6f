type CsvValue = string | number | null;

/**
 * CSV of RFC 4180: CRLF after every line, quotes only where they are needed. Numbers are written in full precision,
 * `null` as an empty field. Text that a spreadsheet would take for a formula gets an apostrophe in front.
 */
export function csv(header: readonly string[], rows: Iterable<readonly CsvValue[]>): string {
  let text = csvLine(header);
  for (const row of rows) text += csvLine(row);
  return text;
}

const csvLine = (row: readonly CsvValue[]) => `${row.map(csvField).join(',')}\r\n`;

function csvField(value: CsvValue): string {
  if (typeof value !== 'string') return value === null ? '' : String(value);
  const text = formula.test(value) ? `'${value}` : value;
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text;
}

/** What makes a spreadsheet compute a cell that came as text (OWASP, CSV injection). */
const formula = /^[=+\-@\t\r]/;

/** Text of a cell as it was before `csv` put the apostrophe in front. */
export const plainCell = (cell: string): string =>
  cell.startsWith("'") && formula.test(cell.slice(1)) ? cell.slice(1) : cell;
