import { z } from 'zod';
import {
  fitPlanSchema,
  fitSchema,
  fitStatuses,
  type Fit,
  type FitPlan,
  type FitSummary,
} from '#contract/fits.ts';
import { gridSchema } from '#contract/grid.ts';
import { layerFactsSchema } from '#contract/layers.ts';
import type { FitRow } from '#server/database/entities/fit.ts';
import { readJson } from '#server/database/json-column.ts';
import type { Manager } from '#server/database/manager.ts';
import { notFound } from '#server/middleware/problem-error.ts';
import { layersByHash } from '#server/specs/site-layers.repository.ts';
import { findFit, fitsOfSite, layerHashesOf } from './fit.repository.ts';

const statusSchema = z.enum(fitStatuses);
const acceptedSchema = fitSchema.shape.accepted.unwrap();

/** What a list and the whole have in common. */
function factsOf(row: Omit<FitRow, 'state'>, { mostRuns }: FitPlan) {
  const { id, siteId, name, startedAt, startedBy, runs, generations, accepted } = row;
  return {
    ...{ id, siteId, name, startedAt, startedBy, runs, mostRuns, generations },
    status: statusSchema.parse(row.status),
    accepted: accepted === null ? null : readJson(acceptedSchema, accepted),
  };
}

/** Years of the surveys that a plan fits to, ascending. */
const yearsOf = ({ data }: FitPlan): number[] =>
  [
    ...new Set(
      [...data.maps, ...data.areas].map(({ year }) => year).concat(data.fronts.map(({ until }) => until)),
    ),
  ].sort((a, b) => a - b);

export async function listFits(manager: Manager, siteId: string): Promise<FitSummary[]> {
  return (await fitsOfSite(manager, siteId)).map((row) => {
    const plan = readJson(fitPlanSchema, row.plan);
    return { ...factsOf(row, plan), rates: plan.rates.map(({ name }) => name), years: yearsOf(plan) };
  });
}

/** @throws ProblemError `not-found` */
export async function requireFit(manager: Manager, siteId: string, id: string): Promise<FitRow> {
  const row = await findFit(manager, siteId, id);
  if (!row) throw notFound();
  return row;
}

/** A fit as the contract shows it. @throws ProblemError `not-found` */
export async function fitReply(manager: Manager, siteId: string, id: string): Promise<Fit> {
  const row = await requireFit(manager, siteId, id);
  const plan = readJson(fitPlanSchema, row.plan);
  const layers = await layersByHash(manager, siteId, await layerHashesOf(manager, id));
  return {
    ...factsOf(row, plan),
    plan,
    state: readJson(fitSchema.shape.state, row.state),
    grid: readJson(gridSchema, row.grid),
    layers: layers.map(({ hash, facts }) => ({ hash, noData: readJson(layerFactsSchema, facts).noData })),
  };
}
