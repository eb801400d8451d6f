import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type * as contract from '#contract/options.ts';
import type { Option } from '#contract/options.ts';
import { strayWork, type Drawing } from '#contract/works.ts';
import type { OptionRow } from '#server/database/entities/option.ts';
import type { Manager } from '#server/database/manager.ts';
import { fieldProblem, notFound, ProblemError } from '#server/middleware/problem-error.ts';
import type { Services } from '#server/services.ts';
import { changeInWords, worksCounted } from './change-words.ts';
import { getRevision, keepFirstRevision, keepRevision } from './option-history.service.ts';
import { drawingOf, optionOf } from './option-reply.ts';
import {
  deleteOptionRow,
  findOption,
  findSite,
  insertOption,
  optionsOfSite,
  placeOptions,
  updateOption,
} from './option.repository.ts';
import { checkWorksOnGrid } from './works-on-grid.ts';

interface OptionAddress {
  siteId: string;
  optionId: string;
}
type NewOption = z.output<typeof contract.createOption.body>;
type OptionChange = z.output<typeof contract.changeOption.body>;

/** The options of a site in their order, Wait first. */
export const listOptions = async (manager: Manager, siteId: string): Promise<Option[]> =>
  (await optionsOfSite(manager, siteId)).map(optionOf);

/**
 * Adds an option at the end.
 * @throws ProblemError at `works.N.…` for works off the site's grid or of a set that is not there
 */
export function createOption(
  services: Services,
  siteId: string,
  { name, note, works, sets }: NewOption,
  by: string,
): Promise<Option> {
  return services.write(async (manager) => {
    await checkDrawing(manager, siteId, { works, sets });
    const others = await optionsOfSite(manager, siteId);
    const drawing = { works: JSON.stringify(works), sets: JSON.stringify(sets) };
    const row = newRow(services, { siteId, name, note, ...drawing, by }, others.length);
    await insertOption(manager, row);
    await keepRevision(manager, row, `made, with ${worksCounted(works)}`);
    return optionOf(row);
  });
}

/** Copies an option as it is saved; the copy stands right after it. */
export function copyOption(
  services: Services,
  { siteId, optionId }: OptionAddress,
  name: string,
  by: string,
): Promise<Option> {
  return services.write(async (manager) => {
    const original = await findOption(manager, siteId, optionId);
    if (!original) throw notFound();
    const { note, works, sets } = original;
    const others = await optionsOfSite(manager, siteId);
    const row = newRow(services, { siteId, name, note: original.wait ? '' : note, works, sets, by }, 0);
    await insertOption(manager, row);
    const ids = others.map((other) => other.id);
    ids.splice(ids.indexOf(optionId) + 1, 0, row.id);
    await placeOptions(manager, ids);
    await keepRevision(manager, row, `copied from “${original.name}”`);
    return optionOf(row);
  });
}

/**
 * Changes what is given of an option that the caller has seen at `revision`.
 * @throws ProblemError `conflict` naming who changed it meanwhile; `conflict` for Wait, and for works in the archive
 */
export function changeOption(
  services: Services,
  { siteId, optionId }: OptionAddress,
  { revision, name, note, archived, works, sets }: OptionChange,
  by: string,
): Promise<Option> {
  return services.write(async (manager) => {
    const row = await requireOwnOption(manager, siteId, optionId, 'changed');
    refuseStale(row, revision);
    if (row.archived && archived !== false && (works ?? sets))
      throw new ProblemError(
        'conflict',
        `“${row.name}” is in the archive, so nobody draws on it. Bring it back first, or copy it.`,
      );
    const before = { ...row, ...drawingOf(row) };
    const drawing = { works: works ?? before.works, sets: sets ?? before.sets };
    if (works ?? sets) await checkDrawing(manager, siteId, drawing);
    const after = {
      name: name ?? row.name,
      note: note ?? row.note,
      archived: archived ?? row.archived,
      ...drawing,
    };
    return save(services, manager, row, after, changeInWords(before, after), by);
  });
}

/** Saves an older state again, as the newest. @throws ProblemError `gone` when its works are no longer kept */
export function bringBackRevision(
  services: Services,
  address: OptionAddress & { revision: number },
  onRevision: number,
  by: string,
): Promise<Option> {
  return services.write(async (manager) => {
    const row = await requireOwnOption(manager, address.siteId, address.optionId, 'changed');
    refuseStale(row, onRevision);
    if (row.archived)
      throw new ProblemError('conflict', `“${row.name}” is in the archive. Bring it back from there first.`);
    const older = await getRevision(manager, address);
    // The grid may have become smaller since.
    await checkDrawing(manager, address.siteId, older);
    const summary = `revision ${address.revision} brought back, with ${worksCounted(older.works)}`;
    return save(services, manager, row, { ...older, archived: false }, summary, by);
  });
}

/** Deletes an option with its history; its runs stay. @throws ProblemError `conflict` for Wait */
export function deleteOption(services: Services, { siteId, optionId }: OptionAddress): Promise<void> {
  return services.write(async (manager) => {
    await requireOwnOption(manager, siteId, optionId, 'deleted');
    await deleteOptionRow(manager, optionId);
  });
}

/**
 * Puts the options of a site in order.
 * @throws ProblemError `conflict` when the ids are not those of all options but Wait, as when somebody added one
 */
export function orderOptions(
  services: Services,
  siteId: string,
  optionIds: readonly string[],
): Promise<Option[]> {
  return services.write(async (manager) => {
    const [wait, ...others] = await optionsOfSite(manager, siteId);
    const known = new Set(others.map((option) => option.id));
    const named = new Set(optionIds);
    if (
      named.size !== optionIds.length ||
      named.size !== known.size ||
      optionIds.some((id) => !known.has(id))
    )
      throw new ProblemError(
        'conflict',
        `Found ${optionIds.length} options in the new order; expected each of the ${known.size} beside Wait once. ` +
          'Somebody may have added or deleted one: load the list again and repeat the move.',
      );
    await placeOptions(manager, [wait.id, ...optionIds]);
    return listOptions(manager, siteId);
  });
}

function newRow(
  services: Services,
  { by, ...row }: Pick<OptionRow, 'siteId' | 'name' | 'note' | 'works' | 'sets'> & { by: string },
  place: number,
): OptionRow {
  const now = services.clock().toISOString();
  return {
    ...row,
    id: randomUUID(),
    wait: false,
    place,
    archived: false,
    revision: 1,
    createdAt: now,
    changedAt: now,
    changedBy: by,
  };
}

async function save(
  services: Services,
  manager: Manager,
  row: OptionRow,
  { name, note, archived, works, sets }: Pick<Option, 'name' | 'note' | 'archived'> & Drawing,
  summary: string,
  by: string,
): Promise<Option> {
  await keepFirstRevision(manager, row);
  const change = {
    name,
    note,
    archived,
    works: JSON.stringify(works),
    sets: JSON.stringify(sets),
    revision: row.revision + 1,
    changedAt: services.clock().toISOString(),
    changedBy: by,
  };
  await updateOption(manager, row.id, change);
  await keepRevision(manager, { ...row, ...change }, summary);
  return optionOf({ ...row, ...change });
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

function refuseStale(row: OptionRow, revision: number): void {
  if (row.revision === revision) return;
  throw new ProblemError(
    'conflict',
    `${row.changedBy} changed “${row.name}” at ${shownTime(row.changedAt)} (revision ${row.revision}; yours was made on ` +
      `revision ${revision}). Load it again and repeat your change, or save yours as a new option.`,
  );
}

async function checkDrawing(manager: Manager, siteId: string, drawing: Drawing): Promise<void> {
  const site = await findSite(manager, siteId);
  if (!site) throw notFound();
  const problem = checkWorksOnGrid(drawing.works, site);
  if (problem) throw fieldProblem(problem.field, problem.message);
  const stray = strayWork(drawing);
  if (stray !== undefined)
    throw fieldProblem(`works.${stray}.set`, `There is no set “${drawing.works[stray].set}” among the sets`);
}

/** An instant in words that hold anywhere: `2026-12-01 05:22 UTC`. */
const shownTime = (instant: string) => `${instant.slice(0, 16).replace('T', ' ')} UTC`;
