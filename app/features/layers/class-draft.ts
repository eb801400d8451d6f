import { habitatClassSchema, type HabitatClass, type Layer } from '#contract/layers.ts';
import { parseNumber } from '#app/lib/parse-number.ts';
import { suggestClasses } from './suggest-classes.ts';

/** One row of the class table while it is edited: the shares as typed. */
export interface ClassRow {
  readonly value: number;
  readonly name: string;
  readonly colour: string;
  readonly capacity: string;
  readonly vigour: string;
}
export type ClassField = 'name' | 'capacity' | 'vigour';

/** The table as it was saved, with a suggestion for every class of the raster that it does not name. */
export function startRows(layer: Pick<Layer, 'classCounts' | 'classes'>): ClassRow[] {
  return suggestClasses(layer.classCounts ?? [], layer.classes ?? []).map((row) => ({
    ...row,
    capacity: String(row.capacity),
    vigour: String(row.vigour),
  }));
}

function readRow(row: ClassRow) {
  return habitatClassSchema.safeParse({
    ...row,
    capacity: parseNumber(row.capacity),
    vigour: parseNumber(row.vigour),
  });
}

/** What is wrong in one row, by field, in words that say what was found. */
export function rowErrors(row: ClassRow): Partial<Record<ClassField, string>> {
  const errors: Partial<Record<ClassField, string>> = {};
  for (const issue of readRow(row).error?.issues ?? []) {
    const field = issue.path[0];
    if (field === 'name')
      errors.name = row.name.trim() === '' ? 'Give this class a name' : 'At most 80 characters';
    else if (field === 'capacity' || field === 'vigour')
      errors[field] =
        `${field === 'capacity' ? 'Capacity' : 'Vigour'}: found ${row[field].trim() === '' ? 'nothing' : `“${row[field].trim()}”`}, expected a share from 0 to 1`;
  }
  return errors;
}

/** The table that the rows stand for; undefined while something is wrong. */
export function readRows(rows: readonly ClassRow[]): HabitatClass[] | undefined {
  const read = rows.map((row) => readRow(row).data);
  return read.every((row) => row !== undefined) ? read : undefined;
}

/** The same, with a share that cannot be read taken as 0: for the map while somebody types. */
export function classesForMap(rows: readonly ClassRow[]): HabitatClass[] {
  const share = (text: string) => Math.min(1, Math.max(0, parseNumber(text) ?? 0));
  return rows.map((row) => ({ ...row, capacity: share(row.capacity), vigour: share(row.vigour) }));
}
