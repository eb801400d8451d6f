import { readPointTable, type PointRow } from '#server/files/point-table.ts';
import type { Grid } from '#sim-core/grid/grid.ts';
import { FoundWorks, type FoundFile } from './found-works.ts';

/** Columns beside the coordinates, with other names that each may have. */
const columnNames = {
  kind: ['what', 'type'],
  name: ['label'],
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
const numbers = ['year', 'until', 'radius', 'strength', 'halo', 'each', 'cover', 'share'] as const;

/**
 * Works from a table of points: `kind`, `name`, `year`, `radius`, `strength`, `halo`, `each`, `cover`, `share`, `until`. A row
 * without a kind is a mound.
 * @throws ProblemError at `content` when there is no header, no pair of coordinates, or there are too many rows
 */
export function readPointsCsv(content: string, site: Grid, firstYear: number): FoundFile {
  const { rows, unknown, crsName } = readPointTable<Column>(content, site.epsg, columnNames, numbers);
  const found = new FoundWorks(site, firstYear, 'Line');
  if (unknown.length > 0)
    found.problem(null, `Columns that mean nothing here were left out: ${unknown.join(', ')}.`);
  for (const row of rows) {
    if ('problem' in row) found.problem(row.line, row.problem);
    else found.add(row.line, workOf(row));
  }
  return { format: 'csv', crsName, name: '', note: '', sets: [], found };
}

/** Fields that a kind has; the others of a row are left empty in an export and mean nothing here. */
const fieldsOf: Record<string, readonly (typeof numbers)[number][]> = {
  mound: ['radius', 'strength', 'halo'],
  clumps: ['each'],
  planting: ['cover'],
  fence: ['strength', 'until'],
  loss: ['share'],
};

function workOf({ cell, number, place: [x, y] }: PointRow<Column>): Record<string, unknown> {
  const written = cell('kind').toLowerCase() || 'mound';
  const kind = written === 'clump' ? 'clumps' : written;
  const shared: Record<string, unknown> = { kind, ...(cell('name') !== '' && { name: cell('name') }) };
  for (const field of ['year' as const, ...(fieldsOf[kind] ?? [])])
    if (cell(field) !== '') shared[field] = number(field);
  if (kind === 'mound') return { ...shared, x, y };
  if (kind === 'clumps') return { ...shared, points: [[x, y]] };
  return { ...shared, area: { shape: 'disc', x, y, radius: number('radius') } };
}
