import { fieldProblem } from '#server/middleware/problem-error.ts';
import { projectionBetween, wgs84, type Point } from './place-projection.ts';
import { readTable } from './read-table.ts';

/** A row of a table of points, its place in the CRS of the site. */
export interface PointRow<Column extends string> {
  /** line of the file, from 1 */
  readonly line: number;
  readonly place: Point;
  /** the cell of a column as it was written; empty where there is none */
  readonly cell: (column: Column) => string;
  /** the number in a column; undefined where the cell is empty */
  readonly number: (column: Column) => number | undefined;
}

export interface PointTable<Column extends string> {
  readonly crsName: string;
  readonly rows: readonly (PointRow<Column> | { readonly line: number; readonly problem: string })[];
  /** titles of columns that mean nothing here */
  readonly unknown: readonly string[];
}

const coordinates = {
  x: ['easting', 'east'],
  y: ['northing', 'north'],
  lon: ['longitude', 'long', 'lng'],
  lat: ['latitude'],
} as const;
type Coordinate = keyof typeof coordinates;
const mostRows = 20_000;

/**
 * Points from comma-, semicolon- or tab-separated values: `x` and `y` in metres in the site's CRS, or `lon` and `lat` in
 * degrees in WGS 84. Titles are read whatever their case, with a unit at the end (`x_m`, `Radius (m)`).
 *
 * @param names other names of each column
 * @param numbers columns that hold numbers; a row where one does not has a problem in words instead
 * @throws ProblemError at `content` when there is no header, no pair of coordinates, or there are too many rows
 */
export function readPointTable<Column extends string>(
  content: string,
  siteEpsg: number,
  names: Readonly<Record<Column, readonly string[]>>,
  numbers: readonly Column[],
): PointTable<Column> {
  const table = readTable(content);
  if (!table)
    throw fieldProblem(
      'content',
      'The file is empty; expected a row that names the columns, then one a point',
    );
  if (table.rows.length > mostRows)
    throw fieldProblem('content', `Found ${table.rows.length} rows; expected at most ${mostRows}`);
  const { columns, unknown } = columnsOf(table.header, { ...coordinates, ...names });
  const inDegrees = columns.has('lon') && columns.has('lat');
  if (!inDegrees && !(columns.has('x') && columns.has('y')))
    throw fieldProblem(
      'content',
      `Found the columns ${table.header.join(', ')}; expected x and y in metres in the CRS of the site, or lon and lat in degrees`,
    );
  const projection = projectionBetween(inDegrees ? wgs84 : siteEpsg, siteEpsg);
  const [east, north]: [Coordinate, Coordinate] = inDegrees ? ['lon', 'lat'] : ['x', 'y'];
  const rows = table.rows.map(({ line, cells }) => {
    const cell = (column: Column | Coordinate) => cells[columns.get(column) ?? -1] ?? '';
    const number = (column: Column | Coordinate) => table.number(cell(column));
    const empty = [east, north].filter((column) => cell(column) === '');
    const wrong = [east, north, ...numbers].filter(
      (column) => cell(column) !== '' && number(column) === undefined,
    );
    const problems = [
      ...empty.map((column) => `${column} is empty`),
      ...wrong.map((column) => `${column} is “${cell(column)}”, which is no number`),
    ];
    if (problems.length > 0) return { line, problem: `${problems.join('; ')}.` };
    const place = projection.toSite([number(east)!, number(north)!]);
    if (!place.every(Number.isFinite))
      return { line, problem: `${cell(east)}, ${cell(north)} cannot be carried into the CRS of the site.` };
    return { line, place, cell, number };
  });
  return { crsName: projection.crsName, rows, unknown };
}

function columnsOf(
  header: readonly string[],
  names: Readonly<Record<string, readonly string[]>>,
): { columns: Map<string, number>; unknown: string[] } {
  const columns = new Map<string, number>();
  const unknown: string[] = [];
  for (const [i, title] of header.entries()) {
    const plain = title
      .toLowerCase()
      .replace(/[\s_]*(\(m\)|_m)$/, '')
      .trim();
    const column = Object.keys(names).find((name) => name === plain || names[name].includes(plain));
    if (column !== undefined && !columns.has(column)) columns.set(column, i);
    else if (title !== '') unknown.push(title);
  }
  return { columns, unknown };
}
