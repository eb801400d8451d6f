import { z } from 'zod';
import { briefFactsSchema, briefTextSchema } from '#contract/brief-content.ts';
import { briefMessageSchema, type Brief, type BriefMessage, type BriefSummary } from '#contract/briefs.ts';
import { comparisonPlanSchema } from '#contract/comparisons.ts';
import type { BriefMessageRow, BriefRow, BriefVersionRow } from '#server/database/entities/brief.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { notFound } from '#server/middleware/problem-error.ts';
import {
  briefsOf,
  countRecords,
  findBrief,
  findComparison,
  findVersion,
  messagesOf,
  versionsOf,
} from './brief.repository.ts';

const recipientsSchema = briefMessageSchema.shape.recipients;
const lineSchema = z.object({ title: z.string() });

export function messageReply({ recipients, ...row }: BriefMessageRow): BriefMessage {
  const { id, version, subject, text, attached, sentAt, sentBy } = row;
  return {
    id,
    version,
    subject,
    text,
    attached,
    sentAt,
    sentBy,
    recipients: readJson(recipientsSchema, recipients),
  };
}

/** People whom a message has reached, as far as its server knows. */
export const reached = (rows: readonly BriefMessageRow[]): number =>
  rows.flatMap((row) => messageReply(row).recipients).filter(({ status }) => status !== 'failed').length;

/** @throws ProblemError `not-found` */
export async function requireBrief(manager: Manager, siteId: string, id: string): Promise<BriefRow> {
  const row = await findBrief(manager, siteId, id);
  if (!row) throw notFound();
  return row;
}

/** @throws ProblemError `not-found` */
export async function requireVersion(
  manager: Manager,
  briefId: string,
  version: number,
): Promise<BriefVersionRow> {
  const row = await findVersion(manager, briefId, version);
  if (!row) throw notFound();
  return row;
}

/** The briefs of a site, the one changed last first. */
export async function listBriefs(manager: Manager, siteId: string): Promise<BriefSummary[]> {
  const summaries: BriefSummary[] = [];
  for (const { id, version } of await briefsOf(manager, siteId)) {
    const row = await requireVersion(manager, id, version);
    const facts = readJson(briefFactsSchema, row.facts);
    summaries.push({
      id,
      siteId,
      title: readJson(lineSchema, row.text).title,
      comparisonName: facts.comparison.name,
      version,
      changedAt: row.at,
      changedBy: row.by,
      decided: facts.decision !== null,
      sent: reached(await messagesOf(manager, id)),
    });
  }
  return summaries.sort((a, b) => b.changedAt.localeCompare(a.changedAt));
}

/** A version of a brief, the newest unless said, as the contract shows it. @throws ProblemError `not-found` */
export async function briefReply(
  manager: Manager,
  siteId: string,
  id: string,
  version?: number,
): Promise<Brief> {
  const brief = await requireBrief(manager, siteId, id);
  const row = await requireVersion(manager, id, version ?? brief.version);
  const facts = readJson(briefFactsSchema, row.facts);
  return {
    id,
    siteId,
    comparisonId: brief.comparisonId,
    version: row.version,
    latest: brief.version,
    versions: (await versionsOf(manager, id)).map(
      ({ version: number, text, at, by, pages, briefPages, bytes }) => ({
        version: number,
        title: readJson(lineSchema, text).title,
        at,
        by,
        pages,
        briefPages,
        bytes,
      }),
    ),
    text: readJson(briefTextSchema, row.text),
    facts,
    comparisonMoved: await hasMoved(manager, siteId, brief, facts),
  };
}

/** Whether the comparison now has more futures, or another decision, than the facts of a brief. */
async function hasMoved(
  manager: Manager,
  siteId: string,
  { comparisonId }: BriefRow,
  facts: Brief['facts'],
): Promise<boolean> {
  const row = comparisonId && (await findComparison(manager, siteId, comparisonId));
  if (!row) return false;
  if ((row.decision === null) !== (facts.decision === null)) return true;
  const { options, outlooks } = readJson(comparisonPlanSchema, row.plan);
  // What has been begun of further futures does not count before every option has them.
  const ensembles = options.length * outlooks.length;
  return Math.floor((await countRecords(manager, row.id)) / ensembles) > facts.comparison.done;
}
