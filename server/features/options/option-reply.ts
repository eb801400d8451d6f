import type { Option } from '#contract/options.ts';
import { workSetsSchema, worksSchema, type Drawing } from '#contract/works.ts';
import type { OptionRow } from '#server/database/entities/option.ts';
import { readJson } from '#server/database/json-column.ts';

/** What is drawn in a stored option. */
export const drawingOf = ({ works, sets }: Pick<OptionRow, 'works' | 'sets'>): Drawing => ({
  works: readJson(worksSchema, works),
  sets: readJson(workSetsSchema, sets),
});

/** A stored option as the contract says it. */
export function optionOf(row: OptionRow): Option {
  const { id, siteId, name, note, wait, archived, revision, changedAt, changedBy } = row;
  return { id, siteId, name, note, wait, archived, ...drawingOf(row), revision, changedAt, changedBy };
}
