import type { SurveyedArea, SurveyedFront } from '#contract/fits.ts';
import { parseNumber } from '#app/lib/parse-number.ts';

/** What was read from lines of text, and what is wrong with which line. */
export interface ReadLines<Row> {
  readonly rows: readonly Row[];
  /** whole sentences, each with its line */
  readonly problems: readonly string[];
}

/** Lines with their numbers in the text; blank ones and a head without any digit are passed over. */
function linesOf(text: string): { line: number; cells: string[] }[] {
  return text
    .replace(/^\uFEFF/, '')
    .split(/\r\n|\n|\r/)
    .map((content, i) => ({ line: i + 1, content: content.trim() }))
    .filter(({ content }, i) => content !== '' && (i > 0 || /\d/.test(content)))
    .map(({ line, content }) => {
      // A comma parts cells only where nothing else does, since it may be a decimal comma.
      const mark = content.includes(';') ? ';' : content.includes('\t') ? '\t' : ',';
      return { line, cells: content.split(mark).map((cell) => cell.trim()) };
    });
}

const yearOf = (cell: string | undefined): number | undefined =>
  cell !== undefined && /^\d{4}$/.test(cell) ? Number(cell) : undefined;

/**
 * A cover series: `year, covered area in m² or per cent of the ground that can hold the plant, ±` a line; ± is a standard
 * error in the same unit and may be left out. Per cent are told by a `%`.
 *
 * @param holding m² that can hold the plant
 */
export function readAreas(text: string, holding: number): ReadLines<SurveyedArea> {
  const rows: SurveyedArea[] = [];
  const problems: string[] = [];
  for (const { line, cells } of linesOf(text)) {
    const [first, amount = '', spread = ''] = cells;
    const year = yearOf(first);
    const unit = amount.endsWith('%') ? holding / 100 : 1;
    const value = parseNumber(amount.replace(/\s*(%|m²|m2)$/, ''));
    const error = spread === '' ? 0 : parseNumber(spread.replace(/^±\s*/, '').replace(/\s*(%|m²|m2)$/, ''));
    if (cells.length > 3)
      problems.push(
        `Line ${line}: found ${cells.length} values; expected year, covered area and ±. Part them by semicolons where numbers have decimal commas.`,
      );
    else if (year === undefined)
      problems.push(`Line ${line}: found “${first}” for the year; expected four digits.`);
    else if (value === undefined || value < 0)
      problems.push(
        `Line ${line}: found “${amount}” for the covered area; expected m² such as 1250, or 12 %.`,
      );
    else if (error === undefined || error < 0)
      problems.push(`Line ${line}: found “${spread}” for the ±; expected a number in the unit of the area.`);
    else if (rows.some((row) => row.year === year))
      problems.push(`Line ${line}: ${year} stands twice; each year stands once.`);
    else rows.push({ year, area: value * unit, error: error * unit });
  }
  return { rows, problems };
}

/** Fronts: `from year, until year, m/yr, ±` a line; ± is a standard error and may be left out. */
export function readFronts(text: string): ReadLines<SurveyedFront> {
  const rows: SurveyedFront[] = [];
  const problems: string[] = [];
  for (const { line, cells } of linesOf(text)) {
    const [from, until] = [yearOf(cells[0]), yearOf(cells[1])];
    const speed = parseNumber((cells[2] ?? '').replace(/\s*m\/yr$/, ''));
    const error = cells[3] === undefined || cells[3] === '' ? 0 : parseNumber(cells[3].replace(/^±\s*/, ''));
    if (cells.length > 4 || cells.length < 3)
      problems.push(
        `Line ${line}: found ${cells.length} values; expected from year, until year, m/yr and ±.`,
      );
    else if (from === undefined || until === undefined || until <= from)
      problems.push(
        `Line ${line}: found “${cells[0]}” to “${cells[1]}”; expected two years, the later one second.`,
      );
    else if (speed === undefined || Math.abs(speed) > 100)
      problems.push(
        `Line ${line}: found “${cells[2]}” for the speed; expected m/yr such as 0.4, below 0 where edges retreat.`,
      );
    else if (error === undefined || error < 0)
      problems.push(`Line ${line}: found “${cells[3]}” for the ±; expected m/yr.`);
    else rows.push({ from, until, speed, error });
  }
  return { rows, problems };
}
