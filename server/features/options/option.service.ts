import { randomUUID } from 'node:crypto';
import { z } from 'zod';
import type { Option } from '#contract/sites.ts';
import { actionSchema, type Action } from '#sim-core/spec/run-spec.ts';
import type { OptionRow } from '#server/database/entities/option.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { fieldProblem, notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import {
  deleteOptionRow,
  findOption,
  findSite,
  insertOption,
  optionsOfSite,
  updateOption,
} from './option.repository.ts';
import { checkWorksOnGrid } from './works-on-grid.ts';

const worksSchema = z.array(actionSchema);

export interface OptionInput {
  name: string;
  works: Action[];
}

const optionOf = ({ id, siteId, name, wait, works, revision, changedAt, changedBy }: OptionRow): Option => ({
  id,
  siteId,
  name,
  wait,
  works: readJson(worksSchema, works),
  revision,
  changedAt,
  changedBy,
});

/** The options of a site, Wait first. */
export const listOptions = async (manager: Manager, siteId: string): Promise<Option[]> =>
  (await optionsOfSite(manager, siteId)).map(optionOf);

/**
 * Adds an option.
 * @throws ProblemError at `works.N.x` or `works.N.y` for a mound off the site's grid
 */
export function createOption(
  services: Services,
  siteId: string,
  { name, works }: OptionInput,
  by: string,
): Promise<Option> {
  return services.write(async (manager) => {
    await checkWorks(manager, siteId, works);
    const now = services.clock().toISOString();
    const row: OptionRow = {
      id: randomUUID(),
      siteId,
      wait: false,
      name,
      works: JSON.stringify(works),
      revision: 1,
      createdAt: now,
      changedAt: now,
      changedBy: by,
    };
    await insertOption(manager, row);
    return optionOf(row);
  });
}

/**
 * Changes an option that the caller has seen at `revision`.
 * @throws ProblemError `conflict` naming who changed it meanwhile; `conflict` for Wait
 */
export function changeOption(
  services: Services,
  { siteId, optionId }: { siteId: string; optionId: string },
  { name, works, revision }: OptionInput & { revision: number },
  by: string,
): Promise<Option> {
  return services.write(async (manager) => {
    const row = await requireOwnOption(manager, siteId, optionId, 'changed');
    if (row.revision !== revision)
      throw new ProblemError(
        'conflict',
        `${row.changedBy} changed “${row.name}” at ${shownTime(row.changedAt)} (revision ${row.revision}; yours was made on ` +
          `revision ${revision}). Load it again and repeat your change, or save yours as a new option.`,
      );
    await checkWorks(manager, siteId, works);
    const change = {
      name,
      works: JSON.stringify(works),
      revision: revision + 1,
      changedAt: services.clock().toISOString(),
      changedBy: by,
    };
    await updateOption(manager, optionId, change);
    return optionOf({ ...row, ...change });
  });
}

/** Deletes an option; its runs stay. @throws ProblemError `conflict` for Wait */
export function deleteOption(services: Services, siteId: string, optionId: string): Promise<void> {
  return services.write(async (manager) => {
    await requireOwnOption(manager, siteId, optionId, 'deleted');
    await deleteOptionRow(manager, optionId);
  });
}

async function requireOwnOption(
  manager: Manager,
  siteId: string,
  optionId: string,
  done: string,
): Promise<OptionRow> {
  const row = await findOption(manager, siteId, optionId);
  if (!row) throw notFound();
  if (row.wait)
    throw new ProblemError(
      'conflict',
      `Wait is what every other option is measured against: it cannot be ${done}. Add an option of your own.`,
    );
  return row;
}

async function checkWorks(manager: Manager, siteId: string, works: readonly Action[]): Promise<void> {
  const site = await findSite(manager, siteId);
  if (!site) throw notFound();
  const problem = checkWorksOnGrid(works, site);
  if (problem) throw fieldProblem(problem.field, problem.message);
}

/** An instant in words that hold anywhere: `2026-12-01 05:22 UTC`. */
const shownTime = (instant: string) => `${instant.slice(0, 16).replace('T', ' ')} UTC`;
