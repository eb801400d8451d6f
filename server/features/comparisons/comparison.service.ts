import { randomUUID } from 'node:crypto';
import type { z } from 'zod';
import type * as contract from '#contract/comparisons.ts';
import {
  comparisonPlanSchema,
  replicateSpec,
  type ComparedOption,
  type Comparison,
  type ComparisonPlan,
} from '#contract/comparisons.ts';
import { gridSchema } from '#contract/grid.ts';
import { plantSchema } from '#contract/plants.ts';
import { runActions, worksSchema } from '#contract/works.ts';
import { findCautions, gatherCautions } from '#sim-core/cautions/find-cautions.ts';
import { fieldProblems, type FieldProblem } from '#sim-core/spec/problems.ts';
import { drawProblems } from '#sim-core/run/draw-problems.ts';
import { runSpecSchema } from '#sim-core/spec/run-spec.ts';
import type { ComparisonRow } from '#server/database/entities/comparison.ts';
import { readJson } from '#server/database/json-column.ts';
import { gridOf } from '#server/database/site-grid.ts';
import type { Manager } from '#server/database/manager.ts';
import type { SiteRow } from '#server/database/entities/site.ts';
import { releaseBlobs } from '#server/files/stored-files.ts';
import { fieldProblem, notFound, ProblemError, refuseFields } from '#server/middleware/problem-error.ts';
import { publishedSpeed } from '#server/plants/published-speed.ts';
import type { Services } from '#server/services.ts';
import { checkLayers, checkOnGrid, layerHashes } from '#server/specs/check-spec.ts';
import { recordYears } from '#server/specs/drought-record.ts';
import { comparisonReply, requireComparison } from './comparison-reply.ts';
import {
  addEvent,
  copyParts,
  deleteComparisonRows,
  findSite,
  insertComparison,
  layerHashesOf,
  optionsOf,
  updateComparison,
} from './comparison.repository.ts';

export interface ComparisonAddress {
  siteId: string;
  comparisonId: string;
}
type StartInput = z.output<typeof contract.startComparison.body>;
type DecisionInput = z.output<typeof contract.decide.body>;
type Ending = Comparison['ending'];

const endingWords: Record<NonNullable<Ending>, string> = {
  'all replicates': 'ended, as all futures were run',
  'chances known': 'ended early, as every chance was known closely enough',
  'rank settled': 'ended early, as the best led for sure',
  'stopped by hand': 'stopped by hand',
};

/**
 * Registers a comparison on the grid and with the works that the site has now.
 * @throws ProblemError at each field that makes one of its runs impossible
 */
export async function startComparison(
  services: Services,
  siteId: string,
  { name, options, ...plan }: StartInput,
  by: string,
): Promise<Comparison> {
  return services.write(async (manager) => {
    const site = await findSite(manager, siteId);
    if (!site) throw notFound();
    const full: ComparisonPlan = { ...plan, options: await comparedOptions(manager, siteId, options) };
    const problems = await planProblems(manager, site, full);
    if (problems.length > 0) throw refuseFields(problems);
    const record = await recordYears(manager, siteId);
    const row: ComparisonRow = {
      id: randomUUID(),
      siteId,
      name,
      status: 'running',
      ending: null,
      plan: JSON.stringify(full),
      replicates: plan.replicates,
      grid: JSON.stringify(gridOf(site)),
      crsName: site.crsName,
      decision: null,
      startedAt: services.clock().toISOString(),
      startedBy: by,
      cautions: JSON.stringify(
        gatherCautions(
          full.outlooks.map(({ name: outlook }, o) => ({
            name: outlook,
            cautions: findCautions({
              spec: replicateSpec(full, 0, o, 0),
              cellSize: site.cellSize,
              record,
              published: publishedSpeed(readJson(plantSchema, site.plant)),
            }),
          })),
        ),
      ),
    };
    const spec = replicateSpec(full, 0, 0, 0);
    await insertComparison(
      manager,
      row,
      layerHashes(spec).map(({ hash }) => hash),
    );
    await addEvent(manager, row.id, { at: row.startedAt, by, what: 'started' });
    return comparisonReply(manager, siteId, row.id);
  });
}

/** The options as they are now, in the order that was asked for. @throws ProblemError at one that is not there */
async function comparedOptions(
  manager: Manager,
  siteId: string,
  asked: StartInput['options'],
): Promise<ComparedOption[]> {
  const found = await optionsOf(
    manager,
    siteId,
    asked.map(({ optionId }) => optionId),
  );
  return asked.map(({ optionId, cost }, i) => {
    const option = found.find((row) => row.id === optionId);
    if (!option)
      throw fieldProblem(`options.${i}.optionId`, 'This site has no such option; it may have been deleted');
    const { name, wait, revision } = option;
    const actions = runActions(readJson(worksSchema, option.works));
    return { optionId, name, wait, revision, actions, cost };
  });
}

/** Fields of a run that its outlook decides. */
const ofOutlook = /^(droughtIndex|trend|losses)/;

async function planProblems(manager: Manager, site: SiteRow, plan: ComparisonPlan): Promise<FieldProblem[]> {
  const problems: FieldProblem[] = [];
  const { surveyYear, years } = plan.common;
  plan.mapYears.forEach((year, i) => {
    if (year < surveyYear || year > surveyYear + years)
      problems.push({
        field: `mapYears.${i}`,
        message: `${year} lies outside ${surveyYear} to ${surveyYear + years}`,
      });
  });
  for (const [o] of plan.outlooks.entries()) {
    const spec = { ...replicateSpec(plan, 0, o, 0), actions: [] };
    const parsed = runSpecSchema.safeParse(spec);
    const found = parsed.success
      ? checkOnGrid(spec, site)
          .map(({ field, message }) => ({ field: field.slice('spec.'.length), message }))
          .filter(({ field }) => ofOutlook.test(field))
      : fieldProblems(parsed.error);
    problems.push(
      ...found.map(({ field, message }) => ({
        field: ofOutlook.test(field) ? `outlooks.${o}.${field}` : `common.${field}`,
        message,
      })),
    );
  }
  for (const [i, option] of plan.options.entries()) {
    const spec = replicateSpec(plan, i, 0, 0);
    const parsed = runSpecSchema.safeParse(spec);
    const ofActions = parsed.success
      ? checkOnGrid(spec, site)
      : fieldProblems(parsed.error).map((problem) => ({ ...problem, field: `spec.${problem.field}` }));
    problems.push(
      ...ofActions
        .filter(({ field }) => field.startsWith('spec.actions'))
        .map(({ field, message }) => ({
          field: `options.${i}.${field.slice('spec.'.length)}`,
          message: `“${option.name}”: ${message}`,
        })),
    );
  }
  const first = replicateSpec(plan, 0, 0, 0);
  const common = [
    ...(await checkLayers(manager, site.id, first)),
    ...checkOnGrid({ ...first, actions: [], losses: [] }, site),
  ];
  problems.push(
    ...common.map(({ field, message }) => ({ field: field.replace(/^spec/, 'common'), message })),
  );
  // Draws are drawn only from beliefs that make sense.
  if (problems.length === 0) problems.push(...problemsOfDraws(plan, site.cellSize, plan.replicates));
  return problems;
}

/** What makes any of a plan's futures impossible for the rates that it draws. */
const problemsOfDraws = ({ common }: ComparisonPlan, cellSize: number, replicates: number): FieldProblem[] =>
  drawProblems(common, cellSize, replicates).map(({ field, message }) => ({
    field: `common.${field}`,
    message,
  }));

/** @throws ProblemError where a comparison of so many replicates would come to draws that cannot be run */
function refuseDraws(row: ComparisonRow, replicates: number): void {
  if (replicates <= row.replicates) return;
  const { cellSize } = readJson(gridSchema, row.grid);
  const problems = problemsOfDraws(readJson(comparisonPlanSchema, row.plan), cellSize, replicates);
  if (problems.length > 0) throw refuseFields(problems);
}

/** Changes a comparison on which nothing was decided. @throws ProblemError `not-found`, `conflict` */
async function change(
  services: Services,
  { siteId, comparisonId }: ComparisonAddress,
  by: string,
  make: (row: ComparisonRow, manager: Manager) => { set: Partial<ComparisonRow>; what: string },
): Promise<Comparison> {
  return services.write(async (manager) => {
    const row = await requireComparison(manager, siteId, comparisonId);
    requireOpen(row);
    const { set, what } = make(row, manager);
    await updateComparison(manager, comparisonId, set);
    await addEvent(manager, comparisonId, { at: services.clock().toISOString(), by, what });
    return comparisonReply(manager, siteId, comparisonId);
  });
}

/** @throws ProblemError `conflict` once something is decided */
export function requireOpen({ decision }: Pick<ComparisonRow, 'decision'>): void {
  if (decision !== null)
    throw new ProblemError(
      'conflict',
      'A decision was taken on this comparison, so it no longer changes. Go on in a copy of it.',
    );
}

/**
 * A name is no finding, so those who decide may change it after the decision too; what it was stays in the events.
 * @throws ProblemError `not-found`, `conflict` of a decided one for everybody else
 */
export const renameComparison = (
  services: Services,
  { siteId, comparisonId }: ComparisonAddress,
  name: string,
  { by, decides }: { by: string; decides: boolean },
): Promise<Comparison> =>
  services.write(async (manager) => {
    const row = await requireComparison(manager, siteId, comparisonId);
    if (!decides) requireOpen(row);
    if (row.name !== name) {
      await updateComparison(manager, comparisonId, { name });
      const what = `renamed from “${row.name}”`;
      await addEvent(manager, comparisonId, { at: services.clock().toISOString(), by, what });
    }
    return comparisonReply(manager, siteId, comparisonId);
  });

/** Closes it; a second end changes nothing but why. */
export const endComparison = (
  services: Services,
  address: ComparisonAddress,
  ending: NonNullable<Ending>,
  by: string,
): Promise<Comparison> =>
  change(services, address, by, () => ({
    set: { status: ending === 'stopped by hand' ? 'stopped' : 'finished', ending },
    what: endingWords[ending],
  }));

export const resumeComparison = (
  services: Services,
  address: ComparisonAddress,
  replicates: number,
  by: string,
): Promise<Comparison> =>
  change(services, address, by, (row) => {
    refuseDraws(row, replicates);
    return {
      set: { status: 'running', ending: null, replicates },
      what:
        replicates === row.replicates ? 'resumed' : `resumed, for ${replicates} replicates of each option`,
    };
  });

/** @throws ProblemError at `optionId` when the comparison has no such option; `conflict` while it has no replicates */
export const decide = (
  services: Services,
  address: ComparisonAddress,
  { optionId, reason, reservations }: DecisionInput,
  by: string,
): Promise<Comparison> =>
  services.write(async (manager) => {
    const { siteId, comparisonId } = address;
    const row = await requireComparison(manager, siteId, comparisonId);
    requireOpen(row);
    const option = readJson(comparisonPlanSchema, row.plan).options.find((o) => o.optionId === optionId);
    if (!option) throw fieldProblem('optionId', 'This option is not part of the comparison');
    const { done } = await comparisonReply(manager, siteId, comparisonId);
    if (done < 2)
      throw new ProblemError(
        'conflict',
        `Found ${done} replicates of each option; a decision needs at least 2 to rest on. Let the comparison run on.`,
      );
    const decidedAt = services.clock().toISOString();
    const decision = { optionId, optionName: option.name, reason, reservations, decidedAt, decidedBy: by };
    const over = row.status === 'running' ? { status: 'stopped', ending: 'stopped by hand' } : {};
    await updateComparison(manager, comparisonId, { ...over, decision: JSON.stringify(decision) });
    await addEvent(manager, comparisonId, { at: decidedAt, by, what: `decided for “${option.name}”` });
    return comparisonReply(manager, siteId, comparisonId);
  });

/** A copy of the plan with all that is stored, open again. */
export const copyComparison = (
  services: Services,
  { siteId, comparisonId }: ComparisonAddress,
  { name, replicates }: { name: string; replicates: number },
  by: string,
): Promise<Comparison> =>
  services.write(async (manager) => {
    const original = await requireComparison(manager, siteId, comparisonId);
    refuseDraws(original, replicates);
    const at = services.clock().toISOString();
    const copy: ComparisonRow = {
      ...original,
      id: randomUUID(),
      name,
      replicates,
      // Until somebody goes on with it: the decision was taken on the original.
      status: 'stopped',
      ending: null,
      decision: null,
      startedAt: at,
      startedBy: by,
    };
    await insertComparison(manager, copy, await layerHashesOf(manager, comparisonId));
    await copyParts(manager, comparisonId, copy.id);
    await addEvent(manager, copy.id, { at, by, what: `copied from “${original.name}”` });
    return comparisonReply(manager, siteId, copy.id);
  });

/** Deletes a comparison with its maps. @throws ProblemError `conflict` once something is decided */
export async function deleteComparison(services: Services, { siteId, comparisonId }: ComparisonAddress) {
  const hashes = await services.write(async (manager) => {
    requireOpen(await requireComparison(manager, siteId, comparisonId));
    return deleteComparisonRows(manager, comparisonId);
  });
  await releaseBlobs(services, hashes);
}
