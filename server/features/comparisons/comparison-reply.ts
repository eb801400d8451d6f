import { z } from 'zod';
import {
  comparisonPlanSchema,
  comparisonStatuses,
  decisionSchema,
  endings,
  type Comparison,
  type ComparisonPlan,
  type ComparisonSummary,
} from '#contract/comparisons.ts';
import { gridSchema } from '#contract/grid.ts';
import { comparisonCautionSchema } from '#sim-core/spec/caution.ts';
import type { ComparisonRow } from '#server/database/entities/comparison.ts';
import type { EnsembleAddress } from '#server/database/entities/comparison-parts.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { layerFactsSchema } from '#contract/layers.ts';
import { notFound } from '#server/middleware/problem-error.ts';
import { layersByHash } from '#server/specs/site-layers.repository.ts';
import {
  comparisonsOfSite,
  countReplicates,
  eventsOf,
  findComparison,
  layerHashesOf,
  mapsOf,
} from './comparison.repository.ts';

const statusSchema = z.enum(comparisonStatuses);
const endingSchema = z.enum(endings).nullable();
/** Name under which the counts behind the maps stand among the maps. */
export const mapsState = 'state';

type Done = EnsembleAddress & { done: number };

/** Replicates that every ensemble of a plan has. */
function doneByAll(plan: ComparisonPlan, counts: readonly Done[]): number {
  const ensembles = plan.options.length * plan.outlooks.length;
  return counts.length < ensembles ? 0 : Math.min(...counts.map(({ done }) => done));
}

/** What a list and the whole have in common. */
function factsOf(row: ComparisonRow, plan: ComparisonPlan, counts: readonly Done[]) {
  const { id, siteId, name, startedAt, startedBy, replicates } = row;
  return {
    id,
    siteId,
    name,
    status: statusSchema.parse(row.status),
    ending: endingSchema.parse(row.ending),
    startedAt,
    startedBy,
    replicates,
    done: doneByAll(plan, counts),
    decision: row.decision === null ? null : readJson(decisionSchema, row.decision),
  };
}

/** The comparisons of a site, newest first. */
export async function listComparisons(
  manager: Manager,
  siteId: string,
  page: { offset: number; limit: number },
): Promise<{ comparisons: ComparisonSummary[]; total: number }> {
  const [rows, total] = await comparisonsOfSite(manager, siteId, page);
  const counts = await countReplicates(
    manager,
    rows.map((row) => row.id),
  );
  const comparisons = rows.map((row): ComparisonSummary => {
    const plan = readJson(comparisonPlanSchema, row.plan);
    return {
      ...factsOf(
        row,
        plan,
        counts.filter((count) => count.comparisonId === row.id),
      ),
      options: plan.options.map((option) => option.name),
      outlooks: plan.outlooks.map((outlook) => outlook.name),
    };
  });
  return { comparisons, total };
}

/** @throws ProblemError `not-found` */
export async function requireComparison(
  manager: Manager,
  siteId: string,
  id: string,
): Promise<ComparisonRow> {
  const row = await findComparison(manager, siteId, id);
  if (!row) throw notFound();
  return row;
}

/** A comparison as the contract shows it. @throws ProblemError `not-found` */
export async function comparisonReply(manager: Manager, siteId: string, id: string): Promise<Comparison> {
  const row = await requireComparison(manager, siteId, id);
  const plan = { ...readJson(comparisonPlanSchema, row.plan), replicates: row.replicates };
  const counts = await countReplicates(manager, [id]);
  const maps = await mapsOf(manager, id);
  const layers = await layersByHash(manager, siteId, await layerHashesOf(manager, id));
  return {
    ...factsOf(row, plan, counts),
    plan,
    grid: readJson(gridSchema, row.grid),
    crsName: row.crsName,
    layers: layers.map(({ hash, facts }) => ({ hash, noData: readJson(layerFactsSchema, facts).noData })),
    cautions: readJson(z.array(comparisonCautionSchema), row.cautions),
    ensembles: plan.options.flatMap((_, option) =>
      plan.outlooks.map((__, outlook) => {
        const here = <T extends EnsembleAddress>(rows: readonly T[]) =>
          rows.filter((found) => found.option === option && found.outlook === outlook);
        const shown = here(maps);
        return {
          option,
          outlook,
          done: here(counts)[0]?.done ?? 0,
          maps: Object.fromEntries(
            shown.filter(({ map }) => map !== mapsState).map(({ map, replicates }) => [map, replicates]),
          ),
          mapsState: shown.find(({ map }) => map === mapsState)?.replicates ?? null,
        };
      }),
    ),
    events: (await eventsOf(manager, id)).map(({ at, by, what }) => ({ at, by, what })),
  };
}
