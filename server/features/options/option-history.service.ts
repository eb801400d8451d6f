import { createHash } from 'node:crypto';
import { deflateSync, inflateSync } from 'node:zlib';
import { z } from 'zod';
import type { Option, OptionRevision } from '#contract/options.ts';
import { workSetsSchema, worksSchema, type Drawing } from '#contract/works.ts';
import type { OptionRow } from '#server/database/entities/option.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { notFound, ProblemError } from '#server/middleware/problem-error.ts';
import { findOption } from './option.repository.ts';
import {
  deleteDrawings,
  drawingSizes,
  findDrawing,
  findRevision,
  insertDrawing,
  insertRevision,
  revisionsOf,
} from './option-history.repository.ts';

/**
 * How much of an option's history is kept with its works: the drawings of the newest 200 revisions, and no more than
 * 16 MB of them as they are stored. Who changed what and when is kept for ever; a line takes a few hundred bytes.
 */
export const historyLimits = { revisions: 200, bytes: 16 * 1024 * 1024 };

const drawingSchema = z.object({ works: worksSchema, sets: workSetsSchema });

/** Keeps the state of an option that was just saved, and lets go of what no longer fits the limits. */
export async function keepRevision(
  manager: Manager,
  row: OptionRow,
  summary: string,
  limits = historyLimits,
): Promise<void> {
  const drawing = `{"works":${row.works},"sets":${row.sets}}`;
  const hash = createHash('sha256').update(drawing).digest('hex');
  if (!(await findDrawing(manager, row.id, hash)))
    await insertDrawing(manager, { optionId: row.id, hash, body: deflateSync(drawing) });
  const { id: optionId, revision, name, note, changedAt, changedBy } = row;
  const works = (JSON.parse(row.works) as unknown[]).length;
  await insertRevision(manager, {
    optionId,
    revision,
    name,
    note,
    works,
    drawingHash: hash,
    summary,
    changedAt,
    changedBy,
  });
  await trim(manager, optionId, limits);
}

/** Options older than the history have no line in it: keeps the state that is about to be changed. */
export async function keepFirstRevision(manager: Manager, row: OptionRow): Promise<void> {
  if (!(await findRevision(manager, row.id, row.revision)))
    await keepRevision(manager, row, 'as it was when its history began');
}

async function trim(manager: Manager, optionId: string, limits: typeof historyLimits): Promise<void> {
  const sizes = new Map((await drawingSizes(manager, optionId)).map(({ hash, bytes }) => [hash, bytes]));
  const kept = new Set<string>();
  let bytes = 0;
  for (const [i, { drawingHash }] of (await revisionsOf(manager, optionId)).entries()) {
    if (kept.has(drawingHash)) continue;
    bytes += sizes.get(drawingHash) ?? 0;
    // The newest is what the option is now: it stays, however large.
    if (i > 0 && (i >= limits.revisions || bytes > limits.bytes)) break;
    kept.add(drawingHash);
  }
  await deleteDrawings(
    manager,
    optionId,
    [...sizes.keys()].filter((hash) => !kept.has(hash)),
  );
}

/** Who changed an option, when and how, newest first. */
export async function listRevisions(
  manager: Manager,
  siteId: string,
  optionId: string,
): Promise<OptionRevision[]> {
  if (!(await findOption(manager, siteId, optionId))) throw notFound();
  const kept = new Set((await drawingSizes(manager, optionId)).map(({ hash }) => hash));
  return (await revisionsOf(manager, optionId)).map(
    ({ revision, changedAt, changedBy, summary, name, works, drawingHash }) => ({
      revision,
      changedAt,
      changedBy,
      summary,
      name,
      works,
      kept: kept.has(drawingHash),
    }),
  );
}

/** An option as it was saved once. @throws ProblemError `gone` when its works are no longer kept */
export async function getRevision(
  manager: Manager,
  { siteId, optionId, revision }: { siteId: string; optionId: string; revision: number },
): Promise<Option> {
  const option = await findOption(manager, siteId, optionId);
  const row = option && (await findRevision(manager, optionId, revision));
  if (!row) throw notFound();
  const { name, note, changedAt, changedBy } = row;
  const drawing = await keptDrawing(manager, optionId, row.drawingHash);
  return {
    id: optionId,
    siteId,
    wait: option.wait,
    archived: option.archived,
    name,
    note,
    ...drawing,
    revision,
    changedAt,
    changedBy,
  };
}

async function keptDrawing(manager: Manager, optionId: string, hash: string): Promise<Drawing> {
  const drawing = await findDrawing(manager, optionId, hash);
  if (!drawing)
    throw new ProblemError(
      'gone',
      `The works of this revision are no longer kept: an option keeps those of its newest ${historyLimits.revisions} revisions, ` +
        'fewer where they are large. Bring back a newer one.',
    );
  return readJson(drawingSchema, inflateSync(drawing.body).toString('utf8'));
}
