import { readTable, type TableRow, type TextTable } from '#server/files/read-table.ts';
import { fieldProblem } from '#server/middleware/problem-error.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { FoundWorks, type FoundFile } from './found-works.ts';
import { projectionBetween, wgs84, type PlaceProjection } from './place-projection.ts';

/** Names that a column may have, beside its own; `_m` and `(m)` at the end of a name say the unit and are dropped. */
const columnNames = {
  kind: ['what', 'type'],
  name: ['label'],
  x: ['easting', 'east'],
  y: ['northing', 'north'],
  lon: ['longitude', 'long', 'lng'],
  lat: ['latitude'],
  year: [],
  until: [],
  radius: [],
  strength: [],
  halo: [],
  each: ['clumps'],
  cover: [],
  share: [],
} satisfies Record<string, string[]>;
type Column = keyof typeof columnNames;
const numbers: readonly Column[] = ['year', 'until', 'radius', 'strength', 'halo', 'each', 'cover', 'share'];
const mostRows = 20_000;

/**
 * Works from a table of points: `x` and `y` in the site's CRS, or `lon` and `lat` in WGS 84; `kind`, `name`, `year`, `radius`,
 * `strength`, `halo`, `each`, `cover`, `share`, `until`. A row without a kind is a mound.
 * @throws ProblemError at `content` when there is no header, no pair of coordinates, or there are too many rows
 */
export function readPointsCsv(content: string, site: Grid, firstYear: number): FoundFile {
  const table = readTable(content);
  if (!table)
    throw fieldProblem(
      'content',
      'The file is empty; expected a row that names the columns, then one a point',
    );
  if (table.rows.length > mostRows)
    throw fieldProblem('content', `Found ${table.rows.length} rows; expected at most ${mostRows}`);
  const { columns, unknown } = columnsOf(table);
  const inDegrees = columns.has('lon') && columns.has('lat');
  if (!inDegrees && !(columns.has('x') && columns.has('y')))
    throw fieldProblem(
      'content',
      `Found the columns ${table.header.join(', ')}; expected x and y in metres in the CRS of the site, or lon and lat in degrees`,
    );
  const projection = projectionBetween(inDegrees ? wgs84 : site.epsg, site.epsg);
  const found = new FoundWorks(site, firstYear, 'Line');
  if (unknown.length > 0)
    found.problem(null, `Columns that mean nothing here were left out: ${unknown.join(', ')}.`);
  for (const row of table.rows) readRow(row, { table, columns, inDegrees, projection, found });
  return { format: 'csv', crsName: projection.crsName, name: '', note: '', sets: [], found };
}

function columnsOf({ header }: TextTable): { columns: Map<Column, number>; unknown: string[] } {
  const columns = new Map<Column, number>();
  const unknown: string[] = [];
  for (const [i, title] of header.entries()) {
    const plain = title
      .toLowerCase()
      .replace(/[\s_]*(\(m\)|_m)$/, '')
      .trim();
    const column = (Object.keys(columnNames) as Column[]).find(
      (name) => name === plain || (columnNames[name] as string[]).includes(plain),
    );
    if (column && !columns.has(column)) columns.set(column, i);
    else if (title !== '') unknown.push(title);
  }
  return { columns, unknown };
}

interface Reading {
  table: TextTable;
  columns: ReadonlyMap<Column, number>;
  inDegrees: boolean;
  projection: PlaceProjection;
  found: FoundWorks;
}

function readRow(row: TableRow, { table, columns, inDegrees, projection, found }: Reading): void {
  const cell = (column: Column) => row.cells[columns.get(column) ?? -1] ?? '';
  const wrong: string[] = [];
  const number = (column: Column) => {
    const value = table.number(cell(column));
    if (value === undefined)
      wrong.push(
        cell(column) === '' ? `${column} is empty` : `${column} is “${cell(column)}”, which is no number`,
      );
    return value ?? NaN;
  };
  const place = projection.toSite(inDegrees ? [number('lon'), number('lat')] : [number('x'), number('y')]);
  const values: Record<string, unknown> = {};
  for (const column of numbers) if (cell(column) !== '') values[column] = number(column);
  if (wrong.length > 0) return found.problem(row.line, `${wrong.join('; ')}.`);
  if (!place.every(Number.isFinite))
    return found.problem(
      row.line,
      `${cell('lon')}, ${cell('lat')} cannot be carried into the CRS of the site.`,
    );
  if (cell('name') !== '') values.name = cell('name');
  found.add(row.line, workOf(cell('kind').toLowerCase() || 'mound', place, values));
}

/** Fields that a kind has; the others of a row are left empty in an export and mean nothing here. */
const fieldsOf: Record<string, readonly string[]> = {
  mound: ['radius', 'strength', 'halo'],
  clumps: ['each'],
  planting: ['cover'],
  fence: ['strength', 'until'],
  loss: ['share'],
};

function workOf(kind: string, [x, y]: readonly [number, number], values: Record<string, unknown>) {
  const own = ['name', 'year', ...(fieldsOf[kind] ?? [])];
  const fields = Object.fromEntries(
    own.flatMap((field) => (field in values ? [[field, values[field]]] : [])),
  );
  if (kind === 'mound') return { kind, x, y, ...fields };
  if (kind === 'clumps' || kind === 'clump') return { kind: 'clumps', points: [[x, y]], ...fields };
  return { kind, area: { shape: 'disc', x, y, radius: values.radius }, ...fields };
}
